import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { type Browser, chromium, type Page } from "playwright-core";
import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import {
  baseUrl,
  closePages,
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  openPageAs,
  picture,
  signIn,
  type Who,
  WORKSPACE,
} from "./harness";
import { addRevision, converterText, makeNetlist, openSheet, PATIENT, save, typeAtEnd } from "./sheet-steps";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterEach(() => closePages(browser));
afterAll(() => browser?.close());

const signedIn = async (who: Who): Promise<Page> => (await openPageAs(browser, who)).page;

/** What stands in the editor; only for texts that fit its window. */
async function shownText(page: Page): Promise<string> {
  const lines = await page.locator(".view-line").allTextContents();
  return lines.join("\n").replaceAll("\u00a0", " ");
}

test("a message is proposed from what changed, and may be taken", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("Message"));
  await openSheet(page, id);
  await typeAtEnd(page, "let late = 3 kΩ\n");
  await page.getByText("draft on revision 1").waitFor();
  await page.keyboard.press("Control+s");
  await page.getByRole("button", { name: "Take this message" }).click();
  expect(await page.getByLabel("What changed (optional)").inputValue()).toBe("late added");
  // However much changed, the way on is in sight of a low window.
  const saving = page.getByRole("button", { name: "Save", exact: true });
  await page.setViewportSize({ width: 1280, height: 260 });
  const { y = 0, height = 0 } = (await saving.boundingBox()) ?? {};
  expect(y + height).toBeGreaterThan(0);
  expect(y + height).toBeLessThanOrEqual(260);
  await page.setViewportSize({ width: 1280, height: 800 });
  await saving.click();
  await page.getByText(/^revision 2$/).waitFor();
  const { message } = await (await page.request.get(`/api/v1/netlists/${id}/revisions/2`)).json();
  expect(message).toBe("late added");
  await page.goto(`/${WORKSPACE}/netlists/${id}/revisions`);
  expect(await page.getByText("late added").count()).toBe(1);
});

test("a stale save becomes a merge: what fits is taken, places that both changed are chosen by keyboard, the checker has the last word", async () => {
  const text = converterText("Merge");
  const mine = await signedIn("erik");
  const id = await makeNetlist(mine, text);
  await openSheet(mine, id);
  const theirs = await signedIn("rosa");
  await openSheet(theirs, id);
  await typeAtEnd(theirs, "let shared = 2 V\n");
  await save(theirs);
  await theirs.getByText(/^revision 2$/).waitFor();
  await typeAtEnd(mine, "let shared = 1 V\n");
  await mine.keyboard.press("Control+Home");
  await mine.keyboard.insertText("# my note\n");
  await mine.getByText("draft on revision 1").waitFor();
  await save(mine);
  await mine.getByRole("dialog", { name: "Revision 2 was saved meanwhile" }).waitFor();
  await mine.getByRole("button", { name: "Merge both" }).press("Enter");

  const dialog = mine.getByRole("dialog", { name: "Merge your text with revision 2" });
  await dialog.getByText("1 place left to choose").waitFor();
  const saveMerge = dialog.getByRole("button", { name: "Save as revision 3" });
  expect(await saveMerge.isDisabled()).toBe(true);
  await dialog.getByRole("radio", { name: "Both, mine first" }).press("Space");
  await dialog.getByText("The merge has 1 error").waitFor();
  expect(await saveMerge.isDisabled()).toBe(true);
  await dialog.getByRole("radio", { name: "Write it myself" }).press("Space");
  await dialog.getByLabel("Lines of place 1").fill("let shared = 1 V\nlet other = 2 V");
  await dialog.getByText("The checker finds no error in the merge").waitFor();
  await expectAccessible(mine);
  await picture(mine, "merge-1280-light");
  await saveMerge.press("Enter");
  await mine.getByText(/^revision 3$/).waitFor();
  const merged = await (await mine.request.get(`/api/v1/netlists/${id}`)).json();
  expect(merged.text).toBe(`# my note\n${text}let shared = 1 V\nlet other = 2 V\n`);
  await mine.getByText("A text of yours is not in any revision").waitFor();
});

test("where the two changes fit together, the merge needs no choice; it may be put on the sheet instead", async () => {
  const text = converterText("Fits");
  const page = await signedIn("erik");
  const id = await makeNetlist(page, text);
  await openSheet(page, id);
  await addRevision(page, id, 1, text.replace("10 kΩ", "47 kΩ"));
  await typeAtEnd(page, "let mine = 1 V\n");
  await page.getByText("draft on revision 1").waitFor();
  await save(page);
  await page.getByRole("button", { name: "Merge both" }).click();
  await page.getByText("No place was changed by both.").waitFor();
  await page.getByRole("button", { name: "Put it on the sheet" }).click();
  await page.getByText("draft on revision 2").waitFor();
  expect(await shownText(page)).toContain("47 kΩ");
  expect(await shownText(page)).toContain("let mine = 1 V");
});

