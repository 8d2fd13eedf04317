import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  openPage,
  signIn,
  WORKSPACE,
} from "./harness";
import { findAndTake, lookFor } from "./key-steps";
import { DRAWN, queue } from "./run-steps";
import { converterText, editorOf, openSheet, PATIENT } from "./sheet-steps";
import { shownText } from "./text-steps";

/** Another one each time, so that what was made before is not found beside it. */
const NAME = `Found by ${Date.now().toString(36)}`;

let browser: Browser;
let page: Page;
let faults: string[];
/** A netlist of two traces, and a run of it. */
let made: { readonly id: string; readonly address: string };

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page, faults } = await openPage(browser));
  await signIn(page, "erik");
  made = await queue(page, `${converterText(NAME)}show into = D1.i\n`);
});
afterAll(() => browser?.close());

const found = () => page.getByRole("dialog", { name: "Find or do" });
const rows = () => found().getByRole("option");

test("Ctrl K opens it from inside the text too, writes nothing there, and gives the focus back", async () => {
  await openSheet(page, made.id);
  const text = await editorOf(page);
  await text.focus();
  const before = await shownText(page);
  await lookFor(page, "history");
  expect(await rows().first().textContent()).toBe("History");
  await page.keyboard.press("Escape");
  await found().waitFor({ state: "hidden" });
  await expect.poll(() => text.evaluate((one) => one === document.activeElement), PATIENT).toBe(true);
  expect(await shownText(page)).toBe(before);
  // The editor has no second half of a chord in wait.
  await page.keyboard.press("Control+k");
  await found().waitFor();
  await page.keyboard.press("Control+k");
  await found().waitFor({ state: "hidden" });
});

test("what the page in hand offers comes first and is done at once; netlists and runs come from the service", async () => {
  await page.goto(made.address);
  await page.locator(DRAWN).first().waitFor();
  await findAndTake(page, "hide into");
  await page.waitForURL(/trace=v_log/);
  await findAndTake(page, "draw all");
  await expect.poll(() => page.url(), PATIENT).not.toContain("trace=");
  await findAndTake(page, "table of numbers");
  await page.waitForURL(/tab=numbers/);

  await lookFor(page, NAME.toLowerCase());
  const groups = await found()
    .getByRole("group")
    .evaluateAll((all) => all.map((one) => one.ariaLabel));
  expect(groups).toEqual(["Netlists", "Runs"]);
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  await page.waitForURL(`**${made.address}`);
});

test("the theme is chosen by its words", async () => {
  const paper = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
  await findAndTake(page, "dark theme");
  expect(await paper()).toBe("rgb(16, 22, 29)");
  await findAndTake(page, "theme as the system");
  expect(await paper()).toBe("rgb(251, 250, 246)");
});

test("it says that it is looking, that nothing is called so, and that the service failed, which can be asked again", async () => {
  await page.goto(`/${WORKSPACE}`);
  // A page that asks for news has its scripts.
  await page.waitForResponse((response) => response.url().includes("/api/v1/news"));
  // An answer that comes late, to a question that is given up by then.
  const late = "**/api/v1/netlists?*query=slow*";
  let release: () => void = () => {};
  const held = new Promise<void>((resolve) => {
    release = resolve;
  });
  await page.route(late, async (route) => {
    await held;
    await route.fulfill({ json: { rows: [], total: 0 } }).catch(() => undefined);
  });
  await page.evaluate(() => {
    const usual = window.fetch;
    window.fetch = (to, how) => {
      const giveUp = () => document.body.setAttribute("data-given-up", String(to));
      if (String(to).includes("query=slow")) how?.signal?.addEventListener("abort", giveUp);
      return usual(to, how);
    };
  });
  await page.keyboard.press("Control+k");
  const asked = page.waitForRequest((request) => request.url().includes("query=slow"));
  await page.keyboard.type("slow");
  await asked;
  await found().getByText("Looking for netlists and runs…").waitFor();
  await page.keyboard.press("Control+a");
  await page.keyboard.type("zzqx nothing");
  await page.locator("body[data-given-up]").waitFor({ state: "attached" });
  release();
  await found().getByText("Nothing is called so.").waitFor();
  expect(await rows().count()).toBe(0);
  await page.unroute(late);

  const broken = "**/api/v1/runs?*query=ratio*";
  await page.route(broken, (route) =>
    route.fulfill({ status: 503, json: { detail: "The database is away." } }),
  );
  await page.keyboard.press("Control+a");
  await page.keyboard.type("ratio");
  await found().getByText("Netlists and runs could not be looked up. The database is away.").waitFor();
  await page.unroute(broken);
  await found().getByRole("button", { name: "Try again" }).click();
  await found()
    .getByText(/^\d+ found$/)
    .waitFor();
  expect(await rows().count()).toBeGreaterThan(1);
  await page.keyboard.press("Escape");
  faults.length = 0;
});

test("a question mark opens the list of keys, but not where it is typed", async () => {
  await page.goto(`/${WORKSPACE}/netlists`);
  await page.getByRole("searchbox", { name: "Search netlists" }).focus();
  await page.keyboard.type("?");
  expect(await page.getByRole("dialog").count()).toBe(0);
  await page.keyboard.press("Escape");
  await page.getByRole("heading", { name: "Netlists", exact: true }).click();
  await page.keyboard.press("?");
  const keys = page.getByRole("dialog", { name: "Keys" });
  await keys.getByText("Find or do something").waitFor();
  await expectAccessible(page);
  // Who dictates would set it off by speaking: it can be switched off, and the list is found by its words then.
  const alone = keys.getByRole("checkbox", { name: /question mark alone/ });
  await alone.uncheck();
  await page.keyboard.press("Escape");
  await keys.waitFor({ state: "hidden" });
  await page.keyboard.press("?");
  await findAndTake(page, "list of keys");
  await alone.check();
  await page.keyboard.press("Escape");
  await keys.waitFor({ state: "hidden" });
});

test("it is accessible and fits its window, light and dark, on a phone and on a wide screen", async () => {
  for (const width of [360, 1024, 1920]) {
    for (const colorScheme of ["light", "dark"] as const) {
      await page.setViewportSize({ width, height: 800 });
      await page.emulateMedia({ colorScheme });
      await page.goto(made.address);
      await page.locator(DRAWN).first().waitFor();
      await page.getByRole("button", { name: /^Find/ }).click();
      await found().locator("[data-find=settled]").waitFor();
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
    }
  }
  expect(faults).toEqual([]);
});
