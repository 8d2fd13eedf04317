import { readFileSync, readlinkSync } from "node:fs";

/**
 * Tells a process from a later one that got the same number: the machine's boot and the process's start within it, from Linux's
 * /proc. Null when there is no such process; elsewhere than on Linux the number alone.
 */
export function identityOf(pid: number): string | null {
  if (process.platform !== "linux") return isAlive(pid) ? String(pid) : null;
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8");
    // Fields after the name, which may itself hold blanks and brackets: the state is the 3rd of all, the start the 22nd.
    const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    if (fields[0] === "Z" || fields[0] === "X") return null;
    return `${readFileSync("/proc/sys/kernel/random/boot_id", "utf8").trim()}:${fields[19]}`;
  } catch {
    return null;
  }
}

/** Working folder of a process; null when it cannot be told. */
export function folderOf(pid: number): string | null {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch {
    return null;
  }
}

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === "EPERM";
  }
}

/**
 * Ends a process that is no child of ours: each signal in turn, with the milliseconds to wait after it. Resolves when it has
 * ended, or when all signals were of no use.
 */
export async function endProcess(
  pid: number,
  steps: readonly (readonly [NodeJS.Signals, number])[],
): Promise<void> {
  const identity = identityOf(pid);
  for (const [signal, wait] of steps) {
    if (identity === null || identityOf(pid) !== identity) return;
    try {
      process.kill(pid, signal);
    } catch {
      return;
    }
    const until = Date.now() + wait;
    while (Date.now() < until && identityOf(pid) === identity)
      await new Promise((next) => setTimeout(next, 20));
  }
}
