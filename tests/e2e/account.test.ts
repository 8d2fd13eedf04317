import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  openPage,
  signIn,
  signInAfresh,
  WORKSPACE,
} from "./harness";

const PASSWORD = process.env.SWEEPWRIGHT_DEMO_PASSWORD || "log-ratio-bench-7";
const PHONE = { width: 360, height: 740 };

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

describe("signing in", () => {
  it("sends a stranger to the form and then to the page that was asked for", async () => {
    const { page } = await openPage(browser);
    await page.goto(`/${WORKSPACE}/netlists?query=ratio`);
    await page.waitForURL("**/sign-in?**");
    await page.getByLabel("E-mail").fill("vera.viewer@northbench.example");
    await page.getByLabel("Password").fill(PASSWORD);
    await page.getByLabel("Password").press("Enter");
    await page.waitForURL(`**/${WORKSPACE}/netlists?query=ratio`);
    await page.getByRole("link", { name: "Log ratio head" }).first().waitFor();
    await page.context().close();
  });

  it("refuses a wrong password in words that do not tell which of the two was wrong, and keeps the address", async () => {
    const { page } = await openPage(browser);
    await page.goto("/sign-in");
    // An account of its own, since a refused attempt counts against the account.
    await page.getByLabel("E-mail").fill("nobody@northbench.example");
    await page.getByLabel("Password").fill("not-the-password");
    await page.getByRole("button", { name: "Sign in" }).click();
    await page.getByText("do not belong together").waitFor();
    expect(await page.getByLabel("E-mail").inputValue()).toBe("nobody@northbench.example");
    await page.context().close();
  });

  it("ends the session for good by signing out", async () => {
    const { page } = await openPage(browser);
    await signInAfresh(page, "rosa");
    const cookies = await page.context().cookies();
    await page.getByRole("button", { name: "Account of Rosa Reviewer" }).click();
    await page.getByText("reviewer in this workspace").waitFor();
    await page.getByRole("menuitem", { name: "Sign out" }).click();
    await page.waitForURL("**/sign-in**");
    await page.context().addCookies(cookies);
    await page.goto(`/${WORKSPACE}`);
    await page.waitForURL("**/sign-in?**");
    await page.context().close();
  });

  it("says that there is no such page for another workspace, whether it exists or not", async () => {
    const { page } = await openPage(browser);
    await signIn(page, "adam");
    const answer = await page.goto("/some-other-bench/netlists");
    expect(answer?.status()).toBe(404);
    await page.getByText("Nothing stands at this address").waitFor();
    await page.context().close();
  });
});

describe("the front page, the form and the home", () => {
  for (const colorScheme of ["light", "dark"] as const) {
    it(`pass axe and fit a phone, ${colorScheme}`, async () => {
      const { page, faults } = await openPage(browser, { colorScheme, viewport: PHONE });
      for (const path of ["/", "/sign-in"]) {
        await page.goto(path);
        await page.getByRole("main").waitFor();
        await expectAccessible(page);
        await expectNoSidewaysScroll(page);
      }
      await signIn(page, "vera");
      await page.getByRole("heading", { name: "Recent runs" }).waitFor();
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
      expect(faults).toEqual([]);
      await page.context().close();
    });
  }

  it("shows at first sight what ran and what needs attention", async () => {
    const { page } = await openPage(browser);
    await signIn(page, "vera");
    const attention = page.getByRole("region", { name: "Needs attention" });
    await attention
      .getByRole("link", { name: /Reversed input/ })
      .first()
      .waitFor();
    await attention
      .getByText(/\d+ points failed/)
      .first()
      .waitFor();
    const recent = page.getByRole("region", { name: "Recent runs" });
    await recent
      .getByText(/^(done|holds|broken)/)
      .first()
      .waitFor();
    expect(await recent.getByRole("row").count()).toBeGreaterThan(6);
    await page.getByText("Northbench Instruments and its people are invented").waitFor();
    await page.context().close();
  });

  it("keeps the theme that was chosen over a reload", async () => {
    const { page } = await openPage(browser, { colorScheme: "light" });
    await signIn(page, "vera");
    const paper = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
    expect(await paper()).toBe("rgb(251, 250, 246)");
    await page.getByRole("button", { name: /Account of/ }).click();
    await page.getByRole("menuitemradio", { name: "Dark" }).click();
    await page.reload();
    expect(await paper()).toBe("rgb(16, 22, 29)");
    await page.context().close();
  });
});
