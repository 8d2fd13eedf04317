import { mkdirSync } from "node:fs";
import { buildAll, type Outputs } from "./build";
import { bringUpToDate } from "./database";
import { TEST_FOLDER, writeTestTsconfig } from "./phases";
import { freePort } from "./ports";
import { type Running, startWeb, startWorker } from "./programs";

const OUTPUTS: Outputs = {
  pages: `${TEST_FOLDER}/next`,
  worker: `${TEST_FOLDER}/worker`,
  commandLine: null,
};

/** The production build for the browser tests, in folders of its own. */
export async function buildForTests(): Promise<void> {
  writeTestTsconfig();
  await buildAll(OUTPUTS);
}

/**
 * The whole service for the browser tests on an empty database: migrated, with the demo in it. Resolves with the address once it
 * is ready; `stopServices` ends it.
 */
export async function serve(databaseUrl: string, demoPassword: string): Promise<string> {
  await bringUpToDate(databaseUrl, demoPassword);
  const port = await freePort();
  const address = `http://localhost:${port}`;
  const logs = `${TEST_FOLDER}/log`;
  mkdirSync(logs, { recursive: true });
  const running: Running = {
    databaseUrl,
    secret: "a secret of the tests, which guards nothing at all",
    address,
    host: "127.0.0.1",
    port,
    workerHealthPort: await freePort(),
    outputs: OUTPUTS,
    logs,
  };
  await startWorker(running);
  await startWeb(running);
  return address;
}
