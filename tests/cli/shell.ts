import { command } from "@/lib/cli/main";
import type { Sink, World } from "@/lib/cli/world";

/** What a command said and how it left. */
export interface Answer {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

export interface Surroundings {
  readonly folder?: string;
  readonly input?: string | Uint8Array;
  readonly environment?: World["environment"];
  readonly terminal?: boolean;
  readonly signal?: AbortSignal;
}

/** Runs a command line in this process, with what it writes kept. */
export async function shell(words: readonly string[], around: Surroundings = {}): Promise<Answer> {
  const written = { out: "", err: "" };
  const sink = (to: "out" | "err"): Sink => ({
    write: (text) => {
      written[to] += text;
    },
    isTerminal: around.terminal ?? false,
    columns: 100,
  });
  const code = await command(words, {
    folder: around.folder ?? process.cwd(),
    environment: around.environment ?? {},
    input: async () => Buffer.from(around.input ?? ""),
    out: sink("out"),
    err: sink("err"),
    signal: around.signal ?? new AbortController().signal,
  });
  return { code, ...written };
}

/** A voltage divider whose output is half of V_in, with what must hold of it. */
export function divider(requirement: string): string {
  return [
    'title "Divider"',
    "",
    "knob V_in = 1 V",
    "",
    "ground -- V1 : voltage V_in -- a -- R1 : resistor 1 kΩ -- out -- R2 : resistor 1 kΩ -- ground",
    "",
    "sweep V_in from 1 V to 2 V, 11 points",
    "",
    "show out = out.v",
    "read top = highest(out)",
    ...(requirement === "" ? [] : [requirement]),
    "",
  ].join("\n");
}
