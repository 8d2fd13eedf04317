import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  LOOKS,
  launchBrowser,
  look,
  openPage,
  openPageAs,
  picture,
  signIn,
  WORKSPACE,
} from "./harness";
import { DRAWN, queue, send, settled } from "./run-steps";

/** A log converter at three temperatures. Invented. */
const LOG = `title "Converter to compare (invented)"
knob V_in = 1 V
let R_in = 100 kΩ
model junction : npn { Is = 0.4 fA, beta_f = 240 }
model amp : opamp { gain = 1e6 }
ground -- VI : voltage V_in -- in
in -- R1 : resistor R_in -- s
Q1 : junction { c = s, b = ground, e = out }
A1 : amp { plus = ground, minus = s, out = out }
sweep V_in from 1 mV to 10 V, 5 per decade
sweep temperature over 10 °C, 25 °C, 40 °C
show out = out.v
read slope = per_decade(out)
require slope between -63 mV and -55 mV as "scale"
`;

let browser: Browser;
let page: Page;
let faults: string[];
let first: string;
let second: string;

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page, faults } = await openPage(browser));
  await signIn(page, "erik");
  const made = await queue(page, LOG);
  first = made.run;
  await settled(page, made.address);
  const text = LOG.replace("100 kΩ", "47 kΩ").replace("-63 mV and -55 mV", "-63 mV and -58 mV");
  const again = await send<{ id: string }>(page, "/api/v1/runs", { netlistId: made.id, base: 1, text });
  second = again.id;
  await settled(page, `/${WORKSPACE}/runs/${second}`);
});

afterAll(async () => {
  await browser.close();
});

const address = (...runs: readonly string[]) => `/${WORKSPACE}/runs/compare?runs=${runs.join(",")}`;

describe("choosing runs", () => {
  it("begins at the list, or at a run", async () => {
    await page.goto(`/${WORKSPACE}/runs?query=Converter to compare`);
    const boxes = page.getByRole("checkbox", { name: /Compare run \d+/ });
    await boxes.nth(0).check();
    await boxes.nth(1).check();
    await page.getByText("2 runs chosen").waitFor();
    await page.getByRole("link", { name: "Compare", exact: true }).click();
    await page.waitForURL(/compare\?runs=/);
    await expect.poll(() => page.locator("[data-compared]").count()).toBe(2);
    // A run stands beside the one before of its netlist at once; the first of all stands alone.
    await page.goto(`/${WORKSPACE}/runs/${second}`);
    await page.getByRole("link", { name: "Compare", exact: true }).click();
    await page.waitForURL((url) => url.searchParams.get("runs") === `${first},${second}`);
    await page.goto(`/${WORKSPACE}/runs/${first}`);
    await page.getByRole("link", { name: "Compare", exact: true }).click();
    await page.locator('[data-compared="A"]').waitFor();
    await page
      .getByRole("button", { name: /Add run/ })
      .first()
      .click();
    await page.locator('[data-compared="B"]').waitFor();
    await page.getByRole("button", { name: "Measure from run B" }).click();
    await page.waitForURL((url) => url.searchParams.get("runs")?.startsWith(second) === true);
    await page.getByRole("button", { name: "Leave out run A" }).click();
    await page.waitForURL((url) => url.searchParams.get("runs") === first);
  });

  it("says what to do where none is chosen, and shows the others where one is not there", async () => {
    await page.goto(`/${WORKSPACE}/runs/compare`);
    await page.getByText("Choose the runs to compare").waitFor();
    await page.goto(address(first, "00000000-0000-4000-8000-000000000000"));
    await page.getByText("1 run of the address could not be found").waitFor();
    await expect.poll(() => page.locator("[data-compared]").count()).toBe(1);
  });
});

