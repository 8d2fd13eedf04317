import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
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
import { DRAWN, queue, send, settled, startRun } from "./run-steps";

/** A head whose zero and scale its parts cannot hold in every draw. Invented. */
const HEAD = `title "Head with wide parts (invented)"
knob I_sample = 1 µA
let R_sum = 20 kΩ ± 1 %
model array : npn { Is = 0.4 fA, beta_f = 240, Va_f = 80 V, R_emitter = 0.6 Ω }
model amp : opamp { gain = 2e6, offset = 0 V ± 600 µV, bias = 20 pA }
ground -- IS : current I_sample -- s
Q : array { c = s, b = ground, e = ls }
A : amp { plus = ground, minus = s, out = ls }
ls -- R1 : resistor R_sum -- m -- R2 : resistor R_sum -- out
AD : amp { plus = ground, minus = m, out = out }
sweep I_sample from 1 nA to 100 µA, 5 per decade
sweep temperature over 10 °C, 25 °C, 40 °C
draws 60 seed 5
show out = out.v
read scale = per_decade(out)
read bend = deviation(out)
require bend between -10 mV and 10 mV as "log conformance"
require scale within V_T * ln(10) ± 0.8 % as "scale"
require out >= 100 mV as "sign"
`;

let browser: Browser;
let page: Page;
let faults: string[];
let address: string;

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page, faults } = await openPage(browser));
  await signIn(page, "erik");
  address = await startRun(page, HEAD);
  await settled(page, address);
});

afterAll(async () => {
  await browser.close();
});

/** The account of the requirement of that name. */
const requirement = (name: string) => page.locator("[data-requirement]").filter({ hasText: name });

