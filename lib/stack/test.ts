import { mkdirSync } from "node:fs";
import { endCommands } from "./command";
import { explain } from "./complaint";
import { bringUpToDate, DEMO_PASSWORD } from "./database";
import { CHROMIUM, ensureTools, postgresql, REDIS } from "./debian";
import type { Hold } from "./holder";
import { onInterrupt } from "./interrupt";
import { chosenParts, type Part } from "./options";
import { checkFormat, checkTypes, runTests, TEST_FOLDER } from "./phases";
import { buildForTests, serve } from "./served";
import { closeServices, holdForPrograms, stopServices } from "./service";
import { closingLine, NOTHING, single, sum, type Tally } from "./tally";
import { type Throwaway, throwaway } from "./throwaway";

const tallies: Tally[] = [];
let held: Hold | null = null;
let cluster: Throwaway | null = null;

/** Runs one phase and tells its seconds; a phase that could not be run counts as one failure. */
async function phase(name: string, work: () => Promise<Tally>): Promise<boolean> {
  console.log(`\n── ${name}`);
  const began = Date.now();
  const tally = await work().catch((error) => {
    console.error(explain(error));
    return single(false);
  });
  tallies.push(tally);
  console.log(`── ${name}: ${closingLine(tally)}, ${((Date.now() - began) / 1000).toFixed(1)} s`);
  return tally.failed === 0;
}

/** Work between the checks: it counts only when it fails. */
function preparation(name: string, work: () => Promise<void>): Promise<boolean> {
  return phase(name, async () => {
    await work();
    return NOTHING;
  });
}

async function runIntegration(): Promise<void> {
  const own = cluster;
  if (own === null) return;
  await phase("integration tests", async () => {
    const url = await own.database("sweepwright_test");
    await bringUpToDate(url, null);
    return runTests("integration", { TEST_DATABASE_URL: url, DATABASE_URL: url });
  });
}

async function runBrowser(): Promise<void> {
  const own = cluster;
  if (own === null) return;
  const env: Record<string, string> = { SWEEPWRIGHT_DEMO_PASSWORD: DEMO_PASSWORD };
  const ready =
    (await preparation("production build", buildForTests)) &&
    (await preparation("service with the demo", async () => {
      env.DATABASE_URL = await own.database("sweepwright_browser");
      env.E2E_URL = await serve(env.DATABASE_URL, DEMO_PASSWORD);
    }));
  if (ready) await phase("browser tests", () => runTests("e2e", env));
}

async function runParts(parts: readonly Part[]): Promise<void> {
  if (parts.includes("format")) await phase("format and lint", checkFormat);
  if (parts.includes("types")) await phase("types", checkTypes);
  if (parts.includes("unit")) await phase("unit tests", () => runTests("unit"));
  if (!parts.includes("integration") && !parts.includes("e2e")) return;
  const ready = await preparation("database", async () => {
    await ensureTools([postgresql(), REDIS, ...(parts.includes("e2e") ? [CHROMIUM] : [])]);
    cluster = await throwaway();
  });
  if (ready && parts.includes("integration")) await runIntegration();
  if (ready && parts.includes("e2e")) await runBrowser();
}

async function tidyUp(): Promise<void> {
  closeServices();
  endCommands();
  await stopServices();
  await cluster?.remove();
  held?.release();
}

onInterrupt(async () => {
  console.log("\nStopping the tests.");
  await tidyUp();
  return 130;
});

try {
  const parts = chosenParts(process.argv.slice(2));
  mkdirSync(TEST_FOLDER, { recursive: true });
  held = await holdForPrograms(`${TEST_FOLDER}/running.json`, "npm test");
  const began = Date.now();
  await runParts(parts);
  await tidyUp();
  const all = sum(tallies);
  console.log(`\nAll in ${((Date.now() - began) / 1000).toFixed(0)} s.\n${closingLine(all)}`);
  process.exitCode = all.failed === 0 && all.passed > 0 ? 0 : 1;
} catch (error) {
  console.error(explain(error));
  await tidyUp();
  process.exitCode = 1;
}
