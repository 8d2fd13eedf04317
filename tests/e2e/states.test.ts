import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { expectAccessible, launchBrowser, openPage, signIn, WORKSPACE } from "./harness";
import { DRAWN, type Queued, queue } from "./run-steps";
import {
  converterText,
  expectChecked,
  makeNetlist,
  openSheet,
  PATIENT,
  post,
  typeAtEnd,
} from "./sheet-steps";
import { expectText } from "./text-steps";

let browser: Browser;
/** Erik's page, and one of Rosa's, who works beside him. */
let page: Page;
let rosa: Page;

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page } = await openPage(browser));
  ({ page: rosa } = await openPage(browser));
  await signIn(page, "erik");
  await signIn(rosa, "rosa");
});
afterAll(() => browser?.close());

const focused = () => page.evaluate(() => document.activeElement?.textContent ?? "");
/** Saves a revision as Rosa. */
const saveAsRosa = (id: string, base: number, text: string) =>
  post(rosa, `/api/v1/netlists/${id}/revisions`, { base, text });

describe("while something is on its way", () => {
  test("a page stands in its place from the first moment: its band does not move when it comes", async () => {
    let release: () => void = () => {};
    const held = new Promise<void>((resolve) => {
      release = resolve;
    });
    const isPage = (url: URL) => url.pathname.endsWith("/netlists") && url.searchParams.has("_rsc");
    await page.route(isPage, async (route) => {
      if (!("next-router-prefetch" in route.request().headers())) await held;
      await route.continue();
    });
    // What stands while the page is on its way comes ahead of it, in several answers.
    await page.goto(`/${WORKSPACE}`, { waitUntil: "networkidle" });
    await page.getByRole("navigation", { name: "Workspace" }).getByRole("link", { name: "Netlists" }).click();
    await page.getByRole("status").filter({ hasText: "Loading…" }).waitFor();
    const heading = page.getByRole("heading", { name: "Netlists", exact: true });
    const before = await heading.boundingBox();
    release();
    await page.getByRole("searchbox", { name: "Search netlists" }).waitFor();
    await page.unroute(isPage);
    const after = await heading.boundingBox();
    expect(Math.abs(after!.y - before!.y)).toBeLessThanOrEqual(4);
    expect(after!.x).toBe(before!.x);
  });

  test("a list that cannot be fetched says so, and is asked again", async () => {
    await page.goto(`/${WORKSPACE}/runs`);
    const asked = (url: URL) => url.pathname === "/api/v1/runs";
    await page.route(asked, (route) =>
      route.fulfill({ status: 503, json: { detail: "The database is away." } }),
    );
    await page.getByRole("searchbox", { name: "Search runs" }).fill("ratio");
    const failed = page.getByRole("alert").filter({ hasText: "The list could not be brought up to date" });
    await failed.getByText("The database is away.").waitFor();
    await page.unroute(asked);
    await failed.getByRole("button", { name: "Try again" }).click();
    await failed.waitFor({ state: "detached" });
    await page
      .getByRole("link", { name: /^Run \d+ of .*ratio/i })
      .first()
      .waitFor();
    await page.getByRole("searchbox", { name: "Search runs" }).fill("zzqx");
    await page.getByText("No run matches").waitFor();
  });
});

