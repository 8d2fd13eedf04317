import { randomBytes } from "node:crypto";
import { chmodSync, mkdtempSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { type Cluster, ensureDatabase, initialise, urlOf } from "./cluster";
import { startServer } from "./cluster-server";
import { run } from "./command";
import { ensureTools, postgresql } from "./debian";
import { foldersIn, makeFolders } from "./folders";
import { databaseAccount, postgresPrograms } from "./machine";
import { freePort } from "./ports";
import type { Service } from "./service";

/** A running PostgreSQL for tests, with a folder and a port of its own. */
export interface Throwaway {
  readonly folder: string;
  /** Makes the database unless it is there; its address. */
  database(name: string): Promise<string>;
  /** Process of the server. */
  pid(): number | null;
  /** Stops the server and starts it again on the same port, as when a machine's PostgreSQL is restarted under its clients. */
  restart(): Promise<void>;
  /** Stops the server without a chance to tidy up (SIGKILL) and starts it again. */
  crash(): Promise<void>;
  /** Stops the server and removes its folder. */
  remove(): Promise<void>;
}

/** Makes and starts a cluster in the machine's temporary folder; takes about three seconds. */
export async function throwaway(): Promise<Throwaway> {
  await ensureTools([postgresql()]);
  const account = await databaseAccount();
  const data = mkdtempSync(join(tmpdir(), "sweepwright-test-"));
  chmodSync(data, 0o755);
  const folders = foldersIn(data);
  await makeFolders(folders, account);
  const cluster: Cluster = {
    folder: folders.cluster,
    programs: postgresPrograms() ?? "",
    port: await freePort(),
    password: randomBytes(24).toString("base64url"),
    account,
    log: join(folders.logs, "postgres.log"),
    careless: true,
  };
  await initialise(cluster);
  let server: Service = await startServer(cluster);
  return {
    folder: data,
    async database(name) {
      await ensureDatabase(cluster, name);
      return urlOf(cluster, name);
    },
    pid: () => server.pid,
    async restart() {
      await server.stop();
      server = await startServer(cluster);
    },
    async crash() {
      if (server.pid !== null) process.kill(server.pid, "SIGKILL");
      await server.ended;
      server = await startServer(cluster);
    },
    async remove() {
      await server.stop();
      await run("rm", ["-rf", data], { output: "keep" });
    },
  };
}
