import type { Browser, Locator, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  fillSignIn,
  launchBrowser,
  openPage,
  picture,
  WORKSPACE,
} from "./harness";
import { PATIENT } from "./sheet-steps";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser?.close());

const state = (page: Page) => page.locator("[data-step]");
const button = (page: Page, name: string | RegExp) => page.getByRole("button", { name });

async function openTour(page: Page): Promise<void> {
  await page.goto("/docs/tour");
  await page.locator('[data-preview="whole"]').waitFor();
}

/** Presses Tab until the focus stands there: nobody gets there by a mouse. In the editor the key that is written below it lets Tab move on. */
async function tabTo(page: Page, wanted: Locator): Promise<void> {
  const isThere = () => wanted.evaluate((one) => one === document.activeElement);
  for (let presses = 0; presses < 120 && !(await isThere()); presses++) {
    const isHeld = await page.evaluate(() => document.activeElement?.closest(".sheet-editor") !== null);
    if (isHeld && (await page.getByText(/^Tab indents/u).isVisible())) await page.keyboard.press("Control+m");
    await page.keyboard.press("Tab");
  }
  expect(await isThere()).toBe(true);
}

async function press(page: Page, wanted: Locator): Promise<void> {
  await tabTo(page, wanted);
  await page.keyboard.press("Enter");
}

async function expectDone(page: Page, says: RegExp): Promise<void> {
  await state(page).filter({ hasText: says }).waitFor();
}

/** From wherever the focus is, on to the bar that tells of the step, and to the next one. */
async function goOn(page: Page): Promise<void> {
  await press(page, button(page, "Next step"));
  await expect.poll(() => page.evaluate(() => document.activeElement?.id), PATIENT).toBe("step");
}

test("the whole tour is walked by keyboard, through signing in, and kept in the browser", async () => {
  const { page, faults } = await openPage(browser);
  await openTour(page);
  expect(await state(page).textContent()).toContain("is not done yet");

  await tabTo(page, page.getByRole("slider", { name: "I_in", exact: true }));
  await page.keyboard.press("End");
  await expectDone(page, /^Done: at 1.mA v_log is 693\.103.mV/u);
  await goOn(page);

  await tabTo(page, page.getByRole("slider", { name: "R_bulk", exact: true }));
  await page.keyboard.press("End");
  await expectDone(page, /^Done: R_bulk is 100.Ω, and the curve bends by \d+.mV/u);
  await goOn(page);

  // The third by hand: the knob is put back, and the line is typed.
  await press(page, button(page, "Edit the text"));
  await page.getByRole("textbox", { name: "Netlist text" }).waitFor();
  await expect
    .poll(() => page.evaluate(() => document.activeElement?.closest(".sheet-editor") !== null), PATIENT)
    .toBe(true);
  await page.keyboard.press("Control+End");
  await page.keyboard.insertText('\nrequire abs(bend) <= 0.5 mV as "log conformance"\n');
  await expectDone(page, /^Done: log conformance is broken; .*missed by/u);
  await goOn(page);

  await press(page, button(page, "Do it for me"));
  await expectDone(page, /^Done: log conformance holds; .*margin 70/u);
  await goOn(page);

  await press(page, button(page, "Do it for me"));
  await expectDone(page, /^Done: 181 of 200 draws hold: 86.% to 94.% of boards/u);
  await page
    .getByText(
      /^24.321 points solved here in .*, all proved, worst .* a preview, kept nowhere\. A requirement is broken\.$/u,
    )
    .waitFor();
  await goOn(page);

  // Signed out: there and back, with everything as it was.
  await press(page, button(page, "Open in my workspace"));
  await page.waitForURL(/\/sign-in\?next=/u);
  await fillSignIn(page, "erik");
  await page.waitForURL("**/docs/tour");
  await page.getByText("5 of 7 done").waitFor();
  await press(page, button(page, "Open in my workspace"));
  await page.getByRole("link", { name: "Open its sheet (new tab)" }).waitFor();
  await press(page, button(page, "Do it for me"));
  await expectDone(
    page,
    /^Done: run \d+ solved 24.321 points, none failed; at 1.µA the solution is proved within [\d.]+.[fp]V/u,
  );
  await goOn(page);

  await press(page, button(page, "Do it for me"));
  await expectDone(page, /^Done: runs \d+ and \d+ can be laid over each other/u);
  await page.getByText("7 of 7 done").waitFor();
  const compare = page.getByRole("link", { name: /^Compare runs/u });
  expect(await compare.getAttribute("href")).toMatch(new RegExp(`^/${WORKSPACE}/runs/compare\\?runs=`, "u"));
  await page.goto((await compare.getAttribute("href"))!);
  await page.getByRole("heading", { level: 1 }).waitFor();

  await openTour(page);
  await page.getByText("7 of 7 done").waitFor();
  await button(page, "Begin again").click();
  await page.getByText("0 of 7 done").waitFor();
  await button(page, "Take the tour back").click();
  await page.getByText("7 of 7 done").waitFor();
  expect(faults).toEqual([]);
});

test("it can be read by everyone, at every width, light and dark", async () => {
  const { page } = await openPage(browser, { viewport: { width: 360, height: 800 } });
  await page.goto("/");
  await page.getByRole("link", { name: "Take the five-minute tour" }).click();
  await page.waitForURL("**/docs/tour");
  await page.locator('[data-preview="whole"]').waitFor();
  await expectNoSidewaysScroll(page);
  await button(page, "Do it for me").click();
  await expectDone(page, /^Done: at 1.mA/u);
  await expectAccessible(page);
  await picture(page, "tour-360");
  await page.emulateMedia({ colorScheme: "dark" });
  for (const width of [1024, 1920]) {
    await page.setViewportSize({ width, height: 1000 });
    await expectNoSidewaysScroll(page);
    await picture(page, `tour-${width}-dark`);
  }
  await expectAccessible(page);
});