describe("undo instead of a question", () => {
  test("a netlist is archived without being asked, and comes back the same way", async () => {
    const title = "To be put away";
    await makeNetlist(page, converterText(title));
    await page.goto(`/${WORKSPACE}/netlists?query=${encodeURIComponent(title)}`);
    await page
      .getByRole("button", { name: `Archive ${title}` })
      .first()
      .click();
    await page.getByText(`“${title}” is archived`).waitFor();
    await expect.poll(focused, PATIENT).toBe("Undo");
    await page.keyboard.press("Enter");
    await page.getByText(`“${title}” is in the list again`).waitFor();
    await page.getByRole("link", { name: title }).first().waitFor();
    await page
      .getByRole("button", { name: `Archive ${title}` })
      .first()
      .click();
    await page.getByText(`“${title}” is archived`).waitFor();
    await page.getByLabel("Which netlists").selectOption("archived");
    await page.waitForURL(/which=archived/);
    await page
      .getByRole("button", { name: `Bring back ${title}` })
      .first()
      .waitFor();
    await expectAccessible(page);
    await page.getByRole("link", { name: title }).first().click();
    await page.getByText("This netlist is archived").waitFor();
    await page.getByRole("button", { name: "Bring it back" }).click();
    await page.getByText("This netlist is archived").waitFor({ state: "detached" });
  });

  test("a draft that was dropped is taken back", async () => {
    const id = await makeNetlist(page, converterText("Dropped draft"));
    await openSheet(page, id);
    await typeAtEnd(page, "let kept = 1 V\n");
    await page.getByText("draft on revision 1").waitFor();
    await page.reload();
    await page.getByRole("button", { name: "Drop it" }).click();
    await page.getByText("The text was dropped").waitFor();
    await expect.poll(focused, PATIENT).toBe("Undo");
    await page.keyboard.press("Enter");
    await page.getByRole("button", { name: "Restore it" }).click();
    await expectText(page, "let kept = 1 V");
  });

  test("where a run is cancelled, the button that queues it again has the focus", async () => {
    const run = await queue(page, converterText("Cancelled by key", 50_000));
    await page.goto(run.address);
    await page.locator("[data-run-status=running]").waitFor();
    await page.getByRole("button", { name: "Cancel run" }).press("Enter");
    await page.locator("[data-run-status=cancelled]").waitFor();
    await expect.poll(focused, PATIENT).toBe("Run again");
  });
});

describe("what others do meanwhile", () => {
  test("a sheet says that a newer revision was saved, and loads it, or brings both together", async () => {
    const text = converterText("Saved beside");
    const id = await makeNetlist(page, text);
    await openSheet(page, id);
    await expectChecked(page, "no problems");
    await saveAsRosa(id, 1, text.replace("10 kΩ", "20 kΩ"));
    const stale = page.locator("[data-stale=sheet]");
    await stale.getByText(/By Rosa Reviewer, .*upon revision 1\./).waitFor();
    await expectAccessible(page);
    await stale.getByRole("button", { name: "Load revision 2" }).click();
    await expectText(page, "R_load = 20 kΩ");
    await page.getByText(/^revision 2$/).waitFor();
    expect(await stale.count()).toBe(0);

    await typeAtEnd(page, "let mine = 1 V\n");
    await saveAsRosa(id, 2, text.replace("10 kΩ", "30 kΩ"));
    await stale.getByRole("button", { name: "Bring the two together" }).click();
    await page.getByRole("dialog", { name: "Revision 3 was saved meanwhile" }).waitFor();
    await page.keyboard.press("Escape");
  });

  test("the corner tells of what happened elsewhere: another's revision, one's own run; not of what the page shows", async () => {
    const text = converterText("Told in the corner");
    const run = await queue(page, text);
    await page.goto(run.address);
    await page.locator("[data-run-status=done]").waitFor();
    const corner = page.getByRole("region", { name: /^Notifications/ });
    expect(await corner.getByRole("listitem").count()).toBe(0);

    await page.goto(`/${WORKSPACE}/netlists/${run.id}/revisions`);
    // News is what comes after the first answer.
    await page.waitForResponse((response) => response.url().includes("/api/v1/news"));
    const again = await post(page, "/api/v1/runs", { netlistId: run.id, base: 1 });
    const { number } = await again.json();
    await saveAsRosa(run.id, 1, text.replace("10 kΩ", "20 kΩ"));
    await corner.getByText("Rosa Reviewer saved revision 2").waitFor();
    await corner.getByText(`Run ${number} is done`).waitFor();
    await expectAccessible(page);
    await corner.getByRole("link", { name: "See what changed" }).click();
    await page.waitForURL(/\/compare\/1\.\.2$/);
  });
});

