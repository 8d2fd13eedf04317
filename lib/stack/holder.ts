import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { Complaint } from "./complaint";
import { endProcess, identityOf } from "./identity";

/** Name of PostgreSQL among the programs that run. */
export const DATABASE = "database";

interface Known {
  readonly name: string;
  readonly pid: number;
  readonly identity: string;
}

/** What running.json says of the process that uses a data folder. */
interface Record extends Known {
  readonly address: string | null;
  readonly children: readonly Known[];
}

/** A data folder held by this process. */
export interface Hold {
  /** Writes down where the service is found. */
  setAddress(address: string): void;
  /** Writes down a child, so that the next start can end it if this process is killed; null when it has ended. */
  setChild(name: string, pid: number | null): void;
  release(): void;
}

/**
 * Takes a data folder for this process alone. Complains when a live process holds it; what a killed one left behind is ended
 * first. `file` is running.json, `what` is told to whoever comes second.
 */
export async function hold(file: string, what = "Sweepwright"): Promise<Hold> {
  const me: Known = { name: "npm start", pid: process.pid, identity: identityOf(process.pid) ?? "" };
  const children = new Map<string, Known>();
  let address: string | null = null;
  const text = () => `${JSON.stringify({ ...me, address, children: [...children.values()] })}\n`;
  const own = `${file}.${process.pid}`;
  const write = () => {
    writeFileSync(own, text(), { mode: 0o644 });
    renameSync(own, file);
  };
  await take(file, own, text(), what);
  return {
    setAddress(found) {
      address = found;
      write();
    },
    setChild(name, pid) {
      const identity = pid === null ? null : identityOf(pid);
      if (pid === null || identity === null) children.delete(name);
      else children.set(name, { name, pid, identity });
      write();
    },
    release: () => rmSync(file, { force: true }),
  };
}

/** Two starts at once: a link is made by one of them only. */
async function take(file: string, own: string, text: string, what: string): Promise<void> {
  for (;;) {
    writeFileSync(own, text, { mode: 0o644 });
    try {
      linkSync(own, file);
      return;
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== "EEXIST") throw error;
    } finally {
      rmSync(own, { force: true });
    }
    const other = read(file);
    if (other !== null && identityOf(other.pid) === other.identity) throw new Complaint(inUse(other, what));
    for (const child of inStoppingOrder(other?.children ?? [])) await endLeftover(child);
    rmSync(file, { force: true });
  }
}

/** The database last, since the others use it. */
function inStoppingOrder(children: readonly Known[]): readonly Known[] {
  return [...children].sort((a, b) => Number(a.name === DATABASE) - Number(b.name === DATABASE));
}

/** Ends a program of a start that was killed. To PostgreSQL, SIGTERM would mean to wait for its clients. */
async function endLeftover({ name, pid, identity }: Known): Promise<void> {
  if (identityOf(pid) !== identity) return;
  console.log(`Ending the ${name} (process ${pid}), which an earlier start left behind.`);
  const first = name === DATABASE ? "SIGINT" : "SIGTERM";
  await endProcess(pid, [
    [first, 8_000],
    ["SIGKILL", 2_000],
  ]);
}

function inUse({ pid, address }: Record, what: string): string {
  const where = address === null ? "" : `, at ${address}`;
  return `${what} already runs from this folder${where} (process ${pid}). Use that one, or stop it first: kill ${pid}`;
}

function read(file: string): Record | null {
  try {
    return JSON.parse(readFileSync(file, "utf8")) as Record;
  } catch {
    return null;
  }
}
