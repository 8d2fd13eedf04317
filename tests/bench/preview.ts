import type { Page } from "playwright-core";
import { launchBrowser, openPage, signIn, WORKSPACE } from "../e2e/harness";
import { editorOf, makeNetlist } from "../e2e/sheet-steps";
import { longText } from "./long-text";

/** Key strokes that are measured for each netlist, after a few that warm the browser up. */
const STROKES = 60;
const WARM_UP = 8;
/** As many for the long text, of which only the checking is measured. */
const LONG_STROKES = 25;
/** Ms between two key strokes: those of a quick typist. */
const APART = 150;
const FRAMES = 60;
/** The beginning of the line whose value is typed at; a digit follows it. */
const TURNED = "let R_gain = ";

declare global {
  interface Window {
    watched?: { asked: number; moved: number; checked: number; drawn: number; frames: number[] };
  }
}

/** 20 elements: a log ratio of two currents, with its amplifiers. */
const SMALL = `title "Bench, 20 elements"
knob I_in = 1 µA
let R_gain = 10 kΩ
model array : npn { Is = 0.4 fA, beta_f = 240, Va_f = 80 V, R_emitter = 0.6 Ω }
model amp : opamp { gain = 2e6, offset = 20 µV, bias = 20 pA, out_low = -12 V, out_high = 12 V }
ground -- IS : current I_in -- s
ground -- IR : current 1 µA -- r
Q1 : array { c = s, b = ground, e = ls }
A1 : amp { plus = ground, minus = s, out = ls }
Q2 : array { c = r, b = ground, e = lr }
A2 : amp { plus = ground, minus = r, out = lr }
ls -- R1 : resistor R_gain -- m -- R2 : resistor R_gain -- d
lr -- R3 : resistor R_gain -- p -- R4 : resistor R_gain -- ground
A3 : amp { plus = p, minus = m, out = d }
A4 : amp { plus = d, minus = g, out = out }
g -- R5 : resistor 1 kΩ -- ground
out -- R6 : resistor 15.9 kΩ -- g
out -- R7 : resistor 10 kΩ -- f -- R8 : resistor 10 kΩ -- ground
out -- R9 : resistor 100 kΩ -- h -- R10 : resistor 100 kΩ -- ground
sweep I_in from 1 nA to 1 mA, 20 per decade
show out.v
read slope = per_decade(out.v)
require slope within 1 V ± 50 % as "scale"
`;

/** 303 elements, 229 unknowns: transistors with a resistor at each pin, on one supply and one base line. */
function largeText(): string {
  const cells = Array.from(
    { length: 75 },
    (_, k) => `vcc -- RC${k} : resistor 1 kΩ -- c${k}
line -- RB${k} : resistor 100 Ω -- b${k}
e${k} -- RE${k} : resistor 330 Ω -- ground
Q${k} : q { c = c${k}, b = b${k}, e = e${k} }`,
  );
  return `title "Bench, 300 elements"
knob V_base = 1.5 V
let R_gain = 100 Ω
model q : npn { Is = 2 fA, beta_f = 150, beta_r = 3, Va_f = 60 V }
ground -- VCC : voltage 5 V -- vcc
ground -- I1 : current V_base / 100 Ω -- line
line -- RL : resistor R_gain -- ground
${cells.join("\n")}
sweep V_base from 0.1 V to 2 V, 101 points
show line.v
`;
}

/**
 * Measures, in the browser, from a key stroke in the editor to the frame that shows the moved preview, and to the answer of the checker;
 * and the frames while a knob is dragged. Needs a running service (E2E_URL), built for production. Prints ms; asserts nothing.
 */
async function measure(): Promise<void> {
  const browser = await launchBrowser();
  const figures: Record<string, number> = {};
  try {
    const { page } = await openPage(browser);
    await signIn(page, "erik");
    await page.addInitScript(watch);
    for (const [name, text, aim] of [
      ["20 elements", SMALL, 50],
      ["300 elements", largeText(), 150],
    ] as const) {
      await open(page, text);
      const strokes = await type(page, STROKES, ["drawn", "checked"]);
      tell(`${name}: key stroke to moved preview`, strokes.drawn, figures, aim);
      tell(`${name}: key stroke to solved preview, of which`, strokes.moved, figures);
      tell(`${name}: key stroke to checked text`, strokes.checked, figures);
      tell(`${name}: frames while a knob is dragged`, await drag(page), figures);
    }
    await open(page, longText());
    const { checked } = await type(page, LONG_STROKES, ["checked"]);
    tell("2000 lines: key stroke to checked text", checked, figures);
  } finally {
    await browser.close();
  }
  if (process.argv.includes("--json")) console.log(JSON.stringify(figures));
}

