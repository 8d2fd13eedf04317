import type { Page } from "playwright-core";
import { launchBrowser, openPage, signIn, WORKSPACE } from "../e2e/harness";

/** How often it is measured. */
const TIMES = 20;
const NETLIST = "One-quadrant multiplier";

declare global {
  interface Window {
    /** Moments, ms: when "Queue run" was pressed, and when a frame with a curve had been shown. */
    firstCurve?: { asked: number; shown: number };
  }
}

/**
 * Measures, in the browser, from the press of "Queue run" on a sheet to the frame that shows the first curve of that run: the request,
 * the queue, the solving, the page and the drawing. Needs a running service (E2E_URL). Prints milliseconds; asserts nothing.
 */
async function measure(): Promise<void> {
  const browser = await launchBrowser();
  try {
    const { page } = await openPage(browser);
    await signIn(page, "erik");
    await page.addInitScript(watch);
    const sheet = await sheetOf(page);
    const taken: number[] = [];
    for (let i = 0; i < TIMES; i++) taken.push(await once(page, sheet));
    const sorted = taken.toSorted((a, b) => a - b);
    const median = (sorted[TIMES / 2 - 1]! + sorted[TIMES / 2]!) / 2;
    if (process.argv.includes("--json")) {
      console.log(JSON.stringify({ firstCurveMedianMs: median, firstCurveWorstMs: sorted.at(-1)! }));
      return;
    }
    console.log(`From queueing to the first curve, ${TIMES} times, ms: ${taken.map(Math.round).join(" ")}`);
    console.log(`median ${Math.round(median)} ms, worst ${Math.round(sorted.at(-1)!)} ms`);
  } finally {
    await browser.close();
  }
}

/** Runs in the page before its own scripts. */
function watch(): void {
  addEventListener(
    "click",
    ({ target }) => {
      const button = target instanceof Element ? target.closest("button") : null;
      if (button?.textContent?.startsWith("Queue run"))
        window.firstCurve = { asked: performance.now(), shown: 0 };
    },
    true,
  );
  new MutationObserver(() => {
    const state = window.firstCurve;
    if (state === undefined || state.shown > 0) return;
    if (document.querySelector('[data-drawn]:not([data-drawn="0"])') === null) return;
    // The second frame begins once the first, which shows the curve, has been handed over.
    requestAnimationFrame(() => requestAnimationFrame(() => (state.shown ||= performance.now())));
  }).observe(document, { subtree: true, childList: true, attributeFilter: ["data-drawn"] });
}

async function sheetOf(page: Page): Promise<string> {
  const search = new URLSearchParams({ workspace: WORKSPACE, query: NETLIST, page: "1", size: "1" });
  const { rows } = await (await page.request.get(`/api/v1/netlists?${search}`)).json();
  return `/${WORKSPACE}/netlists/${rows[0].id}`;
}

async function once(page: Page, sheet: string): Promise<number> {
  await page.goto(sheet);
  const queue = page.getByRole("button", { name: "Queue run" });
  await page.locator(".view-line").first().waitFor();
  await page.waitForLoadState("networkidle");
  await queue.click();
  await page.waitForFunction(() => (window.firstCurve?.shown ?? 0) > 0);
  return page.evaluate(() => window.firstCurve!.shown - window.firstCurve!.asked);
}

await measure();
