import type { Browser, Page } from "playwright-core";
import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import {
  closePages,
  expectAccessible,
  expectNoSidewaysScroll,
  LOOKS,
  launchBrowser,
  look,
  openPageAs,
  picture,
  type Who,
  WORKSPACE,
} from "./harness";
import { addRevision, converterText, makeNetlist, openSheet, PATIENT, post } from "./sheet-steps";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterEach(() => closePages(browser));
afterAll(() => browser?.close());

/** A text with a requirement that holds with 10 kΩ and is broken with 20 kΩ: the load takes 24 µA to 69 µA of its voltage. */
function loadedText(title: string, ohms = "10 kΩ"): string {
  return `${converterText(title).replace("10 kΩ", ohms)}show i_load = R1.i\nrequire abs(i_load) >= 30 µA as "load"\n`;
}

const PATH = /\/netlists\/[0-9a-f-]{36}/;
const base = (id: string) => `/${WORKSPACE}/netlists/${id}`;

/** Opens a page of revisions and waits until it stands whole: what is streamed is in the page twice for a moment. */
async function visit(page: Page, path: string): Promise<void> {
  await page.goto(path);
  await page.getByRole("heading", { level: 1 }).waitFor();
  await page.waitForFunction(() => document.querySelector("div[hidden][id^='S:']") === null);
}

const signedIn = async (who: Who): Promise<Page> => (await openPageAs(browser, who)).page;

async function runRevision(page: Page, id: string, number: number): Promise<void> {
  const answer = await post(page, "/api/v1/runs", { netlistId: id, base: number });
  const { id: run } = await answer.json();
  const judged = async () => {
    const summary = await (await page.request.get(`/api/v1/runs/${run}/summary`)).json();
    return summary.status === "done" && summary.judgement !== null;
  };
  await expect.poll(judged, { timeout: 60_000 }).toBe(true);
}

const plain = (text: string | null) => (text ?? "").replaceAll("\u202f", " ");

test("the history tells what changed in each revision; two of it are compared in words, verdicts, curves and lines", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, loadedText("History"));
  await addRevision(page, id, 1, loadedText("History", "20 kΩ"), "A lighter load");
  await addRevision(page, id, 2, `# a note\n${loadedText("History", "20 kΩ")}`);
  for (const number of [1, 2]) await runRevision(page, id, number);

  await openSheet(page, id);
  await page.getByRole("link", { name: "History" }).click();
  await page.waitForURL(`**${base(id)}/revisions`);
  await page.getByRole("link", { name: "Revision 1", exact: true }).waitFor();
  const rows = page.getByRole("main").getByRole("listitem");
  expect((await rows.allTextContents()).map(plain)).toEqual([
    expect.stringMatching(/^Revision 3newest.*Comments or layout only.*never run$/),
    expect.stringMatching(/^Revision 2A lighter loadR_load 20 kΩ instead of 10 kΩ.*brokenrun \d+$/),
    expect.stringMatching(/^Revision 1The first text.*holdsrun \d+$/),
  ]);
  const compare = page.getByRole("button", { name: /^Compare/ });
  expect(await compare.isDisabled()).toBe(true);
  for (const number of [3, 1, 2]) await page.getByLabel(`Choose revision ${number} to compare`).check();
  expect(await page.getByLabel("Choose revision 3 to compare").isChecked()).toBe(false);
  await page.getByRole("button", { name: "Compare 1 with 2" }).click();
  await page.waitForURL(`**${base(id)}/compare/1..2`);

  const words = page.getByRole("region", { name: "What changed" });
  expect(plain(await words.textContent())).toContain("R_load 10 kΩ became 20 kΩ");
  const verdicts = page.getByRole("region", { name: /^Verdicts of/ });
  await verdicts.getByText("1 turned for the worse.").waitFor();
  expect(plain(await verdicts.getByRole("row").nth(1).textContent())).toMatch(
    /^loadholdsmargin .*brokenmissed by .*worse$/,
  );
  const curves = page.getByRole("figure", { name: "Curves of revisions 1 and 2" });
  await curves.waitFor();
  expect(await curves.textContent()).toContain("revision 2");
  await page.getByRole("tab", { name: "Difference" }).click();
  await page.getByRole("figure", { name: "Difference of revisions 1 and 2" }).waitFor();
  await page.waitForURL(/show=difference/);
  await page.keyboard.press("Alt+ArrowDown");
  await page.getByText("Change 1 of 1").waitFor();
  const marked = await page.locator("mark").allTextContents();
  expect(marked).toEqual(["10", "20"]);
  await page.getByLabel("in one column").check();
  await page.waitForURL(/text=inline/);
  await page.reload();
  await page.getByRole("figure", { name: "Difference of revisions 1 and 2" }).waitFor();
  expect(await page.getByRole("radio", { name: "in one column" }).isChecked()).toBe(true);
});

