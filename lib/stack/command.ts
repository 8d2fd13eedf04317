import { type ChildProcess, spawn } from "node:child_process";

/** Commands that run at present, so that an interrupt can end them. */
const running = new Set<ChildProcess>();

export interface Surroundings {
  /** Added to the environment; null takes a variable away. */
  readonly env?: Readonly<Record<string, string | null>>;
  /** "show" passes the output on to the terminal; "keep" returns it. */
  readonly output?: "show" | "keep";
  readonly user?: { readonly uid: number; readonly gid: number } | undefined;
  readonly folder?: string;
}

export interface Ended {
  /** Exit code; 127 when there is no such program, 128 and above when a signal ended it. */
  readonly code: number;
  /** Output and errors together; empty when they were shown. */
  readonly text: string;
}

/** Runs a command to its end; never throws for a command that fails. */
export function run(program: string, args: readonly string[], around: Surroundings = {}): Promise<Ended> {
  const keep = around.output === "keep";
  return new Promise((resolve) => {
    const child = spawn(program, args, {
      cwd: around.folder ?? process.cwd(),
      env: environment(around.env),
      stdio: ["ignore", keep ? "pipe" : "inherit", keep ? "pipe" : "inherit"],
      ...around.user,
    });
    running.add(child);
    const parts: string[] = [];
    child.stdout?.on("data", (part: Buffer) => parts.push(part.toString()));
    child.stderr?.on("data", (part: Buffer) => parts.push(part.toString()));
    child.on("error", (error) => finish(127, error.message));
    child.on("close", (code, signal) => finish(code ?? 128, signal === null ? "" : `Ended by ${signal}.`));
    function finish(code: number, more: string): void {
      running.delete(child);
      resolve({ code, text: [...parts, more].join("") });
    }
  });
}

/** Runs a program of node_modules by its own script, without a shell between. */
export function runPackage(script: string, args: readonly string[], around?: Surroundings): Promise<Ended> {
  return run(process.execPath, [`node_modules/${script}`, ...args], around);
}

/** The present environment with changes. */
export function environment(changes: Surroundings["env"] = {}): NodeJS.ProcessEnv {
  const all: NodeJS.ProcessEnv = { ...process.env };
  for (const [name, value] of Object.entries(changes)) {
    if (value === null) delete all[name];
    else all[name] = value;
  }
  return all;
}

/** Ends the commands that still run. */
export function endCommands(): void {
  for (const child of running) child.kill("SIGTERM");
}
