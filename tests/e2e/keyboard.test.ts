import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser, openPage, WORKSPACE } from "./harness";
import { countPresses, findAndTake, lookFor, pressAt, tabTo } from "./key-steps";
import { DRAWN } from "./run-steps";
import { expectChecked, PATIENT } from "./sheet-steps";

const PASSWORD = process.env.SWEEPWRIGHT_DEMO_PASSWORD || "log-ratio-bench-7";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser?.close());

test("the whole work is done from the keyboard, from signing in to signing out", async () => {
  const { page, faults } = await openPage(browser, { acceptDownloads: true });
  const presses = await countPresses(page);
  const { keyboard } = page;
  const button = (name: string | RegExp) => page.getByRole("button", { name });

  // Sign in.
  await page.goto("/sign-in");
  await tabTo(page, page.getByLabel("E-mail"));
  await keyboard.type("erik.engineer@northbench.example");
  await keyboard.press("Tab");
  await keyboard.type(PASSWORD);
  await keyboard.press("Enter");
  await page.waitForURL(`**/${WORKSPACE}`);

  // Make a netlist.
  const links = page.getByRole("navigation", { name: "Workspace" });
  await pressAt(page, links.getByRole("link", { name: "Netlists" }));
  await pressAt(page, button("New netlist"));
  await page.getByRole("dialog", { name: "New netlist" }).waitFor();
  await keyboard.type("By keys alone");
  await keyboard.press("Enter");
  await page.waitForURL(/\/netlists\/[0-9a-f-]{36}$/);
  await expectChecked(page, "no problems");
  const sheet = page.url();

  // Type into it, and leave the editor again.
  await keyboard.press("Shift");
  const text = page.getByRole("textbox", { name: "Netlist text" });
  await tabTo(page, text);
  await keyboard.press("Control+End");
  await keyboard.insertText("show into = D1.i\n");
  await expectChecked(page, "no problems");
  await keyboard.press("Control+m");
  await page.getByText(/Tab moves on/).waitFor();
  await keyboard.press("Tab");
  await expect.poll(() => text.evaluate((one) => one === document.activeElement), PATIENT).toBe(false);

  // Save it with a message.
  await keyboard.press("Control+s");
  await page.getByRole("dialog", { name: "Save revision 2" }).waitFor();
  await keyboard.type("The current as well");
  await keyboard.press("Enter");
  await page.getByText(/^revision 2$/).waitFor();

  // Queue it; the run opens by itself.
  await keyboard.press("Control+Enter");
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}/);
  await page.locator("[data-run-status=done]").waitFor();
  await page.locator(DRAWN).first().waitFor();
  const number = /run (\d+)/.exec((await page.getByText(/revision 2 · run \d+/).textContent()) ?? "")?.[1];

  // Move the cursor, choose a point, zoom.
  const cursor = page.getByRole("slider", { name: "Cursor along I_in" });
  await tabTo(page, cursor);
  await keyboard.press("Home");
  const first = await cursor.getAttribute("aria-valuetext");
  await keyboard.press("Shift+ArrowRight");
  await expect.poll(() => cursor.getAttribute("aria-valuetext"), PATIENT).not.toBe(first);
  await keyboard.press("Enter");
  await page.waitForURL(/point=10/);
  await keyboard.press("+");
  await page.waitForURL(/from=.+to=/);
  await keyboard.press("0");
  await expect.poll(() => page.url(), PATIENT).not.toContain("from=");

  // Hide a trace.
  const trace = page.getByRole("checkbox", { name: /^into/ });
  expect(await trace.isChecked()).toBe(true);
  await pressAt(page, trace, "Space");
  await page.waitForURL(/trace=v_log/);
  expect(await trace.isChecked()).toBe(false);

  // Compare it with a run of another netlist.
  await findAndTake(page, "compare with another");
  await page.waitForURL(/\/runs\/compare\?runs=/);
  await pressAt(page, page.getByRole("checkbox", { name: "Of other netlists too" }), "Space");
  await pressAt(page, button(/^Add run \d+$/).first());
  await page.locator("[data-compared=B]").waitFor();
  await page.locator(DRAWN).first().waitFor();

  // Back to the run by its number, and export its points.
  await lookFor(page, `run ${number} by keys`);
  await keyboard.press("Enter");
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}/);
  await pressAt(page, button("Export"));
  const download = page.waitForEvent("download");
  await page.locator("[role=menuitem][data-highlighted]", { hasText: "Points as CSV" }).waitFor();
  await keyboard.press("Enter");
  expect((await download).suggestedFilename()).toMatch(/\.csv$/);

  // Back to the sheet, and out.
  await findAndTake(page, "open netlist");
  await page.waitForURL(sheet);
  await expectChecked(page, "no problems");
  expect(faults).toEqual([]);
  await findAndTake(page, "sign out");
  await page.waitForURL("**/sign-in**");
  expect(presses()).toBe(0);
});
