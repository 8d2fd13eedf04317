import { mkdirSync } from "node:fs";
import { buildAll, buildWorker, DEMO_OUTPUTS } from "./build";
import { endCommands } from "./command";
import { explain } from "./complaint";
import { openDatabase, prepare } from "./database";
import { dataFolder, foldersIn } from "./folders";
import type { Hold } from "./holder";
import { onInterrupt } from "./interrupt";
import { type Keeper, keep, type Told } from "./keeper";
import { isRoot } from "./machine";
import { choosePort, freePort, keepPort } from "./ports";
import { type Running, startWeb, startWorker } from "./programs";
import { closeServices, holdForPrograms, stopServices } from "./service";
import { requireSpace } from "./space";
import { welcome } from "./welcome";

/** Space that a build of the pages takes in the checkout, MiB. */
const BUILD_SPACE = 300;

const development = process.argv.includes("--dev");
/** In the order of starting; they are stopped in the reverse order: web, worker, database. */
const keepers: Keeper[] = [];
let held: Hold | null = null;
let stopping = false;

async function stopAll(): Promise<void> {
  stopping = true;
  closeServices();
  endCommands();
  for (const keeper of [...keepers].reverse()) await keeper.stop();
  await stopServices();
  held?.release();
}

async function giveUp(sentence: string): Promise<never> {
  if (!stopping) console.error(sentence);
  await stopAll();
  process.exit(1);
}

onInterrupt(async () => {
  console.log("\nStopping the web service, the worker and the database.");
  await stopAll();
  console.log("Stopped.");
  return 0;
});

const told: Told = {
  say: (sentence) => console.log(sentence),
  givenUp: (sentence) => void giveUp(sentence),
};

async function start(): Promise<void> {
  const began = Date.now();
  const folders = foldersIn(dataFolder(process.cwd(), isRoot()));
  mkdirSync(folders.data, { recursive: true });
  held = await holdForPrograms(folders.holder);
  const host = process.env.HOST || "127.0.0.1";
  const chosen = await choosePort(process.env.PORT, host);

  console.log(`Starting the database in ${folders.data}.`);
  const database = await openDatabase(folders, told);
  keepers.push(database.keeper);

  requireSpace(process.cwd(), BUILD_SPACE);
  if (development) await buildWorker(DEMO_OUTPUTS.worker);
  else await buildAll(DEMO_OUTPUTS);
  // After the build, so that the demo's runs do not wait a minute for their worker.
  const password = await prepare(database, folders);

  // What listens there by now would answer in our place.
  const port = await keepPort(chosen, process.env.PORT, host);
  const address = process.env.NEXTAUTH_URL || `http://localhost:${port}`;
  const running: Running = {
    databaseUrl: database.url,
    secret: database.settings.secret,
    address,
    host,
    port,
    workerHealthPort: await freePort(),
    outputs: DEMO_OUTPUTS,
    logs: folders.logs,
    development,
  };
  console.log("Starting the worker and the web service.");
  keepers.push(await keep("worker", () => startWorker(running), told));
  keepers.push(await keep("web service", () => startWeb(running), told));
  held.setAddress(address);
  console.log(welcome({ address, password, folders, seconds: (Date.now() - began) / 1000 }));
}

try {
  await start();
} catch (error) {
  if (!stopping) await giveUp(explain(error));
}