describe("an address copied to another browser shows the same picture", () => {
  let run: Queued;
  let other: Page;
  beforeAll(async () => {
    const text = `${converterText("Same picture")}show into = D1.i\nsweep temperature over 10 °C, 25 °C, 40 °C\n`;
    run = await queue(page, text);
    await page.goto(run.address);
    await page.locator("[data-run-status=done]").waitFor();
    const { page: opened } = await openPage(browser, { storageState: await page.context().storageState() });
    other = opened;
  });

  /** Opens the present address in the other browser; both plots as they are drawn. */
  async function pictures(): Promise<[Buffer, Buffer]> {
    await other.goto(page.url());
    const both: Buffer[] = [];
    for (const one of [page, other]) {
      await one.mouse.move(0, 0);
      await one.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
      await one.locator(DRAWN).first().waitFor();
      // The plot with its ruler and marks; the way back to the view before is of one browser alone.
      const plot = one.locator("figure > div").filter({ has: one.locator(DRAWN) });
      await plot.scrollIntoViewIfNeeded();
      both.push(await plot.screenshot({ animations: "disabled" }));
    }
    return [both[0]!, both[1]!];
  }

  test("a run: its part in view, cursor, hidden trace, isolated setting and the account of a point", async () => {
    const cursor = page.getByRole("slider", { name: "Cursor along I_in" });
    await cursor.focus();
    await page.keyboard.press("Home");
    await page.keyboard.press("Shift+ArrowRight");
    await page.keyboard.press("Enter");
    await page.waitForURL(/point=10/);
    await page.keyboard.press("+");
    await page.waitForURL(/from=/);
    await page.getByRole("checkbox", { name: /^into/ }).uncheck();
    await page
      .getByRole("button", { name: /^Only / })
      .last()
      .click();
    await page.waitForURL(/only-setting=2/);
    await page.locator('[data-point="10"]').waitFor();
    const [here, there] = await pictures();
    expect(there.equals(here)).toBe(true);
    const account = (one: Page) => one.locator('[data-point="10"]').textContent();
    await other.locator('[data-point="10"]').waitFor();
    expect(await account(other)).toBe(await account(page));
  });

  test("a sheet: the setting of the preview and what stands beside the text", async () => {
    await openSheet(page, run.id);
    const setting = (one: Page) => one.getByRole("combobox", { name: "temperature" });
    await setting(page).selectOption({ index: 2 });
    await page.waitForURL(/knob=temperature/);
    await other.goto(page.url());
    await expect
      .poll(() => setting(other).evaluate((one) => (one as HTMLSelectElement).selectedIndex), PATIENT)
      .toBe(2);
    await page.getByRole("tab", { name: "Connections" }).click();
    await page.waitForURL(/beside=connections/);
    await other.goto(page.url());
    await other.getByRole("tab", { name: "Connections", selected: true }).waitFor();
  });

  test("a comparison: its runs, how they are compared, and what is hidden", async () => {
    const second = await post(page, "/api/v1/runs", { netlistId: run.id, base: 1 });
    const { id } = await second.json();
    await page.goto(`/${WORKSPACE}/runs/${id}`);
    await page.locator("[data-run-status=done]").waitFor();
    await page.goto(`/${WORKSPACE}/runs/compare?runs=${run.run},${id}`);
    await page.getByRole("tab", { name: "Difference" }).click();
    await page.waitForURL(/show=difference/);
    await page.locator(DRAWN).first().waitFor();
    const lines = page.getByRole("region", { name: "Lines of the plot" });
    await lines.getByRole("checkbox").first().uncheck();
    await page.waitForURL(/(trace|settings)=/);
    const [here, there] = await pictures();
    expect(there.equals(here)).toBe(true);
  });
});
