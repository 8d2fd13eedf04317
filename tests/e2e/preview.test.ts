import { readFileSync } from "node:fs";
import type { Browser, Page } from "playwright-core";
import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import type { RunDocument } from "@/lib/analyses/result";
import {
  closePages,
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  openPageAs,
  picture,
  WORKSPACE,
} from "./harness";
import { editorOf, makeNetlist, openSheet, PATIENT, typeAtEnd, writeText } from "./sheet-steps";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterEach(() => closePages(browser));
afterAll(() => browser?.close());

/** A current into a junction; the voltage of the resistor beside it is plain arithmetic. */
function ohmText(title: string): string {
  return `title "${title}"

knob I_in = 1 µA in 1 nA .. 1 mA
knob R_load = 10 kΩ in 1 kΩ .. 1 MΩ

ground -- IS : current I_in -- a
a -- R1 : resistor R_load -- ground

sweep I_in from 1 nA to 1 mA, 10 per decade
sweep temperature over 10 °C, 25 °C, 40 °C
show v = a.v
read top = highest(v)
require top <= 12 V as "limit"
`;
}

/** An engineer on the sheet of a netlist of their own, with its preview solved. */
async function onSheet(text: string) {
  const opened = await openPageAs(browser, "erik");
  const id = await makeNetlist(opened.page, text);
  await openSheet(opened.page, id);
  await solved(opened.page);
  return { ...opened, id };
}

async function solved(page: Page): Promise<void> {
  await page.locator('[data-preview="whole"]').waitFor();
}

const pane = (page: Page) => page.getByRole("region", { name: "Preview" });
const reading = (page: Page) => pane(page).locator("dl").filter({ hasText: "top" });
const knob = (page: Page, name: string) => page.getByRole("slider", { name, exact: true });

/** What the reading comes to. */
async function expectReading(page: Page, value: string): Promise<void> {
  await expect
    .poll(async () => (await reading(page).textContent())?.replaceAll("\u202f", " "), PATIENT)
    .toBe(`top${value}`);
}

async function shownText(page: Page): Promise<string> {
  return (await page.locator(".view-line").allTextContents()).join("\n").replaceAll("\u00a0", " ");
}

test("typing a value moves the curve, the reading and the margin; nothing of it is stored", async () => {
  const { page, faults, id } = await onSheet(ohmText("Typed value"));
  await pane(page)
    .getByText(/^61 points at 25.°C, nominal · solved here in [\d.]+.ms, not stored$/u)
    .waitFor();
  await expectReading(page, "10.0000 V");
  const curve = page.locator("[data-drawn]").first();
  const before = await curve.screenshot();
  await writeText(page, ohmText("Typed value").replace("10 kΩ in", "20 kΩ in"));
  await expectReading(page, "20.0000 V");
  await pane(page).getByText("limit").first().waitFor();
  await pane(page).getByText("broken", { exact: true }).waitFor();
  expect((await curve.screenshot()).equals(before)).toBe(false);
  await page.getByText(/^all points proved, worst /u).waitFor();
  const { rows } = await (
    await page.request.get(`/api/v1/runs?workspace=${WORKSPACE}&netlistId=${id}`)
  ).json();
  expect(rows).toEqual([]);
  expect(faults).toEqual([]);
});

