import { readdirSync } from "node:fs";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  fillSignIn,
  launchBrowser,
  type Opened,
  openPage,
  picture,
  WORKSPACE,
} from "./harness";
import { expectChecked, idIn, PATIENT, problems, typeAtEnd } from "./sheet-steps";

const NAMES = readdirSync("examples")
  .filter((file) => file.endsWith(".swn"))
  .map((file) => file.slice(0, -4));
/** Kept to show points that have no solution. */
const WARNING = "reversed-input";

let browser: Browser;
let opened: Opened;
beforeAll(async () => {
  browser = await launchBrowser();
  opened = await openPage(browser);
});
afterAll(() => browser?.close());

const solved = (page: Page) => page.locator('[data-preview="whole"]').waitFor();
const whole = (page: Page) => page.locator('[data-whole="result"]');

/** The same words whether they come from the browser or stand here: thin spaces between figures and units are spaces. */
const plain = (text: string | null) => (text ?? "").replaceAll(/[\u202f\u00a0]/gu, " ");

test("the list has every example under what it is for, and leads to each", async () => {
  const { page, faults } = opened;
  await page.goto("/docs/examples");
  const links = page.locator('main a[href^="/docs/examples/"]');
  const names = await links.evaluateAll((all) =>
    all.map((one) => one.getAttribute("href")?.split("/").at(-1)),
  );
  expect(names.toSorted()).toEqual(NAMES.toSorted());
  for (const group of ["Converters", "Ratio meters", "Multipliers", "Dividers", "Roots", "Helpers"]) {
    await page.getByRole("heading", { name: group, exact: true }).waitFor();
  }
  await page.setViewportSize({ width: 360, height: 800 });
  await expectNoSidewaysScroll(page);
  await expectAccessible(page);
  await page.emulateMedia({ colorScheme: "dark" });
  await expectAccessible(page);
  await picture(page, "examples-360-dark");
  await page.emulateMedia({ colorScheme: "light" });
  await page.setViewportSize({ width: 1280, height: 800 });
  expect(faults).toEqual([]);
});

test("every example is solved in the page, is marked as a preview, and has no error", async () => {
  const { page, faults } = opened;
  for (const name of NAMES) {
    await page.goto(`/docs/examples/${name}`);
    await solved(page);
    const says = plain(await page.locator('[aria-labelledby] h2:has-text("Preview")').textContent());
    expect(`${name}: ${says}`).toMatch(
      /points at .*nominal · solved here in [\d.]+ ms, not stored$|points, nominal · /u,
    );
    expect(await page.locator("[data-drawn]").count()).toBeGreaterThan(0);
    expect(await page.getByText(/errors? to mend/u).count()).toBe(0);
  }
  expect(faults).toEqual([]);
}, 240_000);

test("the whole plan is solved in the page, its points proved and its requirements judged", async () => {
  const { page } = opened;
  await page.goto("/docs/examples/absorbance-head");
  await page.getByRole("button", { name: "Solve it here" }).click();
  await whole(page).waitFor();
  expect(plain(await whole(page).textContent())).toMatch(
    /^1 638 points solved here in .*, all proved, worst [\d.]+ .V; a preview, kept nowhere\. Everything that is required holds\.$/u,
  );
  await page.getByText("20 of 20 draws hold").first().waitFor();
  await page.goto(`/docs/examples/${WARNING}`);
  await page.getByRole("button", { name: "Solve it here" }).click();
  await whole(page).waitFor();
  expect(plain(await whole(page).textContent())).toMatch(
    /^51 points solved here in .*, 10 failed, all others proved/u,
  );
});

