import { AxeBuilder } from "@axe-core/playwright";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { expectNoSidewaysScroll, launchBrowser, openPage, picture, signIn } from "./harness";
import { editorOf, expectChecked, makeNetlist, openSheet, PATIENT, typeAtEnd } from "./sheet-steps";
import { expectCursorIn, expectText, pointOf, pressWord, shownText } from "./text-steps";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser?.close());

/** Two log stages and the resistor between them. */
function headText(title: string): string {
  return `title "${title}"
knob I_in = 1 µA
let R_load = 10 kΩ
model junction : diode { Is = 2 fA }
model amp : opamp { }
block stage(in, out) {
  in -- D : junction -- out
  A : amp { plus = ground, minus = in, out = out }
}
ground -- IS : current I_in -- s
S : stage { in = s, out = left }
left -- R1 : resistor R_load -- right
right -- R2 : resistor R_load -- ground
sweep I_in from 1 nA to 1 mA, 10 per decade
show v_log = left.v
`;
}

/** An engineer on the sheet of a netlist of their own. */
async function onSheet(title: string, text = headText(title)) {
  const opened = await openPage(browser, { viewport: { width: 1280, height: 900 } });
  await signIn(opened.page, "erik");
  const id = await makeNetlist(opened.page, text);
  await openSheet(opened.page, id);
  return { ...opened, id };
}

/** The rows of the list of completions, when it is there. */
async function offered(page: Page): Promise<string[]> {
  const rows = page.locator(".suggest-widget.visible .monaco-list-row .label-name");
  await rows.first().waitFor();
  return rows.allTextContents();
}

test("a pin, its net, a unit and a whole statement are completed from the keyboard", async () => {
  const { page, faults } = await onSheet("Completion");
  await typeAtEnd(page, "X : amp {");
  await page.keyboard.type(" p");
  expect(await offered(page)).toEqual(["plus"]);
  await page.keyboard.press("Enter");
  await expectText(page, "X : amp { plus = ");
  expect(await offered(page)).toEqual(expect.arrayContaining(["ground", "s", "left", "right"]));
  await page.keyboard.type("ri");
  // What is being written is a net of its own until it is finished, and stays in the list: here it is not meant.
  await expect.poll(() => offered(page), PATIENT).toEqual(["ri", "right"]);
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  await expectText(page, "X : amp { plus = right");
  // Nothing is chosen in a list that came by itself, so that Enter still ends a line.
  await page.keyboard.type(", ");
  expect(await offered(page)).toEqual(["minus", "out"]);
  await page.keyboard.press("Escape");
  await typeAtEnd(page, "\nlet C = 10 ko");
  await page.keyboard.press("Control+Space");
  expect(await offered(page)).toEqual(["kΩ"]);
  await page.keyboard.press("Enter");
  await expectText(page, "let C = 10 kΩ");
  await typeAtEnd(page, "\n");
  await page.keyboard.type("swee");
  expect(await offered(page)).toEqual(["sweep"]);
  await page.keyboard.press("Enter");
  await expectText(page, "sweep temperature from 10 °C to 40 °C, 4 points");
  expect(faults).toEqual([]);
});

