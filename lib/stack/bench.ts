import { mkdirSync, readdirSync, readFileSync } from "node:fs";
import { basename } from "node:path";
import { endCommands, run } from "./command";
import { Complaint, explain } from "./complaint";
import { DEMO_PASSWORD } from "./database";
import { CHROMIUM, ensureTools } from "./debian";
import type { Hold } from "./holder";
import { onInterrupt } from "./interrupt";
import { TEST_FOLDER } from "./phases";
import { buildForTests, serve } from "./served";
import { closeServices, holdForPrograms, stopServices } from "./service";
import { type Throwaway, throwaway } from "./throwaway";

const FOLDER = "tests/bench";

/** What takes an hour, or fetches a program of others, is measured only when it is named. */
const LONG: ReadonlySet<string> = new Set(["fuzz", "lighthouse"]);

let held: Hold | null = null;
let cluster: Throwaway | null = null;

/**
 * Measures named by the words; a measure is a file of tests/bench that measures when it is run. Without words all but the long
 * ones, and those that drive a browser only where E2E_URL names a service.
 */
function chosen(words: readonly string[]): string[] {
  const all = readdirSync(FOLDER).filter((name) => name.endsWith(".ts"));
  const measures = all
    .filter((name) => /^(await )?\w+\(.*\);$/m.test(readFileSync(`${FOLDER}/${name}`, "utf8")))
    .sort();
  const names = measures.map((name) => basename(name, ".ts"));
  const unknown = words.filter((word) => !names.includes(word));
  if (unknown.length > 0) {
    throw new Complaint(`There is no measure called ${unknown.join(", ")}. There are: ${names.join(", ")}.`);
  }
  if (words.length > 0) return names.filter((name) => words.includes(name));
  const given = process.env.E2E_URL;
  const short = names.filter((name) => !LONG.has(name));
  const left = short.filter((name) => !given && drivesBrowser(name));
  if (left.length > 0) {
    console.error(`Left out: ${left.join(", ")}. Name one, or set E2E_URL to the address of a service.`);
  }
  return short.filter((name) => !left.includes(name));
}

/** Whether a measure drives the browser, and so needs a running service. */
function drivesBrowser(name: string): boolean {
  return readFileSync(`${FOLDER}/${name}.ts`, "utf8").includes("/e2e/harness");
}

/** Address of a service to measure: the one named in E2E_URL, or one made for this and removed afterwards. */
async function service(): Promise<string> {
  const given = process.env.E2E_URL;
  if (given) return given;
  await ensureTools([CHROMIUM]);
  mkdirSync(TEST_FOLDER, { recursive: true });
  held = await holdForPrograms(`${TEST_FOLDER}/running.json`, "npm test or npm run bench");
  await buildForTests();
  cluster = await throwaway();
  return serve(await cluster.database("sweepwright_bench"), DEMO_PASSWORD);
}

/** The figures that a measure printed as an object on a line of its own; what else it said counts for nothing. */
function printedBy(text: string): object {
  const line = text.split("\n").findLast((one) => one.startsWith("{"));
  return line === undefined ? {} : JSON.parse(line);
}

async function tidyUp(): Promise<void> {
  closeServices();
  endCommands();
  await stopServices();
  await cluster?.remove();
  held?.release();
}

onInterrupt(async () => {
  await tidyUp();
  return 130;
});

try {
  const words = process.argv.slice(2);
  const isOption = (word: string) => /^(-|\d)/.test(word);
  const options = words.filter(isOption);
  const names = chosen(words.filter((word) => !isOption(word)));
  const env = names.some(drivesBrowser) ? { E2E_URL: await service() } : {};
  const isJson = options.includes("--json");
  const figures: Record<string, unknown> = {};
  for (const name of names) {
    // Standard output belongs to the measures alone, so that --json can be piped on.
    console.error(`── ${name}`);
    const words = ["--import", "tsx", `${FOLDER}/${name}.ts`, ...options];
    const { code, text } = await run(process.execPath, words, { env, output: isJson ? "keep" : "show" });
    if (code !== 0) {
      process.exitCode = 1;
      if (isJson) console.error(text);
    }
    Object.assign(figures, printedBy(text));
  }
  if (isJson) console.log(JSON.stringify(figures));
} catch (error) {
  console.error(explain(error));
  process.exitCode = 1;
} finally {
  await tidyUp();
}
