import { join } from "node:path";
import { type Cluster, ensureDatabase, initialise, ROLE, urlOf } from "./cluster";
import { startServer } from "./cluster-server";
import { run } from "./command";
import { Complaint, fullDisk } from "./complaint";
import { ensureTools, postgresql } from "./debian";
import { type Folders, makeFolders } from "./folders";
import { DATABASE } from "./holder";
import { type Keeper, keep, type Told } from "./keeper";
import { databaseAccount, postgresPrograms } from "./machine";
import { freePort, isFree } from "./ports";
import { newSettings, readSettings, type Settings, writeSettings } from "./settings";
import { requireSpace } from "./space";

/** The database of a data folder, running and up to date. */
export interface Database {
  readonly url: string;
  readonly settings: Settings;
  readonly keeper: Keeper;
}

/** Password of the demo accounts, unless SWEEPWRIGHT_DEMO_PASSWORD says another at the first start. */
export const DEMO_PASSWORD = "log-ratio-bench-7";
/** What a first start puts into the data folder, with room to work, MiB. */
const SPACE = 300;

/** Installs PostgreSQL where it is missing, makes the cluster of the folder once, starts it and has it kept running. */
export async function openDatabase(folders: Folders, told: Told): Promise<Database> {
  await ensureTools([postgresql(folders.cluster)]);
  const account = await databaseAccount();
  await makeFolders(folders, account);
  requireSpace(folders.data, SPACE);
  const settings = await settle(folders);
  const cluster: Cluster = {
    folder: folders.cluster,
    programs: postgresPrograms(folders.cluster) ?? "",
    port: settings.databasePort,
    password: settings.databasePassword,
    account,
    log: join(folders.logs, "postgres.log"),
    careless: false,
  };
  await initialise(cluster);
  const keeper = await keep(DATABASE, () => startServer(cluster), told);
  await ensureDatabase(cluster, ROLE);
  return { url: urlOf(cluster, ROLE), settings, keeper };
}

/** The kept settings, with another port when the kept one is taken by now. */
async function settle(folders: Folders): Promise<Settings> {
  const kept = readSettings(folders.settings);
  if (kept !== null && (await isFree(kept.databasePort))) return kept;
  const settings =
    kept === null ? newSettings(await freePort()) : { ...kept, databasePort: await freePort() };
  writeSettings(folders.settings, settings);
  return settings;
}

/** Migrates, and seeds the demo once. Resolves with the demo accounts' password. */
export async function prepare(database: Database, folders: Folders): Promise<string> {
  const { settings, url } = database;
  const password = settings.demoPassword ?? (process.env.SWEEPWRIGHT_DEMO_PASSWORD || DEMO_PASSWORD);
  const seeded = settings.demoPassword !== null;
  await bringUpToDate(url, seeded ? null : password);
  if (!seeded) writeSettings(folders.settings, { ...settings, demoPassword: password });
  return password;
}

/** Runs prepare.ts on a database; with a password it also puts the demo in. */
export async function bringUpToDate(url: string, demoPassword: string | null): Promise<void> {
  const args = ["--import", "tsx", "lib/stack/prepare.ts", ...(demoPassword === null ? [] : ["--seed"])];
  const env = { DATABASE_URL: url, SWEEPWRIGHT_DEMO_PASSWORD: demoPassword };
  const made = await run(process.execPath, args, { env, output: "keep" });
  if (made.code === 0) return;
  const last = made.text.trim().split("\n").slice(-15).join("\n");
  throw new Complaint(
    fullDisk(made.text, "the database") ?? `The database could not be brought up to date:\n${last}`,
  );
}
