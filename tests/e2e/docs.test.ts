import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  LOOKS,
  launchBrowser,
  look,
  type Opened,
  openPage,
  openPageAs,
  picture,
} from "./harness";

/** The pages of this file; the examples and the tour have files of their own. */
const PAGES = [
  { path: "/docs", heading: "Reference", anchor: null },
  { path: "/docs/language", heading: "Language", anchor: "statement.draws" },
  { path: "/docs/models", heading: "Models", anchor: "npn.beta_f" },
  { path: "/docs/readings", heading: "Readings", anchor: "reading.decades_where" },
  { path: "/docs/diagnostics", heading: "Diagnostics", anchor: "UNI2" },
  { path: "/docs/pipeline", heading: "Command line", anchor: "option.run.junit" },
  { path: "/docs/api", heading: "API", anchor: "GET.runs.id.columns" },
] as const;

/** Thousands of small pieces: netlists, judged where the start page sets one by the same part; formulas; live examples, which have a file. */
const MANY = ["pre", "math", "[data-live-example]"];

let browser: Browser;
let opened: Opened;
beforeAll(async () => {
  browser = await launchBrowser();
  opened = await openPage(browser);
});
afterAll(() => browser?.close());

/** How far below the top of the window something stands, px. */
function topOf(page: Page, id: string): Promise<number> {
  return page.evaluate((name) => document.getElementById(name)!.getBoundingClientRect().top, id);
}

test.each(PAGES)(
  "$path is open to everyone, in light and dark, from a telephone to a wide window",
  async ({ path, heading }) => {
    const { page, faults } = opened;
    faults.length = 0;
    await page.goto(path);
    expect(await page.getByRole("heading", { level: 1 }).textContent()).toBe(heading);
    for (const one of LOOKS) {
      await look(page, one);
      await expectNoSidewaysScroll(page);
      if (one.width > 360) await expectAccessible(page, MANY);
      const name = `docs${path.slice("/docs".length).replace("/", "-")}-${one.colorScheme}-${one.width}`;
      await picture(page, name, false);
    }
    expect(faults).toEqual([]);
  },
);

test.each(PAGES.filter(({ anchor }) => anchor !== null))(
  "$path#$anchor leads to its place",
  async ({ path, anchor }) => {
    const { page } = opened;
    await look(page, LOOKS[0]);
    await page.goto(`${path}#${anchor}`);
    await expect.poll(() => topOf(page, anchor!)).toBeLessThan(300);
    expect(await topOf(page, anchor!)).toBeGreaterThanOrEqual(0);
    const outline = page.getByRole("navigation", { name: "On this page" });
    const last = outline.getByRole("link").last();
    const target = (await last.getAttribute("href"))!;
    await last.click();
    expect(decodeURIComponent(new URL(page.url()).hash)).toBe(target);
  },
);

test("the pages lead to each other, and say which is open", async () => {
  const { page } = opened;
  await look(page, LOOKS[0]);
  await page.goto("/");
  await page.getByRole("link", { name: "Reference" }).click();
  await page.waitForURL("**/docs");
  const pages = page.getByRole("navigation", { name: "Reference" });
  await pages.getByRole("link", { name: "Models", exact: true }).click();
  await page.waitForURL("**/docs/models");
  const here = pages.locator('[aria-current="page"]:visible');
  await expect.poll(() => here.textContent()).toBe("Models");
  await page.goto("/docs/language");
  await page.getByRole("link", { name: "NAM9", exact: true }).first().click();
  await page.waitForURL("**/docs/diagnostics#NAM9");
});

test("a filter leaves what has its words, and gives all of it back", async () => {
  const { page } = opened;
  await page.goto("/docs/diagnostics");
  const field = page.getByLabel("Filter");
  await field.fill("tolerance");
  await page.getByText(/^\d+ shown$/).waitFor();
  expect(await page.locator("#UNI10").isVisible()).toBe(true);
  expect(await page.locator("#TXT1").isVisible()).toBe(false);
  expect(await page.locator("#CAP").isVisible()).toBe(false);
  await field.fill("no such words");
  await page.getByText("Nothing here has these words.").waitFor();
  await field.fill("");
  expect(await page.locator("#TXT1").isVisible()).toBe(true);
});

test("an example of the language is solved where it stands", async () => {
  const { page } = opened;
  await page.goto("/docs/language#statement.sweep");
  const example = page.locator("[data-live-example]").first();
  await example.scrollIntoViewIfNeeded();
  await example
    .getByText(/59\.\d+|m?V/)
    .first()
    .waitFor();
  await example.locator("canvas, svg").first().waitFor();
});

test("an example to read becomes a live one in its place when asked", async () => {
  const { page } = opened;
  await page.goto("/docs/readings#reading.highest");
  await page.getByRole("button", { name: "Try it here: Reading: highest" }).press("Enter");
  const example = page.getByRole("region", { name: "Reading: highest" });
  await example.locator("canvas, svg").first().waitFor();
  await example.getByRole("button", { name: "Edit the text" }).waitFor();
  expect(
    await page.evaluate(() => document.activeElement?.querySelector("[data-live-example]") !== null),
  ).toBe(true);
});

test("somebody at work finds the reference at the top of each page", async () => {
  const { page } = await openPageAs(browser, "erik");
  await page.getByRole("link", { name: "Reference" }).click();
  await page.waitForURL("**/docs");
  await page.getByRole("link", { name: "Open your workspace" }).waitFor();
  // The way to the work has fewer words where there is little room for it.
  await look(page, { colorScheme: "light", width: 360 });
  for (const path of ["/", "/docs"]) {
    await page.goto(path);
    await page.getByRole("link", { name: "Workspace", exact: true }).waitFor();
    await expectNoSidewaysScroll(page);
  }
});