test("what stands under the pointer or the cursor is told, with its value where the preview is read", async () => {
  const { page } = await onSheet("Told");
  await page.locator('[data-preview="whole"]').waitFor();
  const card = page.locator(".place-card");
  const over = async (word: string, nth = 0) => {
    const { x, y } = await pointOf(page, word, nth);
    await page.mouse.move(x, y, { steps: 3 });
  };
  await over("R_load");
  await card.getByText("let R_load = 10 kΩ", { exact: true }).waitFor();
  // Wherever it reaches, also over the curves beside the text.
  const isOnTop = await card.evaluate((node) => {
    const { right, top, height } = node.getBoundingClientRect();
    const curves = document.querySelector('[data-preview="whole"]')!.getBoundingClientRect();
    (node as HTMLElement).style.minWidth =
      `${Math.round(curves.left + 120 - node.getBoundingClientRect().left)}px`;
    const x = node.getBoundingClientRect().right - 8;
    const found = document.elementFromPoint(x, top + height / 2);
    (node as HTMLElement).style.minWidth = "";
    return right > 0 && node.contains(found);
  });
  expect(isOnTop).toBe(true);
  await over("left.v");
  await card.getByText(/^net left, wired to/).waitFor();
  await card.getByText(/V at I_in/).waitFor();
  await over("Is");
  await card.getByText("Is: saturation current Is at T0; in A; must be given").waitFor();
  await pressWord(page, "opamp");
  await page.keyboard.press("F1");
  await page.getByRole("status").filter({ hasText: "operational amplifier" }).first().waitFor();
});

test("a fix is put in from the keyboard, and where there is none the editor says so", async () => {
  const { page } = await onSheet(
    "Fix",
    headText("Fix").replace("R1 : resistor R_load", "R1 : resistor R_laod"),
  );
  await expectChecked(page, "1 error");
  await pressWord(page, "R_laod");
  await page.keyboard.press("Control+.");
  await expectText(page, "R1 : resistor R_load");
  await page.getByRole("status").filter({ hasText: "Change to R_load" }).first().waitFor();
  await pressWord(page, "knob");
  await page.keyboard.press("Control+.");
  await page.locator(".place-card").waitFor();
  expect(await page.getByText("No code actions available").count()).toBe(0);
});

test("a name is changed wherever it stands, and a name that is taken is refused in words", async () => {
  const { page } = await onSheet("Rename");
  await pressWord(page, "R_load", 1);
  await page.keyboard.press("F2");
  const box = page.getByRole("dialog", { name: "Rename R_load" });
  await box.getByLabel("New name for R_load, in 3 places").fill("R1");
  await box.getByText("R1 is taken: it is an element already.").waitFor();
  await page.keyboard.press("Enter");
  expect(await box.count()).toBe(1);
  await box.getByRole("textbox").fill("R_side");
  await box.getByText("Enter renames").waitFor();
  await page.keyboard.press("Enter");
  await box.waitFor({ state: "hidden" });
  await expectText(page, "let R_side = 10 kΩ");
  expect((await shownText(page)).match(/R_side/g)).toHaveLength(3);
  await page.keyboard.press("Control+z");
  await expectText(page, "let R_load = 10 kΩ");
  await expectChecked(page, "no problems");
});

test("F12 goes to where a name is declared, and its places are listed to jump from", async () => {
  const { page } = await onSheet("Definition");
  await pressWord(page, "junction", 1);
  await page.keyboard.press("F12");
  await expectCursorIn(page, 4);
  await page.keyboard.press("F12");
  await expectCursorIn(page, 7);
  await pressWord(page, "R_load", 0);
  await page.keyboard.press("Shift+F12");
  const list = page.getByRole("listbox", { name: "Places" });
  await expect.poll(() => list.getByRole("option").count(), PATIENT).toBe(3);
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  await expectCursorIn(page, 13);
});

test("the outline jumps to what is looked for, and blocks fold", async () => {
  const { page } = await onSheet("Outline");
  await (await editorOf(page)).focus();
  await page.keyboard.press("Control+Shift+O");
  const list = page.getByRole("listbox", { name: "Outline" });
  await list.getByRole("option", { name: /^R2/ }).waitFor();
  expect(await list.getByRole("group").count()).toBeGreaterThanOrEqual(4);
  await page.keyboard.type("stage");
  await page.keyboard.press("Enter");
  await list.waitFor({ state: "hidden" });
  await expectCursorIn(page, 6);
  await page.keyboard.press("Control+Shift+[");
  await expect.poll(() => shownText(page), PATIENT).not.toContain("D : junction");
  await page.keyboard.press("Control+Shift+]");
  await expectText(page, "D : junction");
  await page.getByRole("button", { name: "Outline" }).click();
  await page.keyboard.press("Escape");
  const box = await editorOf(page);
  await expect.poll(() => box.evaluate((one) => one === document.activeElement), PATIENT).toBe(true);
});