test("a knob moves the preview by keys, is typed as a value with its unit, and is put back", async () => {
  const { page } = await onSheet(ohmText("Knobs"));
  const slider = knob(page, "R_load");
  await slider.focus();
  await page.keyboard.press("Home");
  await expectReading(page, "1.000 00 V");
  await page.keyboard.press("End");
  await expectReading(page, "1.000 00 kV");
  await page.keyboard.press("ArrowLeft");
  await expect.poll(() => slider.getAttribute("aria-valuetext"), PATIENT).toBe("955\u202fkΩ");
  const field = page.getByRole("textbox", { name: "R_load, value" });
  await field.fill("5k");
  await field.press("Enter");
  await page.getByRole("alert").filter({ hasText: "unit" }).waitFor();
  await field.fill("2 MΩ");
  await field.press("Enter");
  await page.getByText(/The text keeps R_load within 1.kΩ and 1.MΩ/u).waitFor();
  await field.fill("12 kohm");
  await field.press("Enter");
  await expectReading(page, "12.0000 V");
  await page.getByRole("button", { name: /^Put R_load back to/u }).click();
  await expectReading(page, "10.0000 V");
  expect(await slider.evaluate((one) => one === document.activeElement)).toBe(true);
  expect(await shownText(page)).toContain("knob R_load = 10 kΩ");
  // The curves that stay in view never hide what has the focus (WCAG 2.2, 2.4.11).
  await page.setViewportSize({ width: 1280, height: 850 });
  const last = knob(page, "temperature");
  await page.getByRole("tab", { name: "Preview" }).focus();
  await page.locator('[data-preview="whole"]').hover();
  await page.mouse.wheel(0, -5000);
  await last.evaluate((one) => (one as HTMLElement).focus());
  const isSeen = () =>
    last.evaluate((one) => {
      const { left, width, top, height } = one.getBoundingClientRect();
      return one.contains(document.elementFromPoint(left + width / 2, top + height / 2));
    });
  await expect.poll(isSeen, PATIENT).toBe(true);
});

test("a knob is written into the text as one step that undo takes back, the temperature too", async () => {
  const { page } = await onSheet(ohmText("Written"));
  await knob(page, "R_load").focus();
  await page.keyboard.press("Home");
  await page.getByRole("button", { name: /^Write R_load = 1.kΩ into the text$/u }).click();
  await expect.poll(() => shownText(page), PATIENT).toContain("knob R_load = 1 kΩ in 1 kΩ .. 1 MΩ");
  await page.getByText("draft on revision 1").waitFor();
  await expectReading(page, "1.000 00 V");
  const degrees = page.getByRole("textbox", { name: "temperature, value" });
  await degrees.fill("30 °C");
  await degrees.press("Enter");
  await pane(page)
    .getByText(/^61 points at 30.°C/u)
    .waitFor();
  await page.getByRole("button", { name: /^Write temperature = 30.°C into the text$/u }).click();
  await expect.poll(() => shownText(page), PATIENT).toContain("knob temperature = 30 °C");
  await (await editorOf(page)).focus();
  await page.keyboard.press("Control+z");
  await page.keyboard.press("Control+z");
  await expect.poll(() => shownText(page), PATIENT).toContain("knob R_load = 10 kΩ in");
  await expectReading(page, "10.0000 V");
});

test("the setting of an outer sweep is chosen; the knob of the first says where values are read", async () => {
  const { page } = await onSheet(ohmText("Setting"));
  await pane(page).getByLabel("temperature", { exact: true }).first().selectOption({ label: "40\u202f°C" });
  await pane(page)
    .getByText(/^61 points at 40.°C/u)
    .waitFor();
  const cursor = knob(page, "I_in");
  expect(await cursor.getAttribute("aria-valuetext")).toBe("1\u202fµA");
  await cursor.focus();
  await page.keyboard.press("End");
  await expect.poll(() => cursor.getAttribute("aria-valuetext"), PATIENT).toBe("1\u202fmA");
});

test("a text with errors keeps the last curves and says that they are of an earlier one", async () => {
  const { page } = await onSheet(ohmText("Errors"));
  await typeAtEnd(page, "let q = 10k\n");
  await pane(page).getByText("of the text before its errors").waitFor();
  await page.locator('[data-preview="stale"] canvas').first().waitFor();
  await page.getByText("preview of an earlier text").waitFor();
  await expectReading(page, "10.0000 V");
  await page.getByRole("button", { name: "Change to 10 kΩ" }).click();
  await solved(page);
  expect(await pane(page).getByText("of the text before its errors").count()).toBe(0);
});

test("points that fail are marked where they are, and a sweep that is too long is shown in part", async () => {
  const { page } = await onSheet(`title "Reversed"
knob I_in = 1 µA
model d : diode { Is = 1 fA }
ground -- IS : current I_in -- a -- D : d -- ground
sweep I_in from -1 µA to 1 µA, 21 points
show a.v
`);
  await page.getByText(/^10 of 21 points failed, all others proved/u).waitFor();
  await writeText(page, ohmText("Long").replace("10 per decade", "2000 per decade"));
  await page.getByText("Only some of the points are shown").waitFor();
  await pane(page)
    .getByText(/^\d+ of 12.001 points at 25.°C, nominal/u)
    .waitFor();
});

