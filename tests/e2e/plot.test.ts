import type { Browser, Locator, Page } from "playwright-core";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  openPage,
  picture,
  signIn,
  WORKSPACE,
} from "./harness";
import { DRAWN, settled, startRun } from "./run-steps";

/** A divider of two resistors over sixty temperatures; invented. */
const SIXTY = `title "Sixty settings of a divider (invented)"
knob V_in = 1 V
ground -- V1 : voltage V_in -- in
in -- R1 : resistor 1 kΩ { drift = 2000 ppm/K } -- out
out -- R2 : resistor 1 kΩ -- ground
sweep V_in from 1 V to 10 V, 31 points
sweep temperature from 0 °C to 118 °C, step 2 K
show out = out.v
`;

let browser: Browser;
let page: Page;
let faults: string[];

/** Address of the newest finished run of the netlist with exactly that title. */
async function runOf(title: string): Promise<string> {
  const search = new URLSearchParams({
    workspace: WORKSPACE,
    query: title,
    status: "done",
    page: "1",
    size: "100",
  });
  const { rows } = await (await page.request.get(`/api/v1/runs?${search}`)).json();
  // The newest comes first; other tests may have queued changed texts of the same title since.
  const found = rows.findLast((row: { title: string }) => row.title === title);
  return `/${WORKSPACE}/runs/${found.id}`;
}

async function open(address: string): Promise<Locator> {
  await page.goto(address);
  const figure = page.getByRole("figure", { name: /^Curves of/ });
  await figure.locator(DRAWN).first().waitFor();
  return figure;
}

/** The part of the sweep that the address names. */
function zoomed(): { from: number; to: number } | null {
  const { searchParams } = new URL(page.url());
  const [from, to] = [searchParams.get("from"), searchParams.get("to")];
  return from === null || to === null ? null : { from: Number(from), to: Number(to) };
}

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page, faults } = await openPage(browser));
  await signIn(page, "erik");
});

beforeEach(async () => {
  faults.length = 0;
});

afterAll(async () => {
  await browser.close();
});

describe("the storeys of a run with draws", () => {
  it("show the trace above and its deviation below, the band of the draws, the worst draw, and what is allowed", async () => {
    const figure = await open(await runOf("Absorbance head"));
    expect(await figure.locator("[data-storey]").count()).toBe(2);
    await figure.locator('[data-bands="3"]').nth(1).waitFor();
    expect(await figure.locator('[data-worst="3"]').count()).toBe(2);
    expect(await figure.locator('[data-allowed="1"]').count()).toBeGreaterThan(0);
    await figure.getByLabel(/band: 5 to 95/).uncheck();
    await page.waitForURL(/band=off/);
    await figure.locator('[data-bands="0"]').nth(1).waitFor();
    await figure.getByLabel(/worst draw of/).selectOption("");
    await page.waitForURL(/worst=/);
    await figure.locator('[data-worst="0"]').nth(1).waitFor();
    await page.reload();
    await figure.locator('[data-bands="0"][data-worst="0"]').nth(1).waitFor();
    expect(faults).toEqual([]);
  });

  it("say at the cursor what the draws do there", async () => {
    const figure = await open(await runOf("Absorbance head"));
    await figure.locator('[data-bands="3"]').nth(1).waitFor();
    await figure.getByRole("slider").focus();
    await page.keyboard.press("ArrowRight");
    await figure
      .getByText(/^draws .* to /)
      .first()
      .waitFor();
    await figure
      .getByText(/^worst draw /)
      .first()
      .waitFor();
  });
});

