import type { Browser, Page } from "playwright-core";
import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import {
  baseUrl,
  closePages,
  expectAccessible,
  expectNoSidewaysScroll,
  fillSignIn,
  launchBrowser,
  look,
  openPage,
  openPageAs,
  picture,
  signIn,
  WORKSPACE,
} from "./harness";
import {
  converterText,
  editorOf,
  expectChecked,
  makeNetlist,
  openSheet,
  PATIENT,
  problems,
  save,
  typeAtEnd,
  writeText,
} from "./sheet-steps";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterEach(() => closePages(browser));
afterAll(() => browser?.close());

/** An engineer on the sheet of a netlist of their own; `apart` with cookies of their own too. */
async function onSheet(title: string, text = converterText(title), { apart = false } = {}) {
  const opened = apart ? await openPage(browser) : await openPageAs(browser, "erik");
  if (apart) await signIn(opened.page, "erik");
  const id = await makeNetlist(opened.page, text);
  await openSheet(opened.page, id);
  return { ...opened, id };
}

/** What stands in the editor; only for texts that fit its window. */
async function shownText(page: Page): Promise<string> {
  const lines = await page.locator(".view-line").allTextContents();
  return lines.join("\n").replaceAll("\u00a0", " ");
}

test("the text can be read before any script has come, and the editor asks nothing of other machines", async () => {
  const { page, faults, id } = await onSheet("Read at once");
  const asked: string[] = [];
  page.on("request", (request) => asked.push(request.url()));
  await page.reload();
  await editorOf(page);
  await expectChecked(page, "no problems");
  expect(asked.filter((url) => !url.startsWith(baseUrl()) && !url.startsWith("data:"))).toEqual([]);
  expect(asked.some((url) => url.endsWith(".js"))).toBe(true);
  expect(faults).toEqual([]);

  const { page: still } = await openPage(browser, { storageState: await page.context().storageState() });
  await still.route("**/*.js", (route) => route.abort());
  await still.goto(`/${WORKSPACE}/netlists/${id}`);
  const lines = still.getByRole("region", { name: "Netlist text, the editor is loading" });
  expect(await lines.textContent()).toContain("sweep I_in from 1 nA to 1 mA, 10 per decade");
});

test("a problem is listed with its line; pressing it selects its place, so that typing there mends it", async () => {
  const { page } = await onSheet("Problems");
  await typeAtEnd(page, "show load = out.v / R_laod\nlet q = 10k\n");
  await expectChecked(page, "2 errors to mend before a run");
  const rows = problems(page).getByRole("listitem");
  expect(await rows.count()).toBe(2);
  await rows.first().getByRole("button", { name: /NAM 3/ }).click();
  await page.keyboard.type("R_load");
  await expectChecked(page, "1 error to mend before a run");
  await rows.getByRole("button", { name: "Change to 10 kΩ" }).click();
  await expectChecked(page, "no problems");
  expect(await problems(page).count()).toBe(0);
  expect(await shownText(page)).toContain("let q = 10 kΩ");
});

test("the plan follows the text, and stays with a remark while the text has errors", async () => {
  const { page } = await onSheet("Plan");
  const plan = page.getByRole("region", { name: "Plan" });
  await plan.getByText("61 points, 1 trace").waitFor();
  await typeAtEnd(page, "sweep temperature over 10 °C, 40 °C\n");
  await plan.getByText("122 points, 1 trace").waitFor();
  expect(await plan.getByRole("listitem").allTextContents()).toEqual([
    expect.stringMatching(/^I_in6 decades, 61 values, horizontal axis1.nA1.mA$/),
    expect.stringMatching(/^temperature2 values, nested10.°C40.°C$/),
  ]);
  await typeAtEnd(page, "sweep");
  await plan.getByText("as before the errors").waitFor();
});

test("Format brings the text into its canonical form, and undo takes it back", async () => {
  const { page } = await onSheet("Format");
  await typeAtEnd(page, "let   late=3 kohm\n");
  await page.getByRole("button", { name: "Format" }).click();
  await expect.poll(() => shownText(page), PATIENT).toContain("let late = 3 kΩ");
  await (await editorOf(page)).focus();
  await page.keyboard.press("Control+z");
  await expect.poll(() => shownText(page), PATIENT).toContain("let   late=3 kohm");
});