test("lines are commented out and back, and the menu of the text does what the keys do", async () => {
  const { page } = await onSheet("Menu");
  await pressWord(page, "R_load", 0);
  await page.keyboard.press("Control+/");
  await expectText(page, "# let R_load = 10 kΩ");
  await page.keyboard.press("Control+/");
  await expect.poll(() => shownText(page), PATIENT).not.toContain("# let");
  await page.getByRole("button", { name: "Text", exact: true }).click();
  await page.getByRole("menuitem", { name: "Rename" }).click();
  await page.getByRole("dialog", { name: "Rename R_load" }).waitFor();
  await page.keyboard.press("Escape");
  await typeAtEnd(page, "let   late=3 kohm\n");
  await page.keyboard.press("Shift+Alt+F");
  await expectText(page, "let late = 3 kΩ");
});

test("the drawing and the text are linked both ways, by pointer and by key", async () => {
  const { page } = await onSheet("Drawing");
  await page.getByRole("tab", { name: "Connections" }).click();
  const drawing = page.getByRole("group", { name: "Drawing of what is connected to what" });
  const part = (name: string) => drawing.getByRole("button", { name, exact: true });
  await page.getByText("5 elements, 4 nets").waitFor();
  await part("R2, resistor R_load: left to right, right to ground").click();
  await page.locator(".shown-line").first().waitFor();
  expect(await part("R2, resistor R_load: left to right, right to ground").getAttribute("aria-pressed")).toBe(
    "true",
  );
  await pressWord(page, "IS");
  await expect
    .poll(() => part("IS, current I_in: left to ground, right to s").getAttribute("aria-pressed"), PATIENT)
    .toBe("true");
  // A closed block stands for what is in it; open, its parts do themselves.
  await pressWord(page, "D :");
  await expect
    .poll(() => part("S, stage: in to s, out to left").getAttribute("aria-pressed"), PATIENT)
    .toBe("true");
  await part("Open S").click();
  await expect
    .poll(() => part("S.D, junction: anode to s, cathode to left").getAttribute("aria-pressed"), PATIENT)
    .toBe("true");
  await page.keyboard.press("Home");
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  await page.locator(".shown-line").first().waitFor();
  await page.getByRole("button", { name: "Show as list" }).click();
  const words = page.getByRole("region", { name: "Connections in words" });
  await words.getByRole("button", { name: "R1.right" }).click();
  expect(await words.getByRole("button", { name: "R1.right" }).getAttribute("aria-pressed")).toBe("true");
});

test("text, outline and drawing are accessible and fit their windows, light and dark", async () => {
  const { page, id } = await onSheet("Look");
  for (const [width, height] of [
    [360, 740],
    [1024, 768],
    [1920, 1080],
  ] as const) {
    await page.setViewportSize({ width, height });
    await openSheet(page, id);
    await page.getByRole("tab", { name: "Connections" }).click();
    await page.getByText("5 elements, 4 nets").waitFor();
    await page.getByRole("button", { name: "Outline" }).click();
    await page.getByRole("option", { name: /^R2/ }).waitFor();
    for (const colorScheme of ["light", "dark"] as const) {
      await page.emulateMedia({ colorScheme });
      await expectSound(page);
      await picture(page, `editor-${width}-${colorScheme}`);
    }
  }
}, 180_000);

/** Nothing that axe finds at WCAG 2.2 AA, and no wider than the window. */
async function expectSound(page: Page): Promise<void> {
  const tags = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];
  const { violations } = await new AxeBuilder({ page }).withTags(tags).analyze();
  expect(violations.map(({ id, nodes }) => [id, nodes.map((node) => node.html)])).toEqual([]);
  await expectNoSidewaysScroll(page);
}
