import type { APIResponse, Locator, Page } from "playwright-core";
import { expect } from "vitest";
import { baseUrl, WORKSPACE } from "./harness";

/** For `expect.poll`, whose own patience of a second is short on a busy machine. */
export const PATIENT = { timeout: 20_000 };

/** A small netlist that runs: an ideal amplifier holds the current of a sweep through a junction. */
export function converterText(title: string, perDecade = 10): string {
  return `title "${title}"

knob I_in = 1 µA
let  R_load = 10 kΩ

model junction : diode { Is = 2 fA }
model amp : opamp { }

ground -- IS : current I_in -- s
s -- D1 : junction -- out
A1 : amp { plus = ground, minus = s, out = out }
out -- R1 : resistor R_load -- ground

sweep I_in from 1 nA to 1 mA, ${perDecade} per decade

show v_log = out.v
`;
}

/** Asks a route with the cookies of the page and as a script of the page would, which is what the service lets in. */
export function post(page: Page, path: string, data: unknown): Promise<APIResponse> {
  return page.request.post(path, { data, headers: { origin: baseUrl() } });
}

/** Makes a netlist of its own for a test, so that no two tests write in the same; its id. */
export async function makeNetlist(page: Page, text: string): Promise<string> {
  const answer = await post(page, "/api/v1/netlists", { workspace: WORKSPACE, text });
  expect(answer.status()).toBe(201);
  return (await answer.json()).id;
}

/** Saves a text as the next revision of a netlist. */
export async function addRevision(page: Page, id: string, upon: number, text: string, message?: string) {
  const body = { base: upon, text, ...(message === undefined ? {} : { message }) };
  expect((await post(page, `/api/v1/netlists/${id}/revisions`, body)).status()).toBe(201);
}

/** The editor of the sheet, when it has arrived: with the first sign of a hand, once the page listens for one. */
export async function editorOf(page: Page): Promise<Locator> {
  const box = page.getByRole("textbox", { name: "Netlist text" });
  await page.waitForFunction(() => {
    if (document.querySelector(".sheet-editor .monaco-editor, textarea") !== null) return true;
    return window.dispatchEvent(new Event("pointermove")) && false;
  });
  await box.waitFor();
  return box;
}

/** Opens the sheet of a netlist and waits for the editor. */
export async function openSheet(page: Page, id: string): Promise<void> {
  await page.goto(`/${WORKSPACE}/netlists/${id}`);
  await editorOf(page);
}

/** Types at the end of the text. */
export async function typeAtEnd(page: Page, text: string): Promise<void> {
  const box = await editorOf(page);
  await box.focus();
  await page.keyboard.press("Control+End");
  await page.keyboard.insertText(text);
}

/** Pastes another text over the whole. */
export async function writeText(page: Page, text: string): Promise<void> {
  await page.context().grantPermissions(["clipboard-read", "clipboard-write"]);
  await page.bringToFront();
  const box = await editorOf(page);
  await box.focus();
  await page.evaluate((wanted) => navigator.clipboard.writeText(wanted), text);
  await page.keyboard.press("Control+a");
  await page.keyboard.press("Control+v");
}

/** Saves what is written, by the button; waits until the dialog that asks is gone. */
export async function save(page: Page): Promise<void> {
  await page.getByRole("button", { name: "Save revision" }).click();
  await page.getByRole("button", { name: "Save", exact: true }).click();
  await page.getByRole("dialog", { name: /^Save revision/ }).waitFor({ state: "hidden" });
}

/** Waits until the line below the text says so. */
export async function expectChecked(page: Page, says: string | RegExp): Promise<void> {
  await page.getByRole("status").filter({ hasText: says }).first().waitFor();
}

export function problems(page: Page): Locator {
  return page.getByRole("region", { name: "Problems" });
}

/** The id at the end of the present address. */
export function idIn(page: Page): string {
  return new URL(page.url()).pathname.split("/").at(-1) ?? "";
}
