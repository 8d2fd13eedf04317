import { spawn } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { chromium, type Page } from "playwright-core";
import { BROWSER, baseUrl, FLAGS, signIn, WORKSPACE } from "../e2e/harness";

/** The program that looks at the pages; fetched by npx and kept in its cache, since it is larger than all that the project needs. */
const PROGRAM = "lighthouse@12.8.2";
/** What each page should come to, of 100. */
const AIMS = { performance: 90, accessibility: 95, "best-practices": 95 } as const;
type Category = keyof typeof AIMS;

interface Audit {
  readonly title: string;
  readonly score: number | null;
  readonly scoreDisplayMode: string;
  readonly displayValue?: string;
}

interface Report {
  readonly categories: Readonly<
    Record<Category, { score: number | null; auditRefs: readonly { id: string; weight: number }[] }>
  >;
  readonly audits: Readonly<Record<string, Audit>>;
}

/**
 * Looks at the landing page, and at home, a sheet and a run as somebody who is signed in, with Lighthouse as it stands: a phone, slowed
 * down. `--desktop` looks as a desk does. Needs a running service (E2E_URL), built for production. Prints scores; asserts nothing.
 */
async function measure(): Promise<void> {
  const folder = mkdtempSync(join(tmpdir(), "sweepwright-lighthouse-"));
  const port = await freePort();
  const browser = await chromium.launchPersistentContext(join(folder, "profile"), {
    executablePath: BROWSER,
    args: [...FLAGS, `--remote-debugging-port=${port}`],
    baseURL: baseUrl(),
  });
  const figures: Record<string, number> = {};
  try {
    const page = browser.pages()[0] ?? (await browser.newPage());
    await look("landing", "/", { port, folder }, figures);
    await signIn(page, "erik");
    const pages = await signedInPages(page);
    await page.goto("about:blank");
    for (const [name, path] of pages) await look(name, path, { port, folder }, figures);
  } finally {
    await browser.close();
    rmSync(folder, { recursive: true, force: true });
  }
  if (process.argv.includes("--json")) console.log(JSON.stringify(figures));
}

/** Home, and the sheet and the run of a finished run of the demo. */
async function signedInPages(page: Page): Promise<readonly (readonly [string, string])[]> {
  const search = new URLSearchParams({ workspace: WORKSPACE, status: "done", page: "1", size: "20" });
  const { rows } = await (await page.request.get(`/api/v1/runs?${search}`)).json();
  const run = rows.find((one: { title: string }) => !/bench/i.test(one.title));
  if (run === undefined) throw new Error("The demo has no finished run yet.");
  return [
    ["home", `/${WORKSPACE}`],
    ["sheet", `/${WORKSPACE}/netlists/${run.netlistId}`],
    ["run", `/${WORKSPACE}/runs/${run.id}`],
  ];
}

async function look(
  name: string,
  path: string,
  { port, folder }: { readonly port: number; readonly folder: string },
  figures: Record<string, number>,
): Promise<void> {
  const output = join(folder, `${name}.json`);
  await run("npx", [
    "--yes",
    PROGRAM,
    new URL(path, baseUrl()).href,
    `--port=${port}`,
    "--disable-storage-reset",
    "--quiet",
    "--output=json",
    `--output-path=${output}`,
    `--only-categories=${Object.keys(AIMS).join(",")}`,
    ...(process.argv.includes("--desktop") ? ["--preset=desktop"] : []),
  ]);
  const { categories, audits }: Report = JSON.parse(readFileSync(output, "utf8"));
  const isJson = process.argv.includes("--json");
  const scores = Object.entries(AIMS).map(([category, aim]) => {
    const score = Math.round(100 * (categories[category as Category].score ?? 0));
    figures[`lighthouse ${name}, ${category}`] = score;
    return `${category} ${score} (aim ${aim})`;
  });
  if (isJson) return;
  console.log(`${name}: ${scores.join(", ")}`);
  for (const [category, aim] of Object.entries(AIMS)) {
    const { score, auditRefs } = categories[category as Category];
    if (100 * (score ?? 0) >= aim && !process.argv.includes("--all")) continue;
    for (const { id, weight } of auditRefs) {
      const { title, score: one, displayValue = "" } = audits[id]!;
      if (one !== null && one < 0.9 && weight > 0) console.log(`  ${category}: ${title} ${displayValue}`);
    }
  }
}

function run(program: string, words: readonly string[]): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(program, words, { stdio: ["ignore", "ignore", "pipe"] });
    let said = "";
    child.stderr.on("data", (data) => {
      said += data;
    });
    child.on("error", reject);
    child.on("exit", (code) =>
      code === 0 ? resolve() : reject(new Error(`${program} ended with ${code}.\n${said}`)),
    );
  });
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.on("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const address = server.address();
      server.close(() => resolve(typeof address === "object" && address !== null ? address.port : 0));
    });
  });
}

await measure();