describe("what the netlist requires", () => {
  it("is told when the run has been judged, to one who has watched it from the beginning", async () => {
    await page.goto(await startRun(page, HEAD.replace("draws 60", "draws 200")));
    await page.locator("[data-run-status=done]").filter({ hasText: "broken" }).waitFor();
    await page.getByLabel("Value whose spread is shown").selectOption({ label: "scale" });
    const budget = page.getByRole("list", { name: "Parts by their share of the variance" });
    await budget.getByRole("listitem").first().waitFor();
  });

  it("stands with the broken first, each with its bar, its worst value and its limits", async () => {
    await page.goto(address);
    await page.getByRole("heading", { name: /One requirement is broken · 2 hold/ }).waitFor();
    const order = await page
      .locator("[data-requirement]")
      .evaluateAll((all) => all.map((one) => one.getAttribute("data-requirement")));
    expect(order).toEqual(["broken", "holds", "holds"]);
    expect(await requirement("scale").textContent()).toMatch(
      /scale is broken; worst value .+ at temperature .+, draw \d+; allowed .+; missed by .+of 60 draws hold/,
    );
    expect(await requirement("scale").locator("svg[data-verdict=broken]").count()).toBe(1);
    expect(await page.getByText(/60 draws and nominal × 3 temperatures × 26 points/).textContent()).toMatch(
      /revision 1 · run \d+ · .+, 4\u202f758 solved and proved in/,
    );
  });

  it("leads to its worst place: that point in full, and that draw on the plot", async () => {
    await page.goto(address);
    await page.getByRole("button", { name: /Show the worst place of scale/ }).click();
    await page.waitForURL(/point=\d+.*worst=scale/);
    const account = page.locator("[data-point]");
    await account.waitFor();
    expect(await account.textContent()).toMatch(/draw[1-9]\d*.*outcome.*solved/);
    await page.getByRole("button", { name: /Show the worst place of log conformance/ }).click();
    await page.waitForURL(/worst=log/);
  });

  it("leads to its line in the text of the revision", async () => {
    await page.goto(address);
    const link = page.getByRole("link", { name: /Line 18 of the netlist, where scale stands/ });
    expect(await link.getAttribute("href")).toMatch(/\/netlists\/[0-9a-f-]+\/revisions\/1#L18$/);
    await link.click();
    const line = page.locator("#L18[data-asked]");
    await line.waitFor();
    expect(await line.textContent()).toContain("require scale within");
  });
});

describe("what the tolerances do", () => {
  it("names the part to improve with its line, and the worst case beside", async () => {
    await page.goto(address);
    const spread = page.locator("[data-subject]");
    await spread.waitFor();
    await spread.getByLabel("Value whose spread is shown").selectOption({ label: "scale" });
    const budget = spread.getByRole("list", { name: "Parts by their share of the variance" });
    await budget.getByRole("listitem").first().waitFor();
    // Both resistors of the one sum are as wide, and the slope depends on their ratio alone.
    expect(await spread.textContent()).toMatch(/R[12] R_sum, R[12] R_sum cost the same, and the most/);
    const line = budget.getByRole("link", { name: /R1 R_sum, line 3 of the netlist/ });
    expect(await line.getAttribute("href")).toMatch(/revisions\/1#L3$/);
    const sheet = spread.getByRole("link", { name: /Go to R[12] R_sum in the sheet/ });
    expect(await sheet.getAttribute("href")).toMatch(/netlists\/[0-9a-f-]+#L3$/);
    expect(await spread.textContent()).toMatch(/worst case, every tolerance at its end.+ to .+mV/);
  });

  it("shows a reading over the draws with its limits, exact counts by the arrow keys, and the same as a table", async () => {
    await page.goto(`${address}?spread=read:scale&spread-at=2`);
    const bars = page.getByRole("slider", { name: "Bars of scale over the draws" });
    await bars.focus();
    await page.keyboard.press("Home");
    const first = await bars.getAttribute("aria-valuetext");
    expect(first).toMatch(/^\d+ draws? at .+ to .+mV/);
    await page.keyboard.press("ArrowRight");
    expect(await bars.getAttribute("aria-valuetext")).not.toBe(first);
    await page.getByText("Counts as a table").click();
    const counts = await page
      .getByRole("table", { name: "scale over the draws, by bars" })
      .locator("tbody td:nth-child(3)")
      .allTextContents();
    expect(counts.map(Number).reduce((sum, one) => sum + one, 0)).toBe(60);
    expect(counts).toHaveLength(Number(await bars.getAttribute("data-histogram")));
    await page.locator("[data-subject='read:scale']").getByLabel("Setting").selectOption({ index: 0 });
    await page.waitForURL(/spread=read%3Ascale&spread-at=0/);
  });
});

describe("the cursor and the address", () => {
  it("shows the proof and the solver's account of the point under the cursor before anything is chosen", async () => {
    await page.goto(address);
    await page.locator(DRAWN).first().waitFor();
    await page.getByRole("slider", { name: "Cursor along I_sample" }).focus();
    await page.keyboard.press("Home");
    await page.keyboard.press("ArrowRight");
    const account = page.locator("[data-cursor-point]");
    await account.waitFor();
    expect(await account.textContent()).toMatch(
      /proved within[\d.]+\u202f[a-zµ]?V.*iterations\d+, .*largest residual/,
    );
  });

  it("keeps tab, part, hidden traces, isolated setting, draw, point and spread, and gives them back", async () => {
    const state =
      "?trace=out&from=1e-8&to=0.000001&point=100&only-setting=1&band=off&worst=sign&spread=read%3Ascale&spread-at=1";
    await page.goto(address + state);
    await page.locator('[data-point="100"]').waitFor();
    const seen = async () => ({
      point: await page.locator("[data-point]").getAttribute("data-point"),
      subject: await page.locator("[data-subject]").getAttribute("data-subject"),
      setting: await page.locator("[data-subject]").getByLabel("Setting").inputValue(),
      from: await page.getByLabel("I_sample from").inputValue(),
      band: await page.getByRole("checkbox", { name: /band: 5 to 95/ }).isChecked(),
      drawn: await page.locator(DRAWN).first().getAttribute("data-drawn"),
    });
    const before = await seen();
    expect(before).toMatchObject({ point: "100", subject: "read:scale", setting: "1", band: false });
    await page.reload();
    await page.locator('[data-point="100"]').waitFor();
    expect(await seen()).toEqual(before);
    await page.getByRole("tab", { name: "Table of numbers" }).click();
    await page.waitForURL(/tab=numbers/);
    expect(page.url()).toContain("from=1e-8");
  });
});

describe("several operating points", () => {
  it("are listed as branches with their stability, proof and folds", async () => {
    const search = new URLSearchParams({
      workspace: WORKSPACE,
      query: "Trigger of two transistors",
      status: "done",
    });
    const { rows } = await (await page.request.get(`/api/v1/runs?${search}&page=1&size=1`)).json();
    await page.goto(`/${WORKSPACE}/runs/${rows[0].id}`);
    const list = page.locator("[data-branches]");
    await list.getByText(/3 branches; their indices add up at every value/).waitFor();
    const branches = await list.getByRole("table").getByRole("row").allTextContents();
    expect(branches.filter((row) => /unstable: the circuit leaves it.*V$/.test(row))).toHaveLength(1);
    expect(branches.filter((row) => /(?<!un)stable: the circuit stays there.*V$/.test(row))).toHaveLength(2);
    expect(await list.textContent()).toMatch(/2 folds, where branches turn back: V_in .+; V_in /);
  });
});

describe("a run that is behind its netlist", () => {
  it("says that the netlist has moved on, and leads to what has changed", async () => {
    const netlist = await queue(page, HEAD.replace("Head with wide parts", "Head that moves on"));
    const moved = netlist.text.replace("± 1 %", "± 0.1 %");
    await send(page, `/api/v1/netlists/${netlist.id}/revisions`, { base: 1, text: moved });
    await settled(page, netlist.address);
    await page.getByText("The netlist is at revision 2 now; this is revision 1.").waitFor();
    const link = page.getByRole("link", { name: "See what has changed" });
    expect(await link.getAttribute("href")).toMatch(/compare\/1\.\.2$/);
  });
});

describe("for everyone", () => {
  it.each(LOOKS)("keeps to WCAG 2.2 AA and its window, $colorScheme at $width px", async (one) => {
    await look(page, one);
    await page.goto(`${address}?point=100&spread=read:scale`);
    await page.locator('[data-point="100"]').waitFor();
    await page.locator(DRAWN).first().waitFor();
    await expectAccessible(page);
    await expectNoSidewaysScroll(page);
    await picture(page, `run-page-${one.colorScheme}-${one.width}`);
    expect(faults).toEqual([]);
  });

  it("has the verdicts before the curves on a telephone", async () => {
    await look(page, LOOKS[2]);
    await page.goto(address);
    await page.locator(DRAWN).first().waitFor();
    const top = async (selector: string) => (await page.locator(selector).first().boundingBox())!.y;
    expect(await top("[data-requirement]")).toBeLessThan(await top(DRAWN));
    await look(page, LOOKS[0]);
    expect(Math.abs((await top("[data-requirement]")) - (await top(DRAWN)))).toBeLessThan(400);
  });

  it("is read by a viewer, who is offered nothing to queue", async () => {
    const viewer = await openPage(browser);
    await signIn(viewer.page, "vera");
    await viewer.page.goto(address);
    await viewer.page.locator("[data-requirement]").first().waitFor();
    expect(await viewer.page.getByRole("button", { name: /Run again|Queue it again/ }).count()).toBe(0);
    await viewer.page.context().close();
  });

  it("raised no fault in the page over all these steps", () => {
    expect(faults).toEqual([]);
    expect(address).toContain(`/${WORKSPACE}/runs/`);
  });
});
