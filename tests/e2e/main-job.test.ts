import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import type { RunDocument } from "@/lib/analyses/result";
import { launchBrowser, openPage, signIn, WORKSPACE } from "./harness";
import {
  converterText,
  expectChecked,
  idIn,
  makeNetlist,
  openSheet,
  PATIENT,
  post,
  problems,
  typeAtEnd,
  writeText,
} from "./sheet-steps";

/** Exact values of the SI (SI Brochure, 9th edition, 2019): J/K and C. */
const BOLTZMANN = 1.380649e-23;
const ELEMENTARY_CHARGE = 1.602176634e-19;

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser?.close());

/** Where the text `word` stands on the screen, and where the mark under it does: left and right. */
function placesOf(page: Page, word: string) {
  return page.evaluate((wanted) => {
    const lines = document.createTreeWalker(document.querySelector(".view-lines")!, NodeFilter.SHOW_TEXT);
    for (let node = lines.nextNode(); node !== null; node = lines.nextNode()) {
      const at = node.textContent?.indexOf(wanted) ?? -1;
      if (at < 0) continue;
      const range = document.createRange();
      range.setStart(node, at);
      range.setEnd(node, at + wanted.length);
      const place = (box: DOMRect) => [Math.round(box.left), Math.round(box.right)];
      const mark = document.querySelector(".squiggly-error")!;
      return { text: place(range.getBoundingClientRect()), mark: place(mark.getBoundingClientRect()) };
    }
    return null;
  }, word);
}

test("the main job: break a netlist, see where, mend it, queue it, watch it, see the curve, and the link shows it again", async () => {
  const { page, faults } = await openPage(browser);
  await signIn(page, "erik");
  await page.getByRole("navigation", { name: "Workspace" }).getByRole("link", { name: "Netlists" }).click();
  await page.getByRole("searchbox", { name: "Search netlists" }).fill("Log ratio head");
  await page.getByRole("link", { name: "Log ratio head" }).first().click();
  await page.waitForURL(/\/netlists\/[0-9a-f-]{36}$/);
  await expectChecked(page, "no problems");

  // Break it: one letter of a name is missing. Finer steps, so that the run takes long enough to be watched.
  const was: { text: string } = await (await page.request.get(`/api/v1/netlists/${idIn(page)}`)).json();
  const finer = was.text.replace(/, \d+ per decade/, ", 4000 per decade");
  const half = "show half   = out.v * R_out / (R_out + R_ot)\n";
  await writeText(page, finer.includes("show half") ? finer.replace(/show half .*\n/, half) : finer + half);
  await expectChecked(page, "1 error to mend before a run");
  const row = problems(page).getByRole("listitem");
  await row.waitFor();
  expect(await row.textContent()).toMatch(
    /line \d+ ?NAM 3 Nothing here is called R_ot; did you mean R_out\?/,
  );
  const places = await placesOf(page, "R_ot");
  expect(places!.mark).toEqual(places!.text);
  await page.keyboard.press("Control+Enter");
  await expectChecked(page, "1 error to mend before a run");
  expect(page.url()).toContain("/netlists/");

  // Mend it by its button.
  await row.getByRole("button", { name: "Change to R_out" }).click();
  await expectChecked(page, "no problems");

  await page.keyboard.press("Control+Enter");
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}/);
  const progress = page.getByRole("progressbar", { name: "Points solved" });
  await progress.waitFor();
  expect(await progress.getAttribute("aria-valuemax")).toBe("72003");
  const figure = page.getByRole("figure", { name: /Curves of Log ratio head, run \d+/ });
  await figure.waitFor();
  await page
    .getByRole("status")
    .filter({ hasText: /All 72.003 points are solved\./ })
    .waitFor();
  const caption = figure.locator("figcaption");
  await expect.poll(() => caption.textContent(), PATIENT).toMatch(/All 72.003 points are solved\./);
  const summary = await caption.textContent();
  expect(summary).toContain("ratio rises");

  // The deep link shows the same numbers again.
  await page.getByRole("tab", { name: "Table of numbers" }).click();
  const table = page.getByRole("region", { name: "Numbers of all points" });
  await table.getByText("solved", { exact: true }).first().waitFor();
  const numbers = await table.textContent();
  const address = page.url();
  await page.reload();
  await table.getByText("solved", { exact: true }).first().waitFor();
  expect(page.url()).toBe(address);
  expect(await table.textContent()).toBe(numbers);
  await page.getByRole("tab", { name: "Curves" }).click();
  await figure.waitFor();
  await expect.poll(() => caption.textContent(), PATIENT).toBe(summary);

  // What was drawn is the law: 16.9 times V_T ln 10 a decade of the current, at each temperature. The bound leaves room for
  // what the netlist adds on purpose (current gain of 240, Early voltage of 80 V, bias currents of 20 pA).
  const answer = await page.request.get(`/api/v1/runs/${idIn(page)}`);
  const { axes, traces }: RunDocument = await answer.json();
  const [current, temperature] = axes;
  const ratio = traces.find(({ name }) => name === "ratio")!;
  const placeOf = (amperes: number) =>
    current!.values.findIndex((value) => Math.abs(value / amperes - 1) < 1e-6);
  const [low, high] = [placeOf(1e-7), placeOf(1e-5)];
  for (const [outer, kelvin] of temperature!.values.entries()) {
    const from = outer * current!.values.length;
    const perDecade = (ratio.values[from + high]! - ratio.values[from + low]!) / 2;
    const law = 16.9 * ((BOLTZMANN * kelvin) / ELEMENTARY_CHARGE) * Math.LN10;
    expect(perDecade / law).toBeGreaterThan(0.995);
    expect(perDecade / law).toBeLessThan(1.005);
  }
  expect(faults).toEqual([]);
});

