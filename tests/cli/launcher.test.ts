import { spawn } from "node:child_process";
import { tmpdir } from "node:os";
import { resolve } from "node:path";
import { describe, expect, test } from "vitest";
import { divider } from "./shell";

const LAUNCHER = resolve("lib/cli/sweepwright.mjs");

/** Starts the program as a pipeline does, from another folder, with a text on its standard input. */
function launch(words: readonly string[], input: string) {
  const child = spawn(process.execPath, [LAUNCHER, ...words], { cwd: tmpdir() });
  const written = { out: "", err: "" };
  child.stdout.setEncoding("utf8").on("data", (part: string) => {
    written.out += part;
  });
  child.stderr.setEncoding("utf8").on("data", (part: string) => {
    written.err += part;
  });
  child.stdin.end(input);
  const ended = new Promise<{ code: number | null; out: string; err: string }>((done) =>
    child.on("close", (code) => done({ code, ...written })),
  );
  return { child, ended };
}

describe("the program", { timeout: 60_000 }, () => {
  test("runs from any folder and gives its exit code to the caller", async () => {
    const held = await launch(["run", "--json", "-"], divider("require top <= 1.1 V")).ended;
    expect({ code: held.code, verdict: JSON.parse(held.out).verdict }).toEqual({ code: 0, verdict: "holds" });
    const broken = await launch(["run", "-"], divider("require top <= 0.9 V")).ended;
    expect(broken.code).toBe(1);
    const unknown = await launch(["prove", "-"], "").ended;
    expect({ code: unknown.code, out: unknown.out }).toEqual({ code: 2, out: "" });
  });

  test("ends its threads at an interrupt and leaves with 130", async () => {
    const long = divider("")
      .replace("11 points", "10001 points")
      .replace("read", "knob R = 1 Ω\nsweep R from 1 Ω to 2 Ω, 90 points\nshow R\nread");
    // A warning is told before anything is solved, so that the test knows when to interrupt.
    const { child, ended } = launch(["run", "-"], `${long}${WARNED}`);
    child.stderr.once("data", () => child.kill("SIGINT"));
    const { code, out, err } = await ended;
    expect({ code, out }).toEqual({ code: 130, out: "" });
    expect(err).toContain("Interrupted");
  });

  test("takes it well when its reader has seen enough", async () => {
    const { child, ended } = launch(["check", "-"], divider(""));
    child.stdout.destroy();
    expect((await ended).code).toBe(0);
  });
});

/** An amplifier without feedback, of which the check warns. */
const WARNED = [
  "model amp : opamp { gain = 10 }",
  "A1 : amp { plus = out, minus = ground, out = w }",
  "w -- RW : resistor 1 kΩ -- ground",
  "",
].join("\n");
