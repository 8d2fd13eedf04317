import type { Page } from "playwright-core";
import { launchBrowser, openPage, signIn, WORKSPACE } from "../e2e/harness";

const POINTS = 100_000;
const TRACES = 20;
/** How often the page is opened, and how many moves the view is dragged by. */
const OPENINGS = 10;
const MOVES = 100;

/** A log converter with many traces of its output; invented. */
const TEXT = `title "Plot bench: ${TRACES} traces of ${POINTS} points (invented)"
knob I_in = 1 µA
model junction : diode { Is = 2 fA, Rs = 2 Ω }
model amp : opamp { gain = 1e6, bias = 20 pA }
sum -- IS : current I_in -- ground
out -- D1 : junction -- sum
A1 : amp { plus = ground, minus = sum, out = out }
out -- RL : resistor 10 kΩ -- ground
sweep I_in from 1 nA to 1 mA, ${POINTS} points
${Array.from({ length: TRACES }, (_, i) => `show t${i + 1} = ${(1 + i / 10).toFixed(1)} * out.v`).join("\n")}
`;

/** What a frame took, and when the first with a curve was shown; ms. */
declare global {
  interface Window {
    plotBench?: { shown: number; frames: number[]; watching: boolean };
  }
}

/** Runs in the page before its own scripts: the moment a curve stands, and the time between frames while it is asked to. */
function watch(): void {
  const state = { shown: 0, frames: [] as number[], watching: false };
  window.plotBench = state;
  new MutationObserver(() => {
    if (state.shown > 0 || document.querySelector('[data-drawn]:not([data-drawn="0"])') === null) return;
    requestAnimationFrame(() => requestAnimationFrame(() => (state.shown ||= performance.now())));
  }).observe(document, { subtree: true, childList: true, attributeFilter: ["data-drawn"] });
  let before = 0;
  // A method, since a bundler gives names to functions by a helper that the page does not have.
  const clock = {
    tick(now: number) {
      if (state.watching && before > 0) state.frames.push(now - before);
      before = state.watching ? now : 0;
      requestAnimationFrame(clock.tick);
    },
  };
  requestAnimationFrame(clock.tick);
}

async function post<T>(page: Page, url: string, body: unknown): Promise<T> {
  const answer = await page.request.post(url, {
    data: body,
    headers: { origin: new URL(page.url()).origin },
  });
  if (!answer.ok()) throw new Error(await answer.text());
  return answer.json();
}

/** Address of a finished and judged run of the text; an earlier bench may have left one. */
async function finishedRun(page: Page): Promise<string> {
  const search = new URLSearchParams({
    workspace: WORKSPACE,
    query: "Plot bench",
    status: "done",
    page: "1",
    size: "1",
  });
  const { rows } = await (await page.request.get(`/api/v1/runs?${search}`)).json();
  if (rows[0]?.points === POINTS) {
    const path = `/${WORKSPACE}/runs/${rows[0].id}`;
    if ((await page.request.get(`${path}/overview`)).ok()) return path;
  }
  const { id } = await post<{ id: string }>(page, "/api/v1/netlists", { workspace: WORKSPACE, text: TEXT });
  const run = await post<{ id: string }>(page, "/api/v1/runs", { netlistId: id, base: 1 });
  for (;;) {
    const summary = await (await page.request.get(`/api/v1/runs/${run.id}/summary`)).json();
    const { status, judgement } = summary;
    if (status === "done" && judgement !== null) return `/${WORKSPACE}/runs/${run.id}`;
    if (status === "failed") throw new Error("The run failed.");
    await page.waitForTimeout(500);
  }
}

interface Opening {
  readonly shown: number;
  /** Until every point is at hand, to be read and looked at closely. */
  readonly whole: number;
}

/** Milliseconds from asking for the page to the frame that shows its curves. */
async function open(page: Page, path: string): Promise<Opening> {
  await page.goto(path, { waitUntil: "commit" });
  await page.waitForFunction(() => (window.plotBench?.shown ?? 0) > 0);
  const whole = await page.waitForFunction(() => {
    const words = document.querySelector("figcaption")?.textContent ?? "Fetching";
    return !words.startsWith("Fetching") && performance.now();
  });
  return {
    shown: await page.evaluate(() => window.plotBench!.shown),
    whole: Number(await whole.jsonValue()),
  };
}

/** The times between frames while the ruler is dragged to and fro; ms. */
async function pan(page: Page): Promise<number[]> {
  for (let i = 0; i < 2; i++) await page.getByRole("button", { name: "Closer" }).click();
  await page.waitForTimeout(800);
  const ruler = page.locator("[data-ruler]");
  await ruler.scrollIntoViewIfNeeded();
  const box = (await ruler.boundingBox())!;
  const before = await ruler.innerHTML();
  const at = { x: box.x + box.width / 2, y: box.y + 20 };
  await page.mouse.move(at.x, at.y);
  await page.mouse.down();
  await page.evaluate(() => {
    window.plotBench!.watching = true;
  });
  for (let move = 1; move <= MOVES; move++) {
    await page.mouse.move(at.x + 120 * Math.sin(move / 8), at.y);
    // A move a frame, as a hand makes them.
    await page.evaluate(() => new Promise((resolve) => requestAnimationFrame(resolve)));
  }
  const frames = await page.evaluate(() => {
    window.plotBench!.watching = false;
    return window.plotBench!.frames;
  });
  if ((await ruler.innerHTML()) === before) throw new Error("The view did not move with the ruler.");
  await page.mouse.up();
  return frames;
}

function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)]!;
}

/**
 * Measures, in the browser, how long the page of a run of 20 traces of 100,000 points takes to open, and how long frames take while
 * its view is dragged along the ruler. Needs a running service (E2E_URL). Prints milliseconds; asserts nothing.
 */
async function measure(): Promise<void> {
  const browser = await launchBrowser();
  try {
    const { page } = await openPage(browser);
    await signIn(page, "erik");
    const path = await finishedRun(page);
    await page.addInitScript(watch);
    await open(page, path);
    const opened: Opening[] = [];
    for (let i = 0; i < OPENINGS; i++) opened.push(await open(page, path));
    const openings = opened.map(({ shown }) => shown);
    const frames = await pan(page);
    const figures = {
      openMedianMs: median(openings),
      openLeastMs: Math.min(...openings),
      wholeMedianMs: median(opened.map(({ whole }) => whole)),
      frameMedianMs: median(frames),
      framesOver33: frames.filter((ms) => ms > 33.4).length,
      frames: frames.length,
    };
    if (process.argv.includes("--json")) {
      console.log(JSON.stringify(figures));
      return;
    }
    console.log(`Opening ${TRACES} traces of ${POINTS} points, ms: ${openings.map(Math.round).join(" ")}`);
    console.log(
      `median ${Math.round(figures.openMedianMs)} ms (aim 500), least ${Math.round(figures.openLeastMs)} ms; every point at hand after ${Math.round(figures.wholeMedianMs)} ms`,
    );
    console.log(
      `Panning: median frame ${figures.frameMedianMs.toFixed(1)} ms (aim 33), ${figures.framesOver33} of ${figures.frames} frames over 33 ms`,
    );
  } finally {
    await browser.close();
  }
}

await measure();
