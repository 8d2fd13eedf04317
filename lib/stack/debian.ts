import { rmSync, writeFileSync } from "node:fs";
import { run } from "./command";
import { Complaint, fullDisk } from "./complaint";
import { isRoot, onPath, postgresPrograms, versionOf } from "./machine";

/** A program of Debian that the work needs. */
export interface Tool {
  /** As told to a person. */
  readonly name: string;
  readonly package: string;
  readonly present: () => boolean;
}

/** `folder` is the cluster that the server is wanted for, when there is one already. */
export function postgresql(folder?: string): Tool {
  const version = folder === undefined ? null : versionOf(folder);
  const present = () => postgresPrograms(folder) !== null;
  return version === null
    ? { name: "PostgreSQL", package: "postgresql", present }
    : {
        name: `PostgreSQL ${version}, which made the database in ${folder}`,
        package: `postgresql-${version}`,
        present,
      };
}

export const CHROMIUM: Tool = { name: "Chromium", package: "chromium", present: () => onPath("chromium") };
export const REDIS: Tool = { name: "Redis", package: "redis-server", present: () => onPath("redis-server") };

/**
 * Installs what is missing, as root through apt. Complains with the command to run for anyone else, and where there is no apt.
 */
export async function ensureTools(
  tools: readonly Tool[],
  root = isRoot(),
  apt = onPath("apt-get"),
): Promise<void> {
  const missing = tools.filter((tool) => !tool.present());
  if (missing.length === 0) return;
  const packages = missing.map((tool) => tool.package);
  const names = missing.map((tool) => tool.name).join(" and ");
  const [are, them] = missing.length === 1 ? ["is", "it"] : ["are", "them"];
  if (!apt)
    throw new Complaint(
      `${names} ${are} missing. Install ${them} with your system's package manager and start again.`,
    );
  const command = `apt-get install --no-install-recommends ${packages.join(" ")}`;
  if (!root)
    throw new Complaint(
      `${names} ${are} missing. Install ${them} with:\n  sudo ${command}\nand start again.`,
    );
  console.log(`Installing ${names} from Debian's packages.`);
  await withoutExtraCluster(() => install(packages));
  const still = tools.filter((tool) => !tool.present()).map((tool) => tool.name);
  if (still.length > 0)
    throw new Complaint(`apt ended well, but ${still.join(" and ")} cannot be found. Try: ${command}`);
}

async function install(packages: readonly string[]): Promise<void> {
  const around = { output: "keep", env: { DEBIAN_FRONTEND: "noninteractive" } } as const;
  const wait = ["-o", "DPkg::Lock::Timeout=300"];
  // An old list is no reason to stop: the package may be in it all the same.
  await run("apt-get", [...wait, "update"], around);
  const made = await run(
    "apt-get",
    [...wait, "install", "-y", "--no-install-recommends", ...packages],
    around,
  );
  if (made.code === 0) return;
  const last = made.text.trim().split("\n").slice(-4).join("\n");
  throw new Complaint(
    fullDisk(made.text, "/") ?? `apt could not install ${packages.join(" ")}. It says:\n${last}`,
  );
}

/** Debian's package starts a server of its own when it is installed; ours is kept apart, so it is asked not to. */
async function withoutExtraCluster(work: () => Promise<void>): Promise<void> {
  const packages = (await run("dpkg", ["-s", "postgresql-common"], { output: "keep" })).code === 0;
  if (!packages) await install(["postgresql-common"]).catch(() => undefined);
  const setting = "/etc/postgresql-common/createcluster.d/sweepwright.conf";
  try {
    writeFileSync(setting, "create_main_cluster = false\n");
  } catch {
    // Without that folder the package makes its own server, which does no harm.
  }
  try {
    await work();
  } finally {
    rmSync(setting, { force: true });
  }
}
