import type { Page } from "playwright-core";
import { expect } from "vitest";
import { PATIENT } from "./sheet-steps";

/** What stands in the editor; only what is in its window. */
export async function shownText(page: Page): Promise<string> {
  const lines = await page.locator(".view-line").evaluateAll((all) =>
    all
      .map((line) => ({ top: line.getBoundingClientRect().top, text: line.textContent ?? "" }))
      .sort((a, b) => a.top - b.top)
      .map(({ text }) => text),
  );
  return lines.join("\n").replaceAll("\u00a0", " ");
}

export async function expectText(page: Page, part: string): Promise<void> {
  await expect.poll(() => shownText(page), PATIENT).toContain(part);
}

/** The middle of the nth place (from 0) at which a word stands in the editor's window, in pixels of the page. */
export async function pointOf(page: Page, word: string, nth = 0): Promise<{ x: number; y: number }> {
  const point = await page.evaluate(
    ({ wanted, count }) => {
      const found: DOMRect[] = [];
      for (const line of document.querySelectorAll(".view-line")) {
        const walker = document.createTreeWalker(line, NodeFilter.SHOW_TEXT);
        while (walker.nextNode()) {
          const node = walker.currentNode as Text;
          const text = node.data.replaceAll("\u00a0", " ");
          for (let at = text.indexOf(wanted); at !== -1; at = text.indexOf(wanted, at + 1)) {
            const range = document.createRange();
            range.setStart(node, at);
            range.setEnd(node, at + wanted.length);
            found.push(range.getBoundingClientRect());
          }
        }
      }
      const rect = found.sort((a, b) => a.top - b.top || a.left - b.left)[count];
      return rect === undefined ? null : { x: rect.x + rect.width / 2, y: rect.y + rect.height / 2 };
    },
    { wanted: word, count: nth },
  );
  if (point === null) throw new Error(`"${word}" does not stand in the editor ${nth + 1} times.`);
  return point;
}

/** Puts the cursor into a word by a press of the mouse. */
export async function pressWord(page: Page, word: string, nth = 0): Promise<void> {
  const { x, y } = await pointOf(page, word, nth);
  await page.mouse.click(x, y);
}

/** Waits until the cursor is in a line. */
export async function expectCursorIn(page: Page, line: number): Promise<void> {
  const active = page.locator(".line-numbers.active-line-number");
  await expect.poll(() => active.first().textContent(), PATIENT).toBe(String(line));
}
