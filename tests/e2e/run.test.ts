import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import {
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  look,
  openPage,
  signIn,
  WORKSPACE,
} from "./harness";

/** Long enough to be met while it runs: 600 000 points of a log converter. Invented. */
const LONG = `title "Long sweep of a log converter (invented)"
knob I_in = 1 µA
knob R_load = 10 kΩ
model junction : diode { Is = 2 fA, Rs = 2 Ω }
model amp : opamp { gain = 1e6, bias = 20 pA }
sum -- IS : current I_in -- ground
out -- D1 : junction -- sum
A1 : amp { plus = ground, minus = sum, out = out }
out -- RL : resistor R_load -- ground
sweep I_in from 1 nA to 1 mA, 1000 per decade
sweep R_load from 1 kΩ to 100 kΩ, 100 points
show v_log = out.v
`;

const DRAWN = '[data-drawn]:not([data-drawn="0"])';

let browser: Browser;
let page: Page;
let faults: string[];

/** Sends JSON as the page itself would. */
function send<T>(url: string, body: unknown): Promise<T> {
  return page.evaluate(
    async ([to, text]) => {
      const headers = { "content-type": "application/json" };
      return (await fetch(to, { method: "POST", headers, body: text })).json();
    },
    [url, JSON.stringify(body)] as const,
  );
}

/** Address of the newest finished run of the netlist with that title. */
async function runOf(title: string): Promise<string> {
  const search = new URLSearchParams({
    workspace: WORKSPACE,
    query: title,
    status: "done",
    page: "1",
    size: "1",
  });
  const { rows } = await (await page.request.get(`/api/v1/runs?${search}`)).json();
  return `/${WORKSPACE}/runs/${rows[0].id}`;
}

async function startLongRun(): Promise<string> {
  const { id } = await send<{ id: string }>("/api/v1/netlists", { workspace: WORKSPACE, text: LONG });
  const run = await send<{ id: string }>("/api/v1/runs", { netlistId: id, base: 1 });
  return `/${WORKSPACE}/runs/${run.id}`;
}

beforeAll(async () => {
  browser = await launchBrowser();
  ({ page, faults } = await openPage(browser));
  await signIn(page, "erik");
});

afterAll(async () => {
  await browser.close();
});

