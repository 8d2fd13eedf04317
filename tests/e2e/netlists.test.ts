import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  look,
  openPage,
  openPageAs,
  signIn,
  WORKSPACE,
} from "./harness";

const LIST = `/${WORKSPACE}/netlists`;

/** A netlist that runs; invented. */
const text = (title: string) => `title "${title}"
knob I_in = 1 µA
model junction : diode { Is = 2 fA }
ground -- I1 : current I_in -- a
a -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 5 per decade
show v = a.v
`;

const file = (name: string, content: string) => ({
  name,
  mimeType: "text/plain",
  buffer: Buffer.from(content, "utf8"),
});

/** Titles of this run of the tests alone, so that a second run against the same service finds its own. */
const MARK = `Paged ${Date.now().toString(36)}`;

let browser: Browser;
let page: Page;
let faults: string[];

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page, faults } = await openPage(browser));
  await signIn(page, "erik");
});
afterAll(() => browser.close());

/** The titles on the present page of the table, from the top. */
const titles = () => page.locator("tbody a[href*='/netlists/']").allTextContents();

describe("the table of netlists", () => {
  it("finds by words of the title, says when nothing matches, and keeps the search in the address", async () => {
    await page.goto(LIST);
    await page.getByRole("searchbox", { name: "Search netlists" }).fill("square-root");
    await page.waitForURL("**/netlists?query=square-root");
    await page.getByRole("main").getByText("1 found").waitFor();
    expect(await titles()).toEqual(["Square-root extractor"]);
    await page.reload();
    await page.getByRole("main").getByText("1 found").waitFor();
    await page.getByRole("searchbox", { name: "Search netlists" }).fill("no such circuit");
    await page.getByText("No netlist matches “no such circuit”").waitFor();
    await page.getByRole("button", { name: "Show all netlists" }).click();
    await page.getByRole("main").getByText("in this workspace").waitFor();
    expect((await titles()).length).toBeGreaterThan(6);
  });

  it("sorts both ways by the keyboard and says so to a screen reader", async () => {
    await page.goto(`${LIST}?query=one-quadrant`);
    await page.getByRole("main").getByText("2 found").waitFor();
    const sort = page.getByRole("button", { name: "Title" });
    await sort.focus();
    await page.keyboard.press("Enter");
    await page
      .getByRole("columnheader", { name: "Title" })
      .and(page.locator("[aria-sort=ascending]"))
      .waitFor();
    await expect.poll(titles).toEqual(["One-quadrant divider", "One-quadrant multiplier"]);
    await page.keyboard.press("Enter");
    await page
      .getByRole("columnheader", { name: "Title" })
      .and(page.locator("[aria-sort=descending]"))
      .waitFor();
    await expect.poll(titles).toEqual(["One-quadrant multiplier", "One-quadrant divider"]);
  });

  it("makes a netlist that runs as it stands", async () => {
    await page.goto(LIST);
    await page.getByRole("button", { name: "New netlist" }).click();
    await page.getByRole("button", { name: "Make netlist" }).click();
    await page.getByText("Give the netlist a title").waitFor();
    await page.getByLabel("Title").fill("Made by hand");
    await page.getByLabel("Title").press("Enter");
    await page.waitForURL("**/netlists/*-*");
    await page.getByRole("heading", { name: "Made by hand" }).waitFor();
    await page.getByText("no problems").waitFor();
  });

  it("takes files by choice, and says for each what became of it", async () => {
    await page.goto(LIST);
    const chooser = page.waitForEvent("filechooser");
    await page.getByRole("button", { name: "Upload .swn files" }).click();
    await (await chooser).setFiles([
      file("chosen.swn", text("Chosen from the disk")),
      file("broken.swn", 'title "Half written"\nshow x = nowhere.v\n'),
      file("binary.swn", "\u0000\u0001\u0002".repeat(100)),
    ]);
    const report = page.getByRole("region", { name: "Upload" });
    await report.getByText("2 of 3 added, 1 refused").waitFor();
    await report.getByText(/binary\.swn refused: ./).waitFor();
    // A text with mistakes is a netlist that one mends in the sheet.
    await report.getByRole("link", { name: "broken.swn" }).waitFor();
    await page.getByRole("link", { name: "Chosen from the disk" }).waitFor();
  });

  it("takes files that are dropped on it", async () => {
    await page.goto(LIST);
    await page.getByRole("searchbox").waitFor();
    const dropped = await page.evaluateHandle((content) => {
      const transfer = new DataTransfer();
      transfer.items.add(new File([content], "dropped.swn", { type: "text/plain" }));
      return transfer;
    }, text("Dropped on the page"));
    // Nothing answers a file held over the page until its program has started.
    await expect
      .poll(
        async () => {
          await page.getByRole("searchbox").dispatchEvent("dragover", { dataTransfer: dropped });
          return page.getByText("Drop .swn files to add them").isVisible();
        },
        { timeout: 20_000 },
      )
      .toBe(true);
    await page.getByRole("searchbox").dispatchEvent("drop", { dataTransfer: dropped });
    await page.getByText("1 of 1 added").waitFor();
    await page.getByRole("link", { name: "Dropped on the page" }).waitFor();
  });

  it("pages through many netlists", async () => {
    await page.evaluate(
      async ([workspace, texts]) => {
        for (const one of texts) {
          const body = JSON.stringify({ workspace, text: one });
          const headers = { "content-type": "application/json" };
          const answer = await fetch("/api/v1/netlists", { method: "POST", headers, body });
          if (!answer.ok) throw new Error(await answer.text());
        }
      },
      [
        WORKSPACE,
        Array.from({ length: 30 }, (_, n) => text(`${MARK} ${String(n).padStart(2, "0")}`)),
      ] as const,
    );
    await page.goto(`${LIST}?query=${encodeURIComponent(MARK)}&sort=title&direction=asc`);
    await page.getByRole("main").getByText("30 found").waitFor();
    const first = await titles();
    await page.getByRole("button", { name: /Next/ }).click();
    await page.waitForURL(/page=2/);
    await expect.poll(async () => (await titles()).includes(first[0]!)).toBe(false);
    const second = await titles();
    expect(first.length + second.length).toBe(30);
  });

  it("lets a viewer read and not write", async () => {
    const viewer = await openPage(browser);
    await signIn(viewer.page, "vera");
    await viewer.page.goto(LIST);
    await viewer.page.getByRole("main").getByText("You read this workspace as a viewer").waitFor();
    expect(await viewer.page.getByRole("button", { name: "New netlist" }).count()).toBe(0);
    const status = await viewer.page.evaluate(async (workspace) => {
      const body = JSON.stringify({ workspace, text: 'title "Not allowed"' });
      const headers = { "content-type": "application/json" };
      return (await fetch("/api/v1/netlists", { method: "POST", headers, body })).status;
    }, WORKSPACE);
    expect(status).toBe(403);
    await viewer.page.context().close();
  });

  for (const colorScheme of ["light", "dark"] as const) {
    it(`passes axe and fits a phone, ${colorScheme}`, async () => {
      const phone = await openPageAs(browser, "erik");
      await look(phone.page, { colorScheme, width: 360 });
      await phone.page.goto(LIST);
      await phone.page.getByRole("table").waitFor();
      await expectAccessible(phone.page);
      await expectNoSidewaysScroll(phone.page);
      await phone.page.getByRole("button", { name: "New netlist" }).click();
      await phone.page.getByRole("dialog").waitFor();
      await expectAccessible(phone.page);
      await phone.page.close();
    });
  }

  it("throws nothing and logs no error", () => {
    // The browser itself logs the answers that were asked for as refused.
    expect(faults.filter((fault) => !fault.startsWith("Failed to load resource"))).toEqual([]);
  });
});