test("a revision never run, one that cannot run, and two that mean the same say so", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("States"));
  await addRevision(page, id, 1, `${converterText("States")}let late = 10k\n`);
  await addRevision(page, id, 2, `# a note\n${converterText("States")}`);
  await visit(page, `${base(id)}/compare/1..2`);
  await page.getByText("Revision 1 was never run.").waitFor();
  await page.getByText("Revision 2 has 1 error to mend before it can run.").waitFor();
  await page.getByText("Revision 2 has 1 error, so only the lines can be compared").waitFor();
  await visit(page, `${base(id)}/compare/1..3`);
  await page.getByText("Only comments, layout or spelling differ; both mean the same.").waitFor();
  await visit(page, `${base(id)}/compare/3..3`);
  await page.getByText("The texts are the same to the letter.").waitFor();
  await page.getByText("No line differs").waitFor();
  await page.getByRole("button", { name: "Queue revision 3" }).first().click();
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}/);
});

test("an old revision is restored, which can be undone; its text is duplicated; each step stays in the history", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("Restore"));
  await addRevision(page, id, 1, converterText("Restore", 20));
  await visit(page, `${base(id)}/revisions/1`);
  const text = page.getByRole("region", { name: "Text of revision 1, to read only" });
  expect(await text.textContent()).toContain("10 per decade");
  await page.getByRole("button", { name: "Restore" }).press("Enter");
  await page.getByText("Revision 3 has the text of revision 1 now").waitFor();
  await expect.poll(() => page.getByRole("button", { name: "Restore" }).count(), PATIENT).toBe(0);
  // The pressed button is gone; the focus went to the way back.
  await expect.poll(() => page.evaluate(() => document.activeElement?.textContent), PATIENT).toBe("Undo");
  await page.keyboard.press("Enter");
  await page.getByText("Undone: revision 4 has the text of revision 2").waitFor();
  const { rows } = await (await page.request.get(`/api/v1/netlists/${id}/revisions`)).json();
  expect(rows.map((row: { message: string | null }) => row.message)).toEqual([
    "Restoring of revision 1 undone",
    "Text of revision 1 restored",
    null,
    null,
  ]);
  await page.getByRole("button", { name: "Duplicate" }).click();
  await page.getByRole("link", { name: "Open the copy" }).click();
  await page.getByRole("heading", { name: "Copy of Restore", level: 1 }).waitFor();
  expect(PATH.exec(page.url())![0]).not.toContain(id);
});

test("restoring from a page that is out of date is refused, and shows what was saved meanwhile", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("Out of date"));
  await addRevision(page, id, 1, converterText("Out of date", 20));
  await visit(page, `${base(id)}/revisions/1`);
  await addRevision(page, id, 2, converterText("Out of date", 30));
  await page.getByRole("button", { name: "Restore" }).click();
  await page.getByText("Revision 3 was saved meanwhile").waitFor();
  await page.getByRole("link", { name: "See what changed" }).click();
  await page.waitForURL(`**/compare/1..3`);
});

test("a viewer reads and compares, and is offered nothing that a viewer may not do", async () => {
  const erik = await signedIn("erik");
  const id = await makeNetlist(erik, converterText("To read"));
  await addRevision(erik, id, 1, converterText("To read", 20));
  const vera = await signedIn("vera");
  await visit(vera, `${base(id)}/revisions/1`);
  await vera.getByText("As viewer you read revisions and compare them.").waitFor();
  for (const name of ["Restore", "Duplicate", "Queue run"])
    expect(await vera.getByRole("button", { name }).count()).toBe(0);
  await vera.getByRole("button", { name: "Compare with…" }).click();
  await vera.getByRole("menuitem", { name: "Revision 2, the newest" }).click();
  await vera.waitForURL("**/compare/1..2");
  expect(await vera.getByRole("button", { name: /^Queue revision/ }).count()).toBe(0);
});

test("history, revision and comparison are accessible and fit their window, light and dark, on a phone and on a wide screen", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, loadedText("Look at revisions"));
  await addRevision(page, id, 1, loadedText("Look at revisions", "20 kΩ"), "A lighter load");
  for (const number of [1, 2]) await runRevision(page, id, number);
  // The demo's story has verdicts and readings beside it, whose tables are wide.
  const { rows } = await (
    await page.request.get(`/api/v1/netlists?workspace=${WORKSPACE}&query=Turbidity`)
  ).json();
  const story = base(rows[0].id);
  for (const one of LOOKS) {
    const { page: view, faults } = await openPageAs(browser, "erik");
    await look(view, one);
    for (const [name, path] of [
      ["history", "revisions"],
      ["revision", "revisions/2"],
      ["compare", "compare/1..2"],
    ] as const) {
      await visit(view, `${base(id)}/${path}`);
      if (name === "compare") await view.getByRole("figure").waitFor();
      await expectAccessible(view);
      await expectNoSidewaysScroll(view);
      await picture(view, `${name}-${one.width}-${one.colorScheme}`);
    }
    await visit(view, `${story}/compare/2..3`);
    await view.getByRole("figure").waitFor();
    await expectAccessible(view);
    await expectNoSidewaysScroll(view);
    expect(faults).toEqual([]);
  }
}, 240_000);

test("there is no page of a revision or of a pair that does not exist", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("Nothing there"));
  const none = "00000000-0000-4000-8000-000000000000";
  for (const path of [
    `${base(id)}/revisions/2`,
    `${base(id)}/revisions/one`,
    `${base(id)}/compare/1..2`,
    `${base(id)}/compare/1`,
    `${base(none)}/revisions`,
  ]) {
    await page.goto(path);
    await page.getByText(/^There is no such/).waitFor();
  }
});