describe("a finished run", () => {
  it("shows its curves in storeys on the ruler, in a figure that says what it shows", async () => {
    await page.goto(await runOf("multiplier"));
    const figure = page.getByRole("figure", { name: /Curves of One-quadrant multiplier/ });
    await figure.locator(DRAWN).first().waitFor();
    expect(await figure.locator("canvas").count()).toBe(2);
    expect(await figure.locator("figcaption").textContent()).toMatch(
      /product rises in each.*All 1\u202f204 points are solved/,
    );
    await figure.getByRole("group", { name: "V_x axis" }).getByLabel("linear").check();
    await page.waitForURL(/x=linear/);
    await figure.getByText("10\u202fV", { exact: true }).first().waitFor();
    await figure.getByText(/error axis linear only: the values have both signs/).waitFor();
  });

  it("reads out the values of all traces where the arrow keys move the cursor", async () => {
    await page.goto(await runOf("multiplier"));
    const cursor = page.getByRole("slider", { name: "Cursor along V_x" });
    await cursor.focus();
    for (const key of ["Home", "ArrowDown", "ArrowRight"]) await page.keyboard.press(key);
    expect(await cursor.getAttribute("aria-valuetext")).toBe("1.031\u202f18\u202fmV, V_y 100\u202fmV");
    const spoken = page.locator("[aria-live=polite][data-spoken]");
    await expect.poll(() => spoken.textContent()).toMatch(/V_x 1\.031.*V_y 100\u202fmV: product .*V, error /);
    await page.keyboard.press("Enter");
    await page.locator('[data-point="302"][data-outcome="converged"]').waitFor();
  });

  it("shows a part of the sweep by fields as by dragging, and the whole again", async () => {
    await page.goto(await runOf("Diode log converter"));
    await page.getByLabel("I_in from").fill("10 nA");
    await page.getByLabel("to", { exact: true }).fill("1 µA");
    await page.getByRole("button", { name: "Show", exact: true }).first().click();
    await page.waitForURL(/from=1e-8&to=0.000001/);
    await page.getByLabel("I_in from").fill("10");
    await page.getByRole("button", { name: "Show", exact: true }).first().click();
    await page.getByText("Write the unit too").waitFor();
    await page.getByRole("button", { name: "Whole sweep" }).click();
    await page.waitForURL((url) => !url.search.includes("from"));
    const box = (await page.getByRole("slider").boundingBox())!;
    await page.mouse.move(box.x + box.width * 0.25, box.y + 60);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width * 0.5, box.y + 60, { steps: 4 });
    await page.mouse.up();
    await page.waitForURL(/from=.*to=/);
  });

  it("has a table of every point, a page at a time", async () => {
    await page.goto(await runOf("Diode log converter"));
    await page.getByRole("tab", { name: "Table of numbers" }).click();
    const table = page.getByRole("table", { name: /Points of the run/ });
    expect(await table.getByRole("row").count()).toBe(51);
    await page.getByRole("button", { name: "Next" }).first().click();
    await table.getByRole("button", { name: "Show point 50 in full" }).click();
    await page.locator('[data-point="50"]').waitFor();
    expect(await page.locator('[data-point="50"]').textContent()).toMatch(/iterations\d+, /);
  });

  it("is the same again from its address: traces, scales, part, tab and point", async () => {
    const address = await runOf("multiplier");
    await page.goto(`${address}?trace=product&settings=0.3&x=linear&y=V%3Alinear&from=1&to=5&point=700`);
    await page.locator(DRAWN).waitFor();
    const state = async () => ({
      traces: await page
        .getByRole("checkbox", { name: /product|error/ })
        .evaluateAll((all) => all.map((one) => (one as HTMLInputElement).checked)),
      settings: await page
        .getByRole("checkbox", { name: /V_y/ })
        .evaluateAll((all) => all.map((one) => (one as HTMLInputElement).checked)),
      linear: await page
        .getByRole("radio", { name: "linear" })
        .evaluateAll((all) => all.map((one) => (one as HTMLInputElement).checked)),
      from: await page.getByLabel("V_x from").inputValue(),
      to: await page.getByLabel("to", { exact: true }).inputValue(),
      point: await page.locator("[data-point]").getAttribute("data-point"),
    });
    const before = await state();
    expect(before).toEqual({
      traces: [true, false],
      settings: [true, false, false, true],
      linear: [true, true],
      from: "1\u202fV",
      to: "5\u202fV",
      point: "700",
    });
    await page.reload();
    await page.locator(DRAWN).waitFor();
    expect(await state()).toEqual(before);
  });

  it("goes out as comma-separated values and as the run document", async () => {
    const address = await runOf("Reversed input");
    const csv = await (await page.request.get(`${address}/points.csv`)).text();
    const lines = csv.trimEnd().split("\r\n");
    expect(lines[0]).toBe("point,V_in [V],out [V],outcome,bound [V]");
    expect(lines).toHaveLength(52);
    expect(lines[1]).toMatch(/^0,-0\.5,,(?!converged)/);
    const link = page.getByRole("link", { name: "Run document as JSON" });
    await page.goto(address);
    const document = await (await page.request.get((await link.getAttribute("href"))!)).json();
    expect(document.format).toBe("sweepwright-run/1");
  });
});