test("a browser that is killed the moment after a key stroke loses no letter", async () => {
  const folder = mkdtempSync(join(tmpdir(), "sweepwright-profile-"));
  const start = async () => {
    const context = await chromium.launchPersistentContext(folder, {
      executablePath: process.env.CHROME_PATH || "/usr/bin/chromium",
      args: ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run"],
      baseURL: baseUrl(),
      viewport: { width: 1280, height: 800 },
    });
    const page = await context.newPage();
    page.setDefaultTimeout(20_000);
    return { context, page };
  };
  const first = await start();
  await signIn(first.page, "erik");
  const id = await makeNetlist(first.page, converterText("Killed"));
  await openSheet(first.page, id);
  await typeAtEnd(first.page, "let precious = 1 V");
  await first.page.keyboard.type("# last");
  await first.page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 100)));
  killBrowserOf(folder);
  await first.context.close().catch(() => {});

  const second = await start();
  // A cookie of the session went with the browser.
  await signIn(second.page, "erik");
  await openSheet(second.page, id);
  await second.page.getByText("A text of yours is not in any revision").waitFor();
  await second.page.getByRole("button", { name: "Restore it" }).click();
  await expect.poll(() => shownText(second.page), PATIENT).toContain("let precious = 1 V# last");
  await second.context.close();
  rmSync(folder, { recursive: true, force: true });
});

/** Ends every process of the browser that has this folder as its profile, without a word. */
function killBrowserOf(folder: string): void {
  const list = execFileSync("ps", ["-eo", "pid,args"], { encoding: "utf8", maxBuffer: 2 ** 26 });
  const own = list.split("\n").filter((line) => line.includes(`--user-data-dir=${folder}`));
  expect(own.length).toBeGreaterThan(0);
  for (const line of own) {
    try {
      process.kill(Number.parseInt(line, 10), "SIGKILL");
    } catch {
      // It has ended with its parent.
    }
  }
}

test("two tabs of one person do not overwrite each other's drafts, and a third finds what each left", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("Two tabs"));
  await openSheet(page, id);
  const other = await page.context().newPage();
  await openSheet(other, id);
  await typeAtEnd(page, "let one = 1 V\n");
  await page.getByText("draft on revision 1").waitFor();
  await typeAtEnd(other, "let two = 2 V\n");
  await other.getByText("draft on revision 1").waitFor();
  const third = await page.context().newPage();
  await openSheet(third, id);
  await third.getByText(/^revision 1$/).waitFor();
  expect(await third.getByText("A text of yours is not in any revision").count()).toBe(0);
  await page.close();
  await other.close();
  await third.reload();
  const restore = third.getByRole("button", { name: "Restore it" });
  await restore.click();
  await expect.poll(() => shownText(third), PATIENT).toContain("let two = 2 V");
  await restore.click();
  await expect.poll(() => shownText(third), PATIENT).toContain("let one = 1 V");
});

test("a browser that keeps nothing more says so while there is something to lose", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("Full"));
  await page.addInitScript(() => {
    IDBObjectStore.prototype.put = () => {
      throw new DOMException("no room left", "QuotaExceededError");
    };
  });
  await openSheet(page, id);
  await typeAtEnd(page, "let mine = 1 V\n");
  await page.getByText("This browser keeps no draft").waitFor();
  await save(page);
  await page.getByText(/^revision 2$/).waitFor();
  await expect.poll(() => page.getByText("This browser keeps no draft").count(), PATIENT).toBe(0);
});

test("the unsaved draft has an address: compared with its revision while it is typed, and gone when it is saved", async () => {
  const page = await signedIn("erik");
  const id = await makeNetlist(page, converterText("Draft beside its revision"));
  await openSheet(page, id);
  const compared = await page.context().newPage();
  await compared.goto(`${new URL(page.url()).pathname}/compare/1..draft`);
  await compared.getByText("This browser keeps no draft of this netlist").waitFor();
  await expectAccessible(compared);
  await page.bringToFront();
  await typeAtEnd(page, "let late = 3 kΩ\n");
  const [opened] = await Promise.all([
    page.context().waitForEvent("page"),
    page.getByRole("link", { name: /what the draft changes/ }).click(),
  ]);
  await opened.getByText("Your draft", { exact: true }).first().waitFor();
  expect(new URL(opened.url()).pathname).toMatch(/\/compare\/1\.\.draft$/);
  await opened.getByRole("definition").filter({ hasText: "late added" }).waitFor();
  expect(await opened.getByText("let late = 3 kΩ").count()).toBe(1);
  await expectAccessible(opened);
  await opened.setViewportSize({ width: 360, height: 800 });
  await expectNoSidewaysScroll(opened);
  await picture(opened, "draft-compared-360");
  await page.bringToFront();
  await save(page);
  await opened.reload();
  await opened.getByText("This browser keeps no draft of this netlist").waitFor();
});
