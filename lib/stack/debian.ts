import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
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
  await update();
  if (packages.some((name) => name.startsWith("postgresql")))
    await withoutExtraCluster(() => install(packages));
  else await install(packages);
  const still = tools.filter((tool) => !tool.present()).map((tool) => tool.name);
  if (still.length > 0)
    throw new Complaint(`apt ended well, but ${still.join(" and ")} cannot be found. Try: ${command}`);
}

const APT = ["-o", "DPkg::Lock::Timeout=300"];
const QUIETLY = { output: "keep", env: { DEBIAN_FRONTEND: "noninteractive" } } as const;

/** An old list is no reason to stop when it cannot be brought up to date: the package may be in it all the same. */
async function update(): Promise<void> {
  await run("apt-get", [...APT, "update"], QUIETLY);
}

async function install(packages: readonly string[]): Promise<void> {
  const made = await run(
    "apt-get",
    [...APT, "install", "-y", "--no-install-recommends", ...packages],
    QUIETLY,
  );
  if (made.code === 0) return;
  const last = made.text.trim().split("\n").slice(-4).join("\n");
  throw new Complaint(
    fullDisk(made.text, "/") ?? `apt could not install ${packages.join(" ")}. It says:\n${last}`,
  );
}

/** Where Debian's package reads whether to make a server of its own. */
const CREATION = "/etc/postgresql-common/createcluster.d";

/** Debian's package makes and starts a server when it is installed; ours is kept apart, so it is asked not to. */
async function withoutExtraCluster(work: () => Promise<void>): Promise<void> {
  await install(["postgresql-common"]);
  const made = mkdirSync(CREATION, { recursive: true });
  const setting = join(CREATION, "sweepwright.conf");
  writeFileSync(setting, "create_main_cluster = false\n");
  try {
    await work();
  } finally {
    rmSync(made ?? setting, { recursive: true, force: true });
  }
}