function tell(
  name: string,
  taken: readonly number[],
  figures: Record<string, number>,
  aim: number | null = null,
): void {
  const sorted = taken.toSorted((a, b) => a - b);
  const at = (share: number) => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))]!;
  const round = (value: number) => Math.round(10 * value) / 10;
  figures[`${name}, median ms`] = round(at(0.5));
  figures[`${name}, 95th percentile ms`] = round(at(0.95));
  if (process.argv.includes("--json")) return;
  console.log(
    `${name}: median ${round(at(0.5))} ms${aim === null ? "" : ` (aim ${aim})`}, 95 % within ${round(at(0.95))} ms, least ${round(sorted[0]!)} ms, worst ${round(sorted.at(-1)!)} ms`,
  );
}

/** Runs in the page before its own scripts: notes when a key came, when an answer of a thread came, when curves were drawn and shown. */
function watch(): void {
  const state = { asked: 0, moved: 0, checked: 0, drawn: 0, frames: [] as number[] };
  window.watched = state;
  addEventListener(
    "keydown",
    () => Object.assign(state, { asked: performance.now(), moved: 0, checked: 0, drawn: 0 }),
    true,
  );
  const Threads = window.Worker;
  window.Worker = class extends Threads {
    constructor(...words: ConstructorParameters<typeof Worker>) {
      super(...words);
      this.addEventListener("message", ({ data }) => {
        if (data?.kind === "row") state.moved ||= performance.now();
        if (data?.examination !== undefined) state.checked ||= performance.now();
      });
    }
  };
  new MutationObserver(() => {
    if (state.moved === 0 || state.drawn > 0) return;
    // A message that is sent while a frame is made comes once the frame has been handed over.
    requestAnimationFrame(() => {
      const { port1, port2 } = new MessageChannel();
      port1.onmessage = () => {
        state.drawn ||= performance.now();
      };
      port2.postMessage(null);
    });
  }).observe(document, { subtree: true, childList: true, attributeFilter: ["data-preview", "data-drawn"] });
}

async function open(page: Page, text: string): Promise<void> {
  const id = await makeNetlist(page, text);
  await page.goto(`/${WORKSPACE}/netlists/${id}`);
  await (await editorOf(page)).focus();
  await page.locator('[data-preview="whole"]').waitFor();
  // Behind the first digit of R_gain, where each further one makes another value of it.
  const line = text.split("\n").findIndex((one) => one.startsWith(TURNED));
  await page.keyboard.press("Control+Home");
  for (let k = 0; k < line; k++) await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Home");
  for (let k = 0; k <= TURNED.length; k++) await page.keyboard.press("ArrowRight");
}

type Event = "drawn" | "moved" | "checked";

/** Types a digit and takes it away again, in turn; ms from each key to what came of it, once all that is waited for has come. */
async function type(
  page: Page,
  strokes: number,
  until: readonly Event[],
): Promise<Readonly<Record<Event, number[]>>> {
  const taken = { drawn: [] as number[], moved: [] as number[], checked: [] as number[] };
  for (let k = 0; k < WARM_UP + strokes; k++) {
    await page.keyboard.press(k % 2 === 0 ? String(1 + (k % 9)) : "Backspace");
    await page.waitForFunction((wanted) => wanted.every((one) => window.watched![one] > 0), until);
    const at = await page.evaluate(() => ({ ...window.watched! }));
    for (const one of ["drawn", "moved", "checked"] as const) {
      if (k >= WARM_UP && at[one] > 0) taken[one].push(at[one] - at.asked);
    }
    await page.waitForTimeout(APART);
  }
  return taken;
}

/** Moves the pointer of a knob over its ruler for some frames; ms between them. */
async function drag(page: Page): Promise<number[]> {
  const slider = page.getByRole("slider", { name: "temperature" });
  await slider.scrollIntoViewIfNeeded();
  const box = (await slider.boundingBox())!;
  // As text: the loader would name the function, by a name that the page does not have.
  await page.evaluate(`{
    const { frames } = window.watched;
    frames.length = 0;
    requestAnimationFrame(function note(at) {
      frames.push(at);
      requestAnimationFrame(note);
    });
  }`);
  await page.mouse.move(box.x + box.width / 3, box.y + 4);
  await page.mouse.down();
  for (let k = 0; k < FRAMES; k++) {
    await page.mouse.move(box.x + (box.width * (40 + 20 * Math.sin(k / 10))) / 100, box.y + 4);
    await page.waitForTimeout(16);
  }
  await page.mouse.up();
  const frames = await page.evaluate(() => window.watched!.frames.slice());
  return frames.slice(1).map((at, k) => at - frames[k]!);
}

await measure();
