import { examine } from "@/app/_components/editor/examine";
import { longText } from "./long-text";

/** Times that each text is checked, after some that warm the machine up. */
const TIMES = 80;
const WARM_UP = 20;
const AIM = 30;

/** The same with mistakes in every tenth line. */
function wrongText(turn: number): string {
  let line = 0;
  return longText(turn).replaceAll(/ -- ground\n/gu, (end) => (++line % 10 === 0 ? " -- grund.x\n" : end));
}

/**
 * Measures what the thread of the sheet needs to say what is wrong with a text of 2,000 lines that it has not seen: by the clock, and as
 * time of the processor, which others on the machine disturb less. Prints ms; asserts nothing.
 */
function measure(): void {
  const figures: Record<string, number> = {};
  const isJson = process.argv.includes("--json");
  for (const [name, text] of [
    ["2000 lines without a mistake", longText],
    ["2000 lines with mistakes in 100 of them", wrongText],
  ] as const) {
    const clock: number[] = [];
    const processor: number[] = [];
    for (let k = 0; k < WARM_UP + TIMES; k++) {
      const one = text(k);
      const used = process.cpuUsage();
      const begun = performance.now();
      examine(one);
      const took = performance.now() - begun;
      if (k < WARM_UP) continue;
      clock.push(took);
      processor.push(process.cpuUsage(used).user / 1000);
    }
    for (const [by, taken] of [
      ["clock", clock],
      ["processor", processor],
    ] as const) {
      const sorted = taken.toSorted((a, b) => a - b);
      const round = (value: number) => Math.round(10 * value) / 10;
      const [least, median] = [round(sorted[0]!), round(sorted[sorted.length >> 1]!)];
      figures[`diagnostics of ${name}, ${by}, least ms`] = least;
      figures[`diagnostics of ${name}, ${by}, median ms`] = median;
      if (!isJson) console.log(`${name}, ${by}: least ${least} ms, median ${median} ms (aim ${AIM})`);
    }
  }
  if (isJson) console.log(JSON.stringify(figures));
}

measure();