describe("a run with failed points", () => {
  it("leaves a gap, marks and counts them, and tells why a chosen one failed", async () => {
    await page.goto(await runOf("Reversed input"));
    await page.getByText("done, 10 points failed").waitFor();
    expect(await page.locator(DRAWN).getAttribute("data-drawn")).toBe("41");
    const caption = await page.locator("figcaption").textContent();
    expect(caption).toMatch(
      /10 failed \(.+\) at V_in −500\u202fmV to −50\u202fmV, and nothing is drawn there/,
    );
    await page.getByLabel(/Number of a point/).fill("3");
    await page.getByLabel(/Number of a point/).press("Enter");
    const account = page.locator('[data-point="3"]');
    await account.waitFor();
    expect(await account.getAttribute("data-outcome")).not.toBe("converged");
    expect(await account.textContent()).toMatch(/Failed: .+Farthest from settled: .*(sum|out|Q1)/);
    await page.getByLabel(/Number of a point/).fill("40");
    await page.getByLabel(/Number of a point/).press("Enter");
    const solved = page.locator('[data-point="40"][data-outcome="converged"]');
    await solved.waitFor();
    expect(await solved.textContent()).toMatch(
      /proved within[\d. ]+\u202f[a-zµ]?V.*largest residual.*Net voltages.*sum\.v.*Branch currents/,
    );
  });
});

describe("a run under way", () => {
  it("shows progress and a first curve before it ends, and can be cancelled", async () => {
    await page.goto(await startLongRun());
    await page.locator("[data-run-status=running]").waitFor();
    await page.locator(DRAWN).waitFor();
    expect(await page.locator("[data-run-status]").getAttribute("data-run-status")).toBe("running");
    await page.getByRole("progressbar", { name: "Points solved" }).waitFor();
    await page.getByRole("button", { name: "Cancel run" }).click();
    await page.locator("[data-run-status=cancelled]").waitFor();
    await page.getByText(/Cancelled when .+ of 600\u202f100 points were in/).waitFor();
    await page.getByRole("button", { name: "Run again" }).waitFor();
    expect(await page.getByRole("button", { name: "Cancel run" }).count()).toBe(0);
  });

  it("is queued again from its own page", async () => {
    const address = await runOf("Diode log converter");
    await page.goto(address);
    await page.getByRole("button", { name: "Run again" }).click();
    await page.waitForURL((url) => url.pathname !== address && url.pathname.includes("/runs/"));
    await page.locator("[data-run-status=done]").waitFor();
    await page.locator(DRAWN).first().waitFor();
  });
});

describe("the list of runs", () => {
  it("is searched, narrowed to a state, and says so when nothing matches", async () => {
    await page.goto(`/${WORKSPACE}/runs`);
    await page.getByRole("searchbox", { name: "Search runs" }).fill("reversed");
    await page.waitForURL(/query=reversed/);
    await page
      .getByRole("link", { name: /Run \d+ of Reversed input/ })
      .first()
      .waitFor();
    await page.getByLabel("State", { exact: true }).selectOption("failed");
    await page.getByText("No run matches").waitFor();
    await page.getByRole("button", { name: "Show all runs" }).click();
    await page
      .getByRole("link", { name: /Run \d+ of / })
      .first()
      .waitFor();
  });

  it("is read by a viewer, who can neither queue nor cancel", async () => {
    const viewer = await openPage(browser);
    await signIn(viewer.page, "vera");
    await viewer.page.goto(await runOf("Diode log converter"));
    await viewer.page.locator(DRAWN).first().waitFor();
    expect(await viewer.page.getByRole("button", { name: /Run again|Cancel run/ }).count()).toBe(0);
    await viewer.page.context().close();
  });
});

describe("for everyone", () => {
  it.each([
    { colorScheme: "light", width: 1280 },
    { colorScheme: "dark", width: 360 },
  ] as const)(
    "keeps to WCAG 2.1 AA and its window, $colorScheme at $width px",
    async ({ colorScheme, width }) => {
      await look(page, { colorScheme, width });
      for (const search of ["?point=3", "?tab=numbers&point=20"]) {
        await page.goto(`${await runOf("Reversed input")}${search}`);
        await page.locator("[data-point]").waitFor();
        await expectAccessible(page);
        await expectNoSidewaysScroll(page);
      }
      await page.goto(`/${WORKSPACE}/runs`);
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
      expect(faults).toEqual([]);
    },
  );

  it("raised no fault in the page over all these steps", () => {
    expect(faults).toEqual([]);
  });
});