test("editing one moves its curve; a broken text says so and keeps the curve; the original comes back and goes again", async () => {
  const { page, faults } = opened;
  await page.goto("/docs/examples/diode-log-converter");
  await solved(page);
  const curve = page.locator("[data-drawn]").first();
  const before = await curve.screenshot();
  await page.getByText("model junction", { exact: false }).first().click();
  await typeAtEnd(page, "\nshow twice = 2 * out.v\n");
  await page.getByText("changed by you, kept in this browser alone").waitFor();
  await expect.poll(async () => (await curve.screenshot()).equals(before), PATIENT).toBe(false);

  await typeAtEnd(page, "let q = 10k\n");
  await problems(page).waitFor();
  await expectChecked(page, "1 error to mend");
  await page.getByText("of the text before its errors").waitFor();
  await page.locator('[data-preview="stale"]').waitFor();
  await expectAccessible(page);
  await picture(page, "example-broken");
  await page.getByRole("button", { name: "Change to 10 kΩ" }).click();
  await solved(page);

  await page.getByRole("button", { name: "Put back the original text" }).click();
  await page.getByText("as it was given").waitFor();
  await solved(page);
  await page.getByRole("button", { name: "Take your text again" }).click();
  await page.getByText("changed by you, kept in this browser alone").waitFor();
  expect(faults).toEqual([]);
});

test("the connections are drawn beside the text", async () => {
  const { page } = opened;
  await page.goto("/docs/examples/gain-cell");
  await page.getByRole("tab", { name: "Connections" }).click();
  await page.getByRole("region", { name: "Connections" }).locator("svg").first().waitFor();
  await expectAccessible(page);
});

test("a changed text outlives signing in and opens as a netlist of one's own", async () => {
  const { page, faults } = opened;
  await page.goto("/docs/examples/solar-cell");
  await page.getByRole("button", { name: "Edit the text" }).click();
  await typeAtEnd(page, "\nlet mine = 1 Ω\n");
  await page.getByText("changed by you, kept in this browser alone").waitFor();
  await page.getByRole("button", { name: "Open in my workspace" }).click();
  await page.waitForURL(/\/sign-in\?next=/u);
  await fillSignIn(page, "erik");
  await page.waitForURL("**/docs/examples/solar-cell");
  await page.getByText("changed by you, kept in this browser alone").waitFor();
  await page.getByRole("button", { name: "Open in my workspace" }).click();
  await page.waitForURL(new RegExp(`/${WORKSPACE}/netlists/[0-9a-f-]{36}$`, "u"));
  const made = await (await page.request.get(`/api/v1/netlists/${idIn(page)}`)).json();
  expect(made).toMatchObject({ title: "Solar cell", revision: 1 });
  expect(made.text).toContain("let mine = 1 Ω");
  expect(faults).toEqual([]);
});

test("a viewer is told who may open it", async () => {
  const { page } = await openPage(browser);
  await page.goto("/docs/examples/true-rms");
  await page.getByRole("button", { name: "Open in my workspace" }).click();
  await page.waitForURL(/\/sign-in\?next=/u);
  await fillSignIn(page, "vera");
  await page.waitForURL("**/docs/examples/true-rms");
  await page.getByRole("button", { name: "Open in my workspace" }).click();
  await page.getByRole("alert").filter({ hasText: "As viewer you read what others make." }).waitFor();
  await page.context().close();
});

test("an example is readable at every width, light and dark, and a name that is none is not found", async () => {
  const { page } = await openPage(browser, { viewport: { width: 360, height: 800 } });
  await page.goto("/docs/examples/one-quadrant-multiplier");
  await solved(page);
  await expectNoSidewaysScroll(page);
  await expectAccessible(page);
  await picture(page, "example-360");
  await page.emulateMedia({ colorScheme: "dark" });
  for (const width of [1024, 1920]) {
    await page.setViewportSize({ width, height: 1000 });
    await expectNoSidewaysScroll(page);
    await picture(page, `example-${width}-dark`);
  }
  await expectAccessible(page);
  expect((await page.goto("/docs/examples/no-such-thing"))?.status()).toBe(404);
  await page.context().close();
});
