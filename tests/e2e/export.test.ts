import { readFileSync } from "node:fs";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { decodeColumns } from "@/lib/analyses/columns-document";
import type { RunDocument } from "@/lib/analyses/result";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  LOOKS,
  launchBrowser,
  look,
  openPage,
  picture,
  signIn,
  WORKSPACE,
} from "./harness";
import { DRAWN, settled, startRun } from "./run-steps";

/** Invented. */
const TEXT = `title "Diode with a spread source (invented)"
knob I_in = 1 µA
model jn : diode { Is = 2 fA }
let R_load = 10 MΩ ± 2 %
ground -- IS : current I_in -- a
a -- D : jn -- ground
a -- R : resistor R_load -- ground
sweep I_in from 10 nA to 1 mA, 4 per decade
sweep temperature over 15 °C, 35 °C
draws 12 seed 3
show v = a.v
read bend = per_decade(v)
require v >= 0.2 V as "sign"
require v <= 0.5 V as "ceiling"
`;

let browser: Browser;
let page: Page;
let faults: string[];
let address: string;
let document: RunDocument;

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page, faults } = await openPage(browser));
  await signIn(page, "erik");
  address = await startRun(page, TEXT);
  await settled(page, address);
  document = await (await page.request.get(`/api/v1/runs/${address.split("/").at(-1)}`)).json();
});

afterAll(async () => {
  await browser.close();
});

/** What the menu saves: its name and its bytes. */
async function saved(item: string): Promise<{ readonly name: string; readonly bytes: Buffer }> {
  await page.getByRole("button", { name: "Export", exact: true }).click();
  const [download] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("menuitem", { name: item }).click(),
  ]);
  return { name: download.suggestedFilename(), bytes: readFileSync(await download.path()) };
}

const NAME = /^diode-with-a-spread-source-invented-netlist-\d+-run-\d+\./;

describe("the export menu of a run", () => {
  beforeAll(async () => {
    await page.goto(address);
    await page.locator(DRAWN).waitFor();
  });

  it("saves the points, the document and the columns, with the numbers of the run", async () => {
    const csv = await saved("Points as CSV");
    expect(csv.name).toMatch(NAME);
    const lines = csv.bytes.toString("utf8").trimEnd().split("\r\n");
    expect(lines[0]).toBe("point,draw,I_in [A],temperature [K],v [V],outcome,bound [V]");
    expect(lines.slice(1).map((line) => Number(line.split(",")[4]))).toEqual(document.traces[0]!.values);
    const json = await saved("Run document as JSON");
    expect(json.name).toMatch(/-run-\d+\.json$/);
    expect(JSON.parse(json.bytes.toString("utf8"))).toEqual(document);
    const { bytes } = await saved("Columns as binary numbers");
    const columns = decodeColumns(Uint8Array.from(bytes).buffer);
    expect([...columns.traces[0]!.values]).toEqual(document.traces[0]!.values);
  });

  it("saves the plot as it is seen, as a drawing and as a picture", async () => {
    const svg = (await saved("Drawing as SVG, light")).bytes.toString("utf8");
    const parsed = await page.evaluate((text) => {
      const root = new DOMParser().parseFromString(text, "image/svg+xml").documentElement;
      return [root.nodeName, root.querySelectorAll("path").length > 4] as const;
    }, svg);
    expect(parsed).toEqual(["svg", true]);
    expect(svg).toContain("Diode with a spread source (invented)");
    const png = await saved("Picture as PNG, dark");
    expect(png.name).toMatch(/\.png$/);
    expect(png.bytes.subarray(1, 4).toString()).toBe("PNG");
    expect(png.bytes.readUInt32BE(16)).toBe(2 * 960);
    await page.goto(`${address}?from=1e-6&to=1e-5`);
    await page.locator(DRAWN).waitFor();
    const zoomed = (await saved("Drawing as SVG, light")).bytes.toString("utf8");
    expect(svg).toContain(">10\u202fnA<");
    expect(zoomed).not.toContain(">10\u202fnA<");
  });
});

describe("the printed report", () => {
  it("has what was run, what was required and where it comes from, and becomes a tagged PDF", async () => {
    await page.goto(address);
    await page.getByRole("link", { name: "Report", exact: true }).click();
    await page.getByRole("heading", { level: 1, name: /Diode with a spread/ }).waitFor();
    const words = await page.locator("article").textContent();
    expect(words).toContain("Verdict: broken.");
    expect(words).toContain('require v <= 0.5 V as "ceiling"');
    expect(words).toMatch(/saved by .+ on \d{4}-\d\d-\d\d/);
    expect(words).toMatch(/[0-9a-f]{64}/);
    expect(words).toMatch(/in 12 random draws of the tolerances/);
    for (const one of LOOKS) {
      await look(page, one);
      expect(await page.locator("[data-figure]:visible").getAttribute("data-figure")).toBe(one.colorScheme);
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
      await picture(page, `report-${one.colorScheme}-${one.width}`);
    }
    for (const format of ["A4", "Letter"]) {
      const pdf = (await page.pdf({ tagged: true, format, preferCSSPageSize: false })).toString("latin1");
      expect(pdf.startsWith("%PDF-")).toBe(true);
      expect(pdf).toContain("/StructTreeRoot");
      for (const tag of ["H1", "H2", "Table", "TH", "Caption", "Figure"]) {
        expect(pdf, `${format}: ${tag}`).toMatch(new RegExp(`/S /${tag}\\b`));
      }
    }
  });

  it("is printed on white paper from a dark screen too, its lines told apart without colour", async () => {
    await look(page, { colorScheme: "dark", width: 1024 });
    await page.emulateMedia({ media: "print" });
    const figure = page.locator("[data-figure]:visible");
    expect(await figure.getAttribute("data-figure")).toBe("light");
    const paper = () =>
      page.evaluate(() => getComputedStyle(window.document.documentElement).backgroundColor);
    expect(await paper()).toBe("rgb(255, 255, 255)");
    const dashes = await figure
      .locator("path[stroke-width='1.75']")
      .evaluateAll((lines) => lines.map((line) => line.getAttribute("stroke-dasharray") ?? "whole"));
    expect(new Set(dashes.slice(0, 2)).size).toBe(2);
    await picture(page, "report-printed");
    await page.emulateMedia({ media: "screen", colorScheme: "light" });
  });

  it.each([
    { query: "Reversed input", has: "Failed points", says: /10 points failed/ },
    { query: "Trigger of two transistors", has: "Operating points", says: /3 branches/ },
  ])("tells of $query what a plain run does not have, accessibly", async ({ query, has, says }) => {
    const search = new URLSearchParams({ workspace: WORKSPACE, query, status: "done", page: "1", size: "1" });
    const { rows } = await (await page.request.get(`/api/v1/runs?${search}`)).json();
    await page.goto(`/${WORKSPACE}/runs/${rows[0].id}/report`);
    await page.getByRole("heading", { level: 2, name: has }).waitFor();
    expect(await page.locator("article").textContent()).toMatch(says);
    await expectAccessible(page);
    const pdf = (await page.pdf({ tagged: true, format: "A4" })).toString("latin1");
    expect(pdf).toContain("/StructTreeRoot");
  });

  it("raised no fault in the page over all these steps", () => {
    expect(faults).toEqual([]);
  });
});
