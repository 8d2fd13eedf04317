import { spawn } from "node:child_process";
import { closeSync, existsSync, openSync, readFileSync, renameSync, statSync } from "node:fs";
import { environment, type Surroundings } from "./command";
import { Complaint } from "./complaint";
import { type Hold, hold } from "./holder";
import type { Account } from "./machine";

/** A log larger than this is put aside at the next start, bytes. */
const LOG_LIMIT = 8 * 2 ** 20;
/** How much of a log is shown when a program ends badly. */
const TAIL_LINES = 12;

/** What to run, and how to end it. */
export interface Order {
  readonly name: string;
  readonly program: string;
  readonly args: readonly string[];
  readonly folder?: string;
  readonly env?: Surroundings["env"];
  readonly account?: Account | undefined;
  /** File that takes its output. */
  readonly log: string;
  /** Signals to end it with, each with the milliseconds to wait after it. */
  readonly ending?: readonly (readonly [NodeJS.Signals, number])[];
}

const PLAIN_ENDING = [["SIGTERM", 8_000] as const, ["SIGKILL", 2_000] as const];

/** A program of ours that runs beside this one. */
export interface Service {
  readonly name: string;
  readonly pid: number | null;
  readonly log: string;
  /** Resolves with how it ended: "exit code 1", "SIGKILL". */
  readonly ended: Promise<string>;
  running(): boolean;
  /** Last lines of what it wrote since it was launched. */
  tail(): string;
  stop(): Promise<void>;
}

/** Launched and not yet ended, in the order of launching. */
const live = new Set<Service>();

let closing = false;
let told: (service: Pick<Service, "name" | "pid">, running: boolean) => void = () => undefined;

/** Takes a folder as `hold` does and writes down there every program that is launched from now on, until it ends. */
export async function holdForPrograms(file: string, what?: string): Promise<Hold> {
  const held = await hold(file, what);
  told = ({ name, pid }, running) => held.setChild(name, running ? pid : null);
  return held;
}

/** From now on nothing is launched any more: everything is about to be stopped. */
export function closeServices(): void {
  closing = true;
}

/** Stops everything that still runs, the latest first. */
export async function stopServices(): Promise<void> {
  closeServices();
  for (const service of [...live].reverse()) await service.stop();
}

/**
 * Launches a program in a process group of its own, so that an interrupt at the terminal reaches this process alone and the
 * programs are ended in order.
 */
export function launch(order: Order): Service {
  if (closing) throw new Complaint(`The ${order.name} is not started: everything is being stopped.`);
  if (existsSync(order.log) && statSync(order.log).size > LOG_LIMIT)
    renameSync(order.log, `${order.log}.old`);
  const log = openSync(order.log, "a", 0o640);
  const from = statSync(order.log).size;
  const child = spawn(order.program, order.args, {
    cwd: order.folder ?? process.cwd(),
    env: environment(order.env),
    detached: true,
    stdio: ["ignore", log, log],
    ...order.account,
  });
  closeSync(log);
  let alive = child.pid !== undefined;
  const ended = new Promise<string>((resolve) => {
    const end = (how: string) => {
      alive = false;
      live.delete(service);
      told(service, false);
      resolve(how);
    };
    child.once("error", (error) => end(error.message));
    child.once("exit", (code, signal) => end(signal ?? `exit code ${code}`));
  });
  const service: Service = {
    name: order.name,
    pid: child.pid ?? null,
    log: order.log,
    ended,
    running: () => alive,
    tail: () => lastLines(order.log, from),
    async stop() {
      for (const [signal, wait] of order.ending ?? PLAIN_ENDING) {
        if (!alive) return;
        child.kill(signal);
        await Promise.race([ended, new Promise((next) => setTimeout(next, wait).unref())]);
      }
    },
  };
  if (alive) {
    live.add(service);
    told(service, true);
  }
  return service;
}

function lastLines(log: string, from: number): string {
  const text = readFileSync(log).subarray(from).toString();
  return text.trimEnd().split("\n").slice(-TAIL_LINES).join("\n");
}
