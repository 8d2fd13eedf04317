import type { Page } from "playwright-core";
import { launchBrowser, openPage, signIn, WORKSPACE } from "../e2e/harness";

/** What is counted apart. */
const SORTS = { Document: "HTML", Script: "JavaScript", Stylesheet: "CSS", Font: "fonts" } as const;
type Sort = (typeof SORTS)[keyof typeof SORTS] | "data";
type Weights = Record<Sort, number>;

const NOTHING: Weights = { HTML: 0, JavaScript: 0, CSS: 0, fonts: 0, data: 0 };
/** Ms of silence after which a page has fetched what it does. */
const SILENCE = 1500;

/**
 * Counts what each page fetches on a first visit, compressed as it comes over the wire: until it stands, and for the sheet what follows when
 * somebody begins to write. Needs a running service (E2E_URL), built for production. Prints KiB; asserts nothing.
 */
async function measure(): Promise<void> {
  const browser = await launchBrowser();
  const figures: Record<string, number> = {};
  try {
    const { page } = await openPage(browser);
    const count = await counter(page);
    await visit(page, "landing", "/", count, figures);
    await visit(page, "sign in", "/sign-in", count, figures);
    await visit(page, "docs", "/docs", count, figures);
    await signIn(page, "erik");
    const search = new URLSearchParams({ workspace: WORKSPACE, status: "done", page: "1", size: "20" });
    const { rows } = await (await page.request.get(`/api/v1/runs?${search}`)).json();
    const run = rows.find(({ title }: { title: string }) => !/bench/i.test(title)) ?? rows[0];
    const [netlists, runs] = [`/${WORKSPACE}/netlists`, `/${WORKSPACE}/runs`];
    await visit(page, "home", `/${WORKSPACE}`, count, figures);
    await visit(page, "netlists", netlists, count, figures);
    await visit(page, "runs", runs, count, figures);
    await visit(page, "run", `${runs}/${run.id}`, count, figures);
    await visit(page, "report of a run", `${runs}/${run.id}/report`, count, figures);
    await visit(page, "revisions", `${netlists}/${run.netlistId}/revisions`, count, figures);
    // A page of its own, as by a link in a letter: who has pressed something before counts as somebody who is about to write.
    const reader = await page.context().newPage();
    const counted = await counter(reader);
    await visit(reader, "sheet, to read", `${netlists}/${run.netlistId}`, counted, figures);
    await reader.mouse.move(300, 400);
    await reader.getByRole("textbox", { name: "Netlist text" }).waitFor();
    await counted.silence();
    tell("sheet, to write", counted.take(), figures);
  } finally {
    await browser.close();
  }
  if (process.argv.includes("--json")) console.log(JSON.stringify(figures));
}

/** Adds up the bytes that came since it was last asked; `silence` resolves when nothing has come for a while. */
async function counter(page: Page) {
  const session = await page.context().newCDPSession(page);
  await session.send("Network.enable");
  await session.send("Network.setCacheDisabled", { cacheDisabled: true });
  const sorts = new Map<string, Sort>();
  let weights = { ...NOTHING };
  let heard = Date.now();
  session.on("Network.responseReceived", ({ requestId, type }) => {
    heard = Date.now();
    sorts.set(requestId, SORTS[type as keyof typeof SORTS] ?? "data");
  });
  session.on("Network.loadingFinished", ({ requestId, encodedDataLength }) => {
    heard = Date.now();
    weights[sorts.get(requestId) ?? "data"] += encodedDataLength;
  });
  return {
    take: (): Weights => {
      const taken = weights;
      weights = { ...NOTHING };
      return taken;
    },
    silence: async (): Promise<void> => {
      while (Date.now() - heard < SILENCE) await new Promise((resolve) => setTimeout(resolve, 100));
    },
  };
}

async function visit(
  page: Page,
  name: string,
  path: string,
  count: Awaited<ReturnType<typeof counter>>,
  figures: Record<string, number>,
): Promise<void> {
  // What the page before has begun to fetch is none of this one.
  await page.goto("about:blank");
  count.take();
  const answer = await page.goto(path);
  if (answer?.ok() !== true) return;
  await count.silence();
  tell(name, count.take(), figures);
}

function tell(name: string, weights: Weights, figures: Record<string, number>): void {
  const kibibytes = (bytes: number) => Math.round(bytes / 102.4) / 10;
  const all = Object.values(weights).reduce((sum, one) => sum + one, 0);
  figures[`${name}, KiB`] = kibibytes(all);
  if (process.argv.includes("--json")) return;
  const parts = Object.entries(weights).map(([sort, bytes]) => `${sort} ${kibibytes(bytes)}`);
  console.log(`${name}: ${kibibytes(all)} KiB, of which ${parts.join(", ")}`);
}

await measure();