test("saving makes a revision with a message; a text that only looks different makes none", async () => {
  const { page, id } = await onSheet("Revisions");
  expect(await page.getByRole("button", { name: "Save revision" }).isDisabled()).toBe(true);
  await typeAtEnd(page, "let late = 3 kΩ\n");
  await page.getByText("draft on revision 1").waitFor();
  await page.keyboard.press("Control+s");
  await page.getByLabel("What changed (optional)").fill("A value for later");
  await page.keyboard.press("Enter");
  await page.getByRole("dialog").waitFor({ state: "hidden" });
  await page.getByText(/^revision 2$/).waitFor();
  const box = await editorOf(page);
  await expect.poll(() => box.evaluate((one) => one === document.activeElement), PATIENT).toBe(true);
  await typeAtEnd(page, "\n\n\n");
  await page.getByText("draft on revision 2").waitFor();
  await save(page);
  await page.getByText("The text means the same as revision 2").waitFor();
  const kept = await (await page.request.get(`/api/v1/netlists/${id}`)).json();
  expect(kept.revision).toBe(2);
  expect(kept.text).toContain("let late = 3 kΩ");
});

test("what is typed while the page is brought up to date after a save counts", async () => {
  const { page } = await onSheet("Typed meanwhile");
  await typeAtEnd(page, "let late = 3 kΩ\n");
  let release: () => void = () => {};
  const held = new Promise<void>((resolve) => {
    release = resolve;
  });
  const brought = new Promise<void>((resolve) => {
    const isUpdate = (url: URL) => url.pathname.includes("/netlists/") && url.searchParams.has("_rsc");
    void page.route(isUpdate, async (route) => {
      resolve();
      const answer = await route.fetch();
      await held;
      await route.fulfill({ response: answer });
    });
  });
  await save(page);
  await brought;
  await page.getByText(/^revision 2$/).waitFor();
  await typeAtEnd(page, "let later = 4 kΩ\n");
  release();
  await page.getByText("draft on revision 2").waitFor();
});

test("two people on one netlist: the later save is refused, and neither text is lost", async () => {
  const { page: mine, id } = await onSheet("Two people");
  const { page: theirs } = await openPage(browser);
  await signIn(theirs, "rosa");
  await openSheet(theirs, id);
  await typeAtEnd(mine, "let mine = 1 V\n");
  await typeAtEnd(theirs, "let theirs = 2 V\n");
  for (const page of [theirs, mine]) {
    await save(page);
    if (page === theirs) await page.getByText(/^revision 2$/).waitFor();
  }
  await mine.getByRole("dialog", { name: "Revision 2 was saved meanwhile" }).waitFor();
  await mine.getByRole("button", { name: "Load revision 2" }).click();
  await mine.getByText(/^revision 2$/).waitFor();
  expect(await shownText(mine)).toContain("let theirs = 2 V");
  expect(await shownText(mine)).not.toContain("let mine");
  await mine.getByRole("button", { name: "Restore it" }).click();
  await mine.getByText("draft on revision 2").waitFor();
  expect(await shownText(mine)).toContain("let mine = 1 V");
});

test("the later of two may keep their text as a netlist of its own", async () => {
  const { page, id } = await onSheet("A copy");
  const { page: other } = await openPage(browser, { storageState: await page.context().storageState() });
  await openSheet(other, id);
  await writeText(other, converterText("A copy, changed meanwhile"));
  await typeAtEnd(page, "let mine = 1 V\n");
  for (const one of [other, page]) {
    await save(one);
    if (one === other) await one.getByText(/^revision 2$/).waitFor();
  }
  await page.getByRole("button", { name: "Keep mine as a new netlist" }).click();
  await page.getByRole("heading", { name: "A copy, changed meanwhile", level: 1 }).waitFor();
  await page.getByRole("link", { name: "Open your copy" }).click();
  await page.waitForURL((url) => !url.pathname.endsWith(id));
  await editorOf(page);
  expect(await shownText(page)).toContain("let mine = 1 V");
});

test("a tab that dies loses nothing: the next visit offers the text", async () => {
  const { page, id } = await onSheet("Crash");
  await typeAtEnd(page, "let precious = 1 V\n");
  await expectChecked(page, "no problems");
  await page.getByText("draft on revision 1").waitFor();
  const next = await page.context().newPage();
  await page.close();
  await openSheet(next, id);
  const notice = next.getByRole("alert").filter({ hasText: "A text of yours is not in any revision" });
  await notice.waitFor();
  expect(await shownText(next)).not.toContain("precious");
  await notice.getByRole("button", { name: "Restore it" }).click();
  await expect.poll(() => shownText(next), PATIENT).toContain("let precious = 1 V");
  expect(await notice.count()).toBe(0);
});