test("a viewer turns the knobs too, and writes nothing", async () => {
  const { page, id } = await onSheet(ohmText("Viewer"));
  const { page: theirs } = await openPageAs(browser, "vera");
  await page.close();
  await openSheet(theirs, id);
  await solved(theirs);
  await knob(theirs, "R_load").focus();
  await theirs.keyboard.press("Home");
  await expectReading(theirs, "1.000 00 V");
  await theirs.getByRole("button", { name: /^Put R_load back/u }).waitFor();
  expect(await theirs.getByRole("button", { name: /^Write/u }).count()).toBe(0);
});

/** Exponentials, logarithms, limits and a law; a setting of an outer sweep in the middle of its run. */
const EQUAL = ["absorbance-head", "limiting-chain", "level-detector", "solar-cell"];

test("the preview equals the queued run bit for bit", async () => {
  for (const example of EQUAL) {
    const text = readFileSync(`examples/${example}.swn`, "utf8")
      .replace(/^draws .*\n/mu, "")
      .replace(/ in 90 % of draws/gu, "");
    const { page } = await onSheet(text);
    const preview = await previewedAnew(page);
    await page.getByRole("button", { name: "Queue run" }).click();
    await page.waitForURL(/\/runs\/[0-9a-f-]{36}/u);
    const runId = new URL(page.url()).pathname.split("/").at(-1);
    const ran = async () => (await page.request.get(`/api/v1/runs/${runId}/summary`)).json();
    await expect.poll(async () => (await ran()).status, PATIENT).toBe("done");
    const document: RunDocument = await (await page.request.get(`/api/v1/runs/${runId}`)).json();
    const from = preview.length * settingOf(document.axes, preview.settings);
    const row = (values: readonly unknown[]) => values.slice(from, from + preview.length);
    expect(document.traces.map(({ name, values }) => [name, row(values)])).toEqual(preview.traces);
    expect(row(document.points.bound)).toEqual(preview.bound);
    await page.close();
  }
});

/** Which setting of the outer sweeps it is, the first of them fastest. */
function settingOf(axes: RunDocument["axes"], settings: readonly number[]): number {
  return axes
    .slice(1)
    .reduceRight((index, { values }, i) => index * values.length + values.indexOf(settings[i]!), 0);
}

/** Goes away from the sheet and back, and listens to the thread that solves its preview. */
async function previewedAnew(page: Page) {
  const heard = page.evaluate(
    () =>
      new Promise<{
        length: number;
        settings: number[];
        traces: [string, (number | null)[]][];
        bound: (number | null)[];
      }>((resolve) => {
        const Threads = window.Worker;
        window.Worker = class extends Threads {
          constructor(...words: ConstructorParameters<typeof Worker>) {
            super(...words);
            this.addEventListener("message", ({ data }) => {
              if (data?.row?.stage !== "whole") return;
              const { length, axes, traces, bound } = data.row;
              resolve({
                length,
                settings: axes.slice(1).map((axis: { values: number[] }) => axis.values[0]),
                traces: traces.map((one: { name: string; values: Float64Array }) => [
                  one.name,
                  Array.from(one.values, (value) => (Number.isFinite(value) ? value : null)),
                ]),
                bound: Array.from(bound as Float64Array, (value) => (Number.isFinite(value) ? value : null)),
              });
            });
          }
        };
      }),
  );
  await page.getByRole("navigation").getByRole("link", { name: "Netlists" }).click();
  await page.getByRole("heading", { name: "Netlists", level: 1 }).waitFor();
  await page.goBack();
  await editorOf(page);
  return heard;
}

test("the sheet with its preview is accessible and fits its window, light and dark", async () => {
  const { page } = await onSheet(ohmText("Look"));
  await knob(page, "R_load").focus();
  await page.keyboard.press("ArrowRight");
  await page.getByRole("button", { name: /^Write R_load/u }).waitFor();
  for (const [width, height] of [
    [360, 740],
    [1024, 768],
    [1920, 1080],
  ] as const) {
    for (const colorScheme of ["light", "dark"] as const) {
      await page.setViewportSize({ width, height });
      await page.emulateMedia({ colorScheme });
      await solved(page);
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
      await picture(page, `preview-${width}-${colorScheme}`);
    }
  }
});
