import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser, openPage, signIn, WORKSPACE } from "./harness";
import { converterText, makeNetlist, PATIENT, post } from "./sheet-steps";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser?.close());

test("a large run is drawn from afar before its points have come, and nothing is taken for a point of it till then", async () => {
  const { page, faults } = await openPage(browser);
  await signIn(page, "erik");
  const netlistId = await makeNetlist(page, converterText("Seen from afar", 1500));
  const { id } = await (await post(page, "/api/v1/runs", { netlistId, base: 1 })).json();
  const summary = async () => (await page.request.get(`/api/v1/runs/${id}/summary`)).json();
  await expect.poll(async () => (await summary()).judgement !== null, PATIENT).toBe(true);

  let release = () => {};
  const held = new Promise<void>((resolve) => {
    release = resolve;
  });
  await page.route("**/columns", async (route) => {
    await held;
    await route.continue();
  });
  await page.goto(`/${WORKSPACE}/runs/${id}`);
  const figure = page.getByRole("figure", { name: /^Curves of Seen from afar/ });
  await figure.locator('[data-drawn]:not([data-drawn="0"])').first().waitFor();
  const words = figure.locator("figcaption");
  expect(await words.textContent()).toContain("Fetching every point");
  const plot = figure.getByRole("slider", { name: "Cursor along I_in" });
  await plot.click();
  expect(new URL(page.url()).search).toBe("");

  release();
  await expect.poll(() => words.textContent(), PATIENT).toContain("All 9\u202f001 points are solved");
  await plot.click();
  await expect.poll(() => new URL(page.url()).search, PATIENT).toMatch(/^\?point=\d+$/);
  expect(faults).toEqual([]);
});