test("a long run shows how far it is, and is cancelled while it computes", async () => {
  const { page, faults } = await openPage(browser);
  await signIn(page, "erik");
  const id = await makeNetlist(page, converterText("Long sweep to cancel", 50_000));
  await openSheet(page, id);
  await expectChecked(page, "no problems");
  await page.getByRole("button", { name: /Queue run/ }).click();
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}/);
  const progress = page.getByRole("progressbar", { name: "Points solved" });
  await progress.waitFor();
  expect(Number(await progress.getAttribute("aria-valuemax"))).toBe(300_001);

  await page.getByRole("button", { name: "Cancel run" }).click();
  const ended = page
    .getByRole("status")
    .filter({ hasText: /^Cancelled when .* of 300.001 points were in\./ });
  await ended.waitFor();
  await page.waitForFunction(() => !document.body.textContent?.includes("Fetching the rest of the curves"));
  const said = await ended.textContent();
  expect(await page.getByRole("button", { name: "Cancel run" }).count()).toBe(0);
  await page.reload();
  await ended.waitFor();
  await page.getByText(said ?? "", { exact: true }).waitFor();
  expect(faults).toEqual([]);

  // The sheet lists it with its state.
  await openSheet(page, id);
  await page.getByRole("region", { name: "Last runs" }).getByText("cancelled").waitFor();
});

test("a viewer reads the sheet and is told why it cannot be queued; asking the service all the same is refused", async () => {
  const engineer = await openPage(browser);
  await signIn(engineer.page, "erik");
  const id = await makeNetlist(engineer.page, converterText("Only to read"));
  const before = await engineer.page.request.get(`/api/v1/netlists/${id}`);

  const { page, faults } = await openPage(browser);
  await signIn(page, "vera");
  await openSheet(page, id);
  await expectChecked(page, "no problems");
  const queue = page.getByRole("button", { name: /Queue run/ });
  expect(await queue.isDisabled()).toBe(true);
  await page.getByText("As viewer you read this netlist.").waitFor();
  expect(await page.getByRole("button", { name: "Save revision" }).count()).toBe(0);
  await typeAtEnd(page, "let x = 1 V");
  await page.keyboard.press("Control+Enter");
  expect(await page.getByText("let x = 1 V").count()).toBe(0);
  expect(page.url()).toContain(`/netlists/${id}`);

  const run = await post(page, "/api/v1/runs", { netlistId: id, base: 1 });
  expect(run.status()).toBe(403);
  expect((await run.json()).detail).toBe(
    "As viewer you may not queue runs. Ask an admin of the workspace for another role.",
  );
  const save = await post(page, `/api/v1/netlists/${id}/revisions`, {
    base: 1,
    text: converterText("Written by a viewer"),
  });
  expect(save.status()).toBe(403);
  const after = await page.request.get(`/api/v1/netlists/${id}`);
  expect(await after.json()).toEqual(await before.json());
  const list = await page.request.get(`/api/v1/runs?workspace=${WORKSPACE}&netlistId=${id}`);
  expect((await list.json()).total).toBe(0);
  expect(faults).toEqual([]);
});
