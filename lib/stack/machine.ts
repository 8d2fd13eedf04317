import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { run } from "./command";
import { Complaint } from "./complaint";

/** A user of the machine to run a program as. */
export interface Account {
  readonly uid: number;
  readonly gid: number;
}

export const isRoot = (): boolean => process.getuid?.() === 0;

/** PostgreSQL refuses root; root runs it as the user of Debian's package, anyone else as themselves (undefined). */
export async function databaseAccount(): Promise<Account | undefined> {
  if (!isRoot()) return undefined;
  const uid = await run("id", ["-u", "postgres"], { output: "keep" });
  const gid = await run("id", ["-g", "postgres"], { output: "keep" });
  if (uid.code !== 0 || gid.code !== 0) {
    throw new Complaint("PostgreSQL's user `postgres` is missing. Make it with: useradd --system postgres");
  }
  return { uid: Number(uid.text), gid: Number(gid.text) };
}

/** Where Debian keeps the programs of its PostgreSQL, one folder a version. */
const DEBIAN_PROGRAMS = "/usr/lib/postgresql";
const OLDEST_POSTGRESQL = 15;

/** The newest installed PostgreSQL, or the one that made the cluster in `folder`; null when it is missing. */
export function postgresPrograms(folder?: string, programs = DEBIAN_PROGRAMS): string | null {
  const made = folder === undefined ? null : versionOf(folder);
  if (made !== null) return present(join(programs, String(made), "bin"));
  const versions = existsSync(programs) ? readdirSync(programs).map(Number) : [];
  const newest = versions.filter((version) => version >= OLDEST_POSTGRESQL).sort((a, b) => b - a);
  return (
    newest.map((version) => present(join(programs, String(version), "bin"))).find((bin) => bin !== null) ??
    null
  );
}

function present(bin: string): string | null {
  return existsSync(join(bin, "postgres")) && existsSync(join(bin, "initdb")) ? bin : null;
}

/** Version that made the cluster, e.g. 15; null when there is no cluster yet. */
export function versionOf(folder: string): number | null {
  const file = join(folder, "PG_VERSION");
  return existsSync(file) ? Number.parseInt(readFileSync(file, "utf8"), 10) : null;
}

/** Whether a program can be called by its name. */
export function onPath(program: string): boolean {
  return (process.env.PATH ?? "")
    .split(":")
    .some((folder) => folder !== "" && existsSync(join(folder, program)));
}