describe("the part of the sweep in view", () => {
  it("is chosen by dragging, gone back over, and brought closer and along by keys", async () => {
    const figure = await open(await runOf("Diode log converter"));
    const slider = figure.getByRole("slider");
    const box = (await slider.boundingBox())!;
    await page.mouse.move(box.x + box.width * 0.3, box.y + 60);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width * 0.6, box.y + 60, { steps: 4 });
    await page.mouse.up();
    await page.waitForURL(/from=/);
    const dragged = zoomed()!;
    expect(dragged.from).toBeGreaterThan(1e-9);
    expect(dragged.to).toBeLessThan(1e-2);
    await slider.focus();
    await page.keyboard.press("+");
    await expect.poll(() => zoomed()?.to).not.toBe(dragged.to);
    const closer = zoomed()!;
    expect(closer.to / closer.from).toBeLessThan(dragged.to / dragged.from);
    await page.keyboard.press(".");
    await expect.poll(() => zoomed()?.from).not.toBe(closer.from);
    expect(zoomed()!.from).toBeGreaterThan(closer.from);
    await page.keyboard.press("Backspace");
    await expect.poll(zoomed).toEqual(closer);
    await figure.getByRole("button", { name: "Back" }).click();
    await expect.poll(zoomed).toEqual(dragged);
    await slider.focus();
    await page.keyboard.press("0");
    await expect.poll(zoomed).toBeNull();
  });

  it("lies between two marks set by a key, and is widened and moved by buttons", async () => {
    const figure = await open(await runOf("Diode log converter"));
    await figure.getByRole("slider").focus();
    for (const key of ["Home", "PageUp", "z", "PageUp", "PageUp", "z"]) await page.keyboard.press(key);
    await page.waitForURL(/from=/);
    // Ten points from 1 nA and thirty, of twenty a decade.
    const { from, to } = zoomed()!;
    expect(from / 10 ** -8.5).toBeCloseTo(1, 3);
    expect(to / 10 ** -7.5).toBeCloseTo(1, 3);
    await figure.getByRole("button", { name: "Wider" }).click();
    await expect.poll(() => zoomed()!.to).toBeGreaterThan(to);
    const wide = zoomed()!;
    await figure.getByRole("button", { name: "Move the view right" }).click();
    await expect.poll(() => zoomed()!.from).toBeGreaterThan(wide.from);
    await figure.getByRole("button", { name: "Whole sweep" }).click();
    await expect.poll(zoomed).toBeNull();
  });

  it("slides with the ruler", async () => {
    const figure = await open(`${await runOf("Diode log converter")}?from=1e-7&to=1e-5`);
    const ruler = figure.locator("[data-ruler]");
    await ruler.scrollIntoViewIfNeeded();
    const box = (await ruler.boundingBox())!;
    await page.mouse.move(box.x + box.width / 2, box.y + 20);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width, box.y + 20, { steps: 5 });
    await page.mouse.up();
    await expect.poll(() => zoomed()!.from).toBeLessThan(2e-8);
    expect(zoomed()!.to / zoomed()!.from / 100).toBeCloseTo(1, 2);
  });
});

describe("the lines of the plot", () => {
  it("are hidden, seen alone, and all again, and the address keeps it", async () => {
    const figure = await open(await runOf("One-quadrant multiplier"));
    await figure.getByRole("checkbox", { name: /^error/ }).uncheck();
    await expect.poll(() => figure.locator("[data-storey]").count()).toBe(1);
    await page.waitForURL(/trace=product/);
    const only = figure.getByRole("button", { name: /^Only V_y 100/ });
    await only.click();
    await page.waitForURL(/only-setting=1/);
    expect(await only.getAttribute("aria-pressed")).toBe("true");
    await figure.getByText(/at 1 of 4 settings of V_y/).waitFor();
    await page.reload();
    await figure.getByText(/at 1 of 4 settings of V_y/).waitFor();
    await only.focus();
    await page.keyboard.press("Enter");
    await figure.getByText(/at 4 settings of V_y/).waitFor();
    await figure.getByRole("checkbox", { name: /^error/ }).check();
    await expect.poll(() => figure.locator("[data-storey]").count()).toBe(2);
  });

  it("of sixty settings are drawn on demand, named as far as there is room, and followed where they are pointed at", async () => {
    await settled(page, await startRun(page, SIXTY));
    const figure = await open(page.url());
    await figure.getByRole("button", { name: "Draw all 60" }).click();
    await figure.getByText(/at 60 settings of temperature/).waitFor();
    const labels = figure.locator("[data-family]");
    expect(await labels.count()).toBeLessThan(30);
    await figure.getByLabel("Find a setting").fill("62 °C");
    const row = figure.getByRole("row", { name: /^62/ });
    await row.getByRole("checkbox").focus();
    await figure.locator('[data-family="31"]').waitFor();
    await figure.locator('[data-family="0"].opacity-50').first().waitFor();
  });
});

describe("failed points", () => {
  it("are marked where they are, and say why at the cursor, aloud and in the table", async () => {
    const figure = await open(await runOf("Reversed input (a warning)"));
    await figure.getByText("failed", { exact: true }).first().waitFor();
    await figure.getByRole("slider").focus();
    await page.keyboard.press("Home");
    const spoken = page.locator("[aria-live=polite][data-spoken]");
    await expect.poll(() => spoken.textContent()).toMatch(/failed: .+ would not settle/);
    await page.getByRole("tab", { name: "Table of numbers" }).click();
    await page.getByLabel(/Failed points only/).check();
    await page
      .getByRole("cell", { name: /^failed: .+ would not settle$/ })
      .first()
      .waitFor();
  });
});

describe("the plot, whoever looks at it", () => {
  it.each([
    ["light", 360],
    ["dark", 360],
    ["light", 1024],
    ["dark", 1024],
    ["light", 1920],
    ["dark", 1920],
  ] as const)("is accessible and fits in %s at %i px", async (colorScheme, width) => {
    await page.emulateMedia({ colorScheme });
    await page.setViewportSize({ width, height: 900 });
    const figure = await open(await runOf("Absorbance head"));
    await figure.locator('[data-bands="3"]').nth(1).waitFor();
    await figure.getByRole("slider").focus();
    await page.keyboard.press("ArrowRight");
    await expectNoSidewaysScroll(page);
    await picture(page, `plot-${colorScheme}-${width}`);
    // Colours differ by theme, and sizes by width: two of the six have both.
    if (["light 360", "dark 1024"].includes(`${colorScheme} ${width}`)) await expectAccessible(page);
  });
});
