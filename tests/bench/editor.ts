import type { Page } from "playwright-core";
import { layOutConnections } from "@/app/_components/drawing/layout";
import { Answering } from "@/app/_components/editor/answering";
import type { Question } from "@/app/_components/editor/questions";
import { connected, ladderText } from "../drawing/netlists";
import { launchBrowser, openPage, signIn } from "../e2e/harness";
import { editorOf, makeNetlist, openSheet } from "../e2e/sheet-steps";

/** Times that each is measured. */
const TIMES = 15;

/** 2,000 lines without an error. */
const LONG = `title "Bench, 2000 lines"\n${ladderText(1990)}sweep temperature from 10 °C to 40 °C, 4 points\nshow n1.v\nshow n2.v\n`;
const LARGE = `title "Bench, 300 elements"\n${ladderText(300)}n1 -- RX : resistor 1 kΩ -- ground\nshow n1.v\n`;

/**
 * Measures what the thread of the language needs for each question about a text of 2,000 lines that it has not seen, the layout of the
 * drawing, and in the browser the time from a key to the list of completions and from the tab to the drawing. Needs a running
 * service (E2E_URL), built for production. Prints ms; asserts nothing.
 */
async function measure(): Promise<void> {
  const figures: Record<string, number> = {};
  for (const question of ["complete", "tell", "folds", "outline", "connections", "format"] as const) {
    const offset = question === "complete" ? LONG.length - 5 : LONG.indexOf("R100 :");
    const taken = repeat((k) => {
      const asked = { ask: question, number: 1, text: `${LONG}# ${k}\n`, offset };
      new Answering().answer(asked as Question);
    });
    tell(`2000 lines: ${question}`, taken, figures);
  }
  const renaming = {
    ask: "rename",
    number: 1,
    text: LONG,
    offset: LONG.indexOf("R100 :"),
    name: "R_new",
  } as const;
  tell(
    "2000 lines: rename",
    repeat(() => new Answering().answer(renaming)),
    figures,
  );
  for (const elements of [300, 2000]) {
    const { rows } = connected(ladderText(elements));
    tell(
      `${elements} elements: layout`,
      repeat(() => layOutConnections(rows, new Set())),
      figures,
    );
  }

  const browser = await launchBrowser();
  try {
    const { page } = await openPage(browser);
    await signIn(page, "erik");
    await openSheet(page, await makeNetlist(page, LARGE));
    tell("300 elements: drawn", await drawings(page), figures);
    await openSheet(page, await makeNetlist(page, LONG));
    tell("2000 lines: key to completions", await completions(page), figures);
  } finally {
    await browser.close();
  }
  if (process.argv.includes("--json")) console.log(JSON.stringify(figures));
}

function repeat(act: (k: number) => unknown): number[] {
  return Array.from({ length: TIMES }, (_, k) => {
    const begun = performance.now();
    act(k);
    return performance.now() - begun;
  });
}

/** From the first layout to the drawing in the page, as the page itself tells it. */
async function drawings(page: Page): Promise<number[]> {
  const taken: number[] = [];
  for (let k = 0; k < TIMES; k++) {
    await page.getByRole("tab", { name: "Connections" }).click();
    const said = await page.getByText(/drawn in [\d.]+ ms/).textContent();
    taken.push(Number(/drawn in ([\d.]+) ms/.exec(said ?? "")![1]));
    await page.getByRole("tab", { name: "Preview" }).click();
  }
  return taken;
}

/** From Ctrl and the space bar to the list. */
async function completions(page: Page): Promise<number[]> {
  await (await editorOf(page)).focus();
  await page.keyboard.press("Control+End");
  const taken: number[] = [];
  for (let k = 0; k < TIMES; k++) {
    await page.keyboard.insertText(k === 0 ? "s" : "\ns");
    await page.waitForTimeout(600);
    await page.keyboard.press("Escape");
    const begun = await page.evaluate(() => performance.now());
    await page.keyboard.press("Control+Space");
    await page.locator(".suggest-widget.visible .monaco-list-row").first().waitFor();
    taken.push((await page.evaluate(() => performance.now())) - begun);
    await page.keyboard.press("Escape");
  }
  return taken;
}

function tell(name: string, taken: readonly number[], figures: Record<string, number>): void {
  const sorted = taken.toSorted((a, b) => a - b);
  const round = (value: number) => Math.round(10 * value) / 10;
  figures[`${name}, least ms`] = round(sorted[0]!);
  figures[`${name}, median ms`] = round(sorted[sorted.length >> 1]!);
  if (process.argv.includes("--json")) return;
  console.log(`${name}: least ${round(sorted[0]!)} ms, median ${round(sorted[sorted.length >> 1]!)} ms`);
}

await measure();
