import { readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { Client } from "pg";
import { type Cluster, urlOf } from "./cluster";
import { Complaint, fullDisk } from "./complaint";
import { DATABASE } from "./holder";
import { endProcess, folderOf, isAlive } from "./identity";
import { launch, type Service } from "./service";

/** How long a server may take to answer: after a crash it first replays what it had promised. */
const READY_WITHIN = 120_000;
/** Tries while the processes of a killed server still hold its memory. */
const TRIES = 20;

const CARELESS = ["fsync=off", "synchronous_commit=off", "full_page_writes=off"];

/**
 * Starts the server of a cluster and waits until it answers. Also after a crash: what a killed server left does not stop it, and
 * a server of this cluster that still runs without anyone to look after it is ended first.
 */
export async function startServer(cluster: Cluster): Promise<Service> {
  await clearLeftovers(cluster);
  for (let attempt = 1; ; attempt++) {
    const service = launch(order(cluster));
    const failure = await readiness(cluster, service);
    if (failure === null) return service;
    await service.stop();
    const held = /shared memory block .* is still in use|lock file "postmaster.pid" already exists/.test(
      service.tail(),
    );
    if (!held || attempt === TRIES) throw failure;
    await new Promise((next) => setTimeout(next, 500));
  }
}

function order(cluster: Cluster) {
  const settings = [
    "listen_addresses=127.0.0.1",
    // The loopback port asks for a password; a socket file would only be one more way in.
    "unix_socket_directories=",
    "max_connections=120",
    "shared_buffers=128MB",
    "log_min_messages=warning",
    ...(cluster.careless ? CARELESS : []),
  ];
  const options = settings.flatMap((setting) => ["-c", setting]);
  return {
    name: DATABASE,
    program: join(cluster.programs, "postgres"),
    args: ["-D", cluster.folder, "-p", String(cluster.port), ...options],
    folder: cluster.folder,
    log: cluster.log,
    account: cluster.account,
    // Fast: open transactions are rolled back. Then at once: the next start recovers from the log of changes.
    ending: [["SIGINT", 30_000] as const, ["SIGQUIT", 10_000] as const, ["SIGKILL", 5_000] as const],
  };
}

/** Null when the server answers; otherwise why it does not. */
async function readiness(cluster: Cluster, service: Service): Promise<Error | null> {
  const until = Date.now() + READY_WITHIN;
  let last = "";
  while (service.running() && Date.now() < until) {
    const answer = await ask(cluster);
    if (answer === null) return null;
    if (answer.code === "28P01") {
      return new Complaint(
        `The database in ${cluster.folder} does not take the password kept in settings.json beside it: the two do not belong together.`,
      );
    }
    last = answer.message;
    await new Promise((next) => setTimeout(next, 40));
  }
  const said = service.tail();
  if (service.running())
    return new Complaint(`PostgreSQL did not answer within ${READY_WITHIN / 1000} s: ${last}`);
  return new Complaint(
    fullDisk(said, cluster.folder) ??
      `PostgreSQL did not start. Its log, ${cluster.log}, ends with:\n${said}`,
  );
}

async function ask(cluster: Cluster): Promise<{ readonly code?: string; readonly message: string } | null> {
  const client = new Client({ connectionString: urlOf(cluster, "postgres"), connectionTimeoutMillis: 2_000 });
  client.on("error", () => undefined);
  try {
    await client.connect();
    await client.query("SELECT 1");
    return null;
  } catch (error) {
    return error as Error;
  } finally {
    await client.end().catch(() => undefined);
  }
}

/** postmaster.pid of a server that was killed: ends the server if it lives, forgets it if another process has its number now. */
async function clearLeftovers(cluster: Cluster): Promise<void> {
  const file = join(cluster.folder, "postmaster.pid");
  const pid = readPid(file);
  if (pid === null || !isAlive(pid)) return;
  if (folderOf(pid) === cluster.folder)
    await endProcess(pid, [
      ["SIGINT", 20_000],
      ["SIGQUIT", 5_000],
      ["SIGKILL", 5_000],
    ]);
  else rmSync(file, { force: true });
}

function readPid(file: string): number | null {
  try {
    const pid = Number.parseInt(readFileSync(file, "utf8"), 10);
    return pid > 0 ? pid : null;
  } catch {
    return null;
  }
}