describe("two runs", () => {
  it("lie over each other on one ruler, with values of each at the cursor", async () => {
    await page.goto(address(first, second));
    const figure = page.getByRole("figure", { name: "Curves of the runs" });
    await figure.locator(DRAWN).first().waitFor();
    const lines = figure.getByRole("table", { name: /Lines of the plot/ });
    expect(await lines.getByRole("row").count()).toBe(7);
    expect(await figure.locator("figcaption").textContent()).toMatch(
      /6 curves: out .*All 126 points are solved/,
    );
  });

  it("differ by what the resistor makes of it: V_T · ln(100/47) at each temperature", async () => {
    await page.goto(`${address(first, second)}&show=difference`);
    const figure = page.getByRole("figure", { name: "Differences from run A" });
    await figure.locator(DRAWN).first().waitFor();
    const cursor = page.getByRole("slider", { name: "Cursor along V_in" });
    await cursor.focus();
    await page.keyboard.press("Home");
    for (let step = 0; step < 10; step++) await page.keyboard.press("ArrowRight");
    const cell = figure.getByRole("row", { name: /B, 25/ }).getByRole("cell").last();
    // k · 298.15 K/q · ln(100/47) = 19.40 mV by the exact constants of the SI; a larger current lies lower.
    await expect.poll(() => cell.textContent()).toMatch(/−19\.[34]\d* ?\d*\u202fmV/);
  });

  it("are measured from one setting for all, where one asks for it", async () => {
    await page.goto(`${address(first)}&show=difference`);
    await page.getByLabel("Setting that is subtracted").selectOption({ index: 1 });
    await page.waitForURL(/origin=25/);
    const figure = page.getByRole("figure", { name: "Differences from run A" });
    await figure.locator(DRAWN).first().waitFor();
    const rows = await figure.getByRole("table").getByRole("row").allTextContents();
    expect(rows.filter((row) => /A, (10|40)/.test(row))).toHaveLength(2);
    expect(rows.filter((row) => /A, 25/.test(row))).toHaveLength(0);
  });

  it("stand side by side in verdicts, readings and what their texts say", async () => {
    await page.goto(address(first, second));
    const verdicts = page.getByRole("table", { name: /Requirements/ });
    await page.locator("#content").getByText(", one verdict differs").waitFor();
    expect(await verdicts.getByRole("row").nth(1).textContent()).toMatch(/holds.*broken/);
    const readings = page.getByRole("table", { name: /Readings/ });
    expect(await readings.getByRole("row").count()).toBe(4);
    expect(await readings.getByRole("row").nth(1).textContent()).toMatch(/slope, 10.*mV.*mV/);
    await page.getByText("100 kΩ became 47 kΩ").waitFor();
    expect(await page.getByRole("link", { name: "Line by line" }).getAttribute("href")).toMatch(
      /compare\/1\.\.2$/,
    );
  });

  it("of different sweeps say why they have no ruler in common", async () => {
    const other = await page.request.get(
      `/api/v1/runs?${new URLSearchParams({ workspace: WORKSPACE, query: "Diode log converter", status: "done", page: "1", size: "1" })}`,
    );
    const { rows } = await other.json();
    await page.goto(address(first, rows[0].id));
    await page.getByText("Run B sweeps I_in and run A V_in, so they have no ruler in common.").waitFor();
    await page
      .locator("#content")
      .getByText(/Of different netlists: \d+ differences/)
      .waitFor();
  });
});

describe("for everyone", () => {
  it.each(LOOKS)("keeps to WCAG 2.2 AA and its window, $colorScheme at $width px", async (one) => {
    const other = await openPageAs(browser, "vera");
    await look(other.page, one);
    for (const show of ["overlay", "difference"]) {
      await other.page.goto(`${address(first, second)}&show=${show}`);
      await other.page.locator(DRAWN).first().waitFor();
      await expectAccessible(other.page);
      await expectNoSidewaysScroll(other.page);
    }
    await picture(other.page, `compare-runs-${one.colorScheme}-${one.width}`);
    expect(other.faults).toEqual([]);
    await other.page.close();
  });

  it("raised no fault in the page over all these steps", () => {
    expect(faults).toEqual([]);
  });
});