test("a writer who was signed out elsewhere is told so, signs in, and finds the text again", async () => {
  const { page, id } = await onSheet("Signed out", undefined, { apart: true });
  await typeAtEnd(page, "let precious = 1 V\n");
  await page.getByText("draft on revision 1").waitFor();
  await page.context().clearCookies();
  await save(page);
  const notice = page.getByRole("alert").filter({ hasText: "The revision was not saved" });
  await notice.getByRole("link", { name: "Sign in" }).click();
  await page.waitForURL(/\/sign-in\?next=/);
  await fillSignIn(page, "erik");
  await page.waitForURL((url) => url.pathname.endsWith(id));
  await editorOf(page);
  await page.getByRole("button", { name: "Restore it" }).click();
  await expect.poll(() => shownText(page), PATIENT).toContain("let precious = 1 V");
});

test("the way out for the Tab key, which is written beside the editor, works", async () => {
  const { page } = await onSheet("Tab");
  const box = await editorOf(page);
  const inEditor = () => box.evaluate((element) => element === document.activeElement);
  await page.getByText("Tab indents; Ctrl M lets it move on").waitFor();
  await box.focus();
  await page.keyboard.press("Tab");
  expect(await inEditor()).toBe(true);
  await page.keyboard.press("Control+m");
  await page.getByText("Tab moves on; Ctrl M lets it indent").waitFor();
  await page.keyboard.press("Tab");
  expect(await inEditor()).toBe(false);
});

test("texts that ask for too much are answered in a sentence", async () => {
  const { page } = await onSheet("Too much");
  await writeText(page, converterText("Too much").replace("10 per decade", "200000000 per decade"));
  await problems(page)
    .getByText(/CAP \d/)
    .first()
    .waitFor();
  await writeText(page, `let deep = ${"(".repeat(10_000)}1 V${")".repeat(10_000)}\n`);
  await problems(page)
    .getByText(/CAP \d/)
    .first()
    .waitFor();
});

test("where the editor cannot be had, a plain box takes its place and does the same", async () => {
  const { page, id } = await onSheet("Plain box");
  const { page: poor } = await openPage(browser, { storageState: await page.context().storageState() });
  await poor.route("**/*.js", async (route) => {
    const answer = await route.fetch();
    return (await answer.text()).includes("native-edit-context")
      ? route.abort()
      : route.fulfill({ response: answer });
  });
  await openSheet(poor, id);
  const box = await editorOf(poor);
  expect(await box.evaluate((element) => element.tagName)).toBe("TEXTAREA");
  const text = await box.inputValue();
  await box.fill(`${text}let q = 10k\n`);
  await expectChecked(poor, "1 error to mend before a run");
  await problems(poor).getByRole("button", { name: "Change to 10 kΩ" }).click();
  await expectChecked(poor, "no problems");
  expect(await box.inputValue()).toBe(`${text}let q = 10 kΩ\n`);
  await box.press("Control+Enter");
  await poor.waitForURL(/\/runs\/[0-9a-f-]{36}/);
});

test("the sheet is accessible and fits its window, light and dark, on a phone and on a wide screen", async () => {
  const { page, id } = await onSheet("Look", `${converterText("Look")}show x = out.v / R_laod\n`);
  for (const width of [360, 1024, 1920]) {
    for (const colorScheme of ["light", "dark"] as const) {
      await look(page, { colorScheme, width });
      // What is laid out for a width is laid out when the sheet is opened; the theme follows at once.
      if (colorScheme === "light") await openSheet(page, id);
      await expectChecked(page, "1 error to mend before a run");
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
      await picture(page, `sheet-${width}-${colorScheme}`);
    }
  }
});

test("there is no sheet of a netlist that does not exist, or is no netlist's id", async () => {
  const { page } = await openPageAs(browser, "erik");
  for (const id of ["00000000-0000-4000-8000-000000000000", "nothing"]) {
    const answer = await page.goto(`/${WORKSPACE}/netlists/${id}`);
    await page.getByText("There is no such netlist in this workspace").waitFor();
    expect([200, 404]).toContain(answer!.status());
  }
});
