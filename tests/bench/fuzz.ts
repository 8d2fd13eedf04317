import { readdirSync, readFileSync } from "node:fs";
import { setFlagsFromString } from "node:v8";
import { runInNewContext } from "node:vm";
import { complaintOf, randomTexts } from "../language/random-texts";

/** Texts by default; another number, and a seed, may be given: `npx tsx tests/bench/fuzz.ts 10000 7`. */
const TEXTS = 1_000_000;
/** A text of a few hundred characters that takes longer than this of the processor's time hangs. */
const LONGEST_MS = 2_000;
const ROUNDS = 20;

function samples(): string[] {
  const folders = ["examples", "tests/golden/checker", "tests/golden/format", "tests/golden/parser"];
  return folders.flatMap((folder) =>
    readdirSync(folder)
      .filter((name) => name.endsWith(".swn"))
      .map((name) => readFileSync(`${folder}/${name}`, "utf8")),
  );
}

/** Memory held after everything that can be collected was. */
function heldMegabytes(): number {
  setFlagsFromString("--expose-gc");
  const collect = runInNewContext("gc") as () => void;
  collect();
  return process.memoryUsage().heapUsed / 1e6;
}

/** Checks, formats and colours random and mutated texts; counts throws, hangs, unsound answers, and the growth of memory. */
function fuzz(texts: number, seed: number): void {
  const next = randomTexts(seed, samples());
  const round = Math.ceil(texts / ROUNDS);
  let bad = 0;
  let slowest = 0;
  let characters = 0;
  let first: number | null = null;
  const began = performance.now();
  for (let k = 0; k < texts; k++) {
    const text = next();
    characters += text.length;
    const start = process.cpuUsage();
    let complaint: string | null;
    try {
      complaint = complaintOf(text);
    } catch (error) {
      complaint = `a throw: ${error instanceof Error ? error.stack : String(error)}`;
    }
    const { user, system } = process.cpuUsage(start);
    const took = (user + system) / 1000;
    slowest = Math.max(slowest, took);
    if (took > LONGEST_MS) complaint ??= `${took.toFixed(0)} ms`;
    if (complaint !== null) {
      bad += 1;
      console.log(`text ${k} of seed ${seed}: ${complaint}\n${JSON.stringify(text)}`);
    }
    if ((k + 1) % round === 0) {
      const held = heldMegabytes();
      first ??= held;
      console.log(`${k + 1} texts, ${bad} bad, slowest ${slowest.toFixed(0)} ms, ${held.toFixed(1)} MB held`);
    }
  }
  const seconds = (performance.now() - began) / 1000;
  const growth = heldMegabytes() - (first ?? 0);
  console.log(
    `${texts} texts of ${(characters / texts).toFixed(0)} characters in ${seconds.toFixed(0)} s: ${bad} bad, slowest ${slowest.toFixed(0)} ms, memory grew by ${growth.toFixed(1)} MB`,
  );
  if (process.argv.includes("--json")) {
    const figures = { fuzzTexts: texts, fuzzBad: bad, fuzzSlowestMs: slowest, fuzzGrowthMegabytes: growth };
    console.log(JSON.stringify(figures));
  }
  if (bad > 0) process.exitCode = 1;
}

const numbers = process.argv.slice(2).map(Number).filter(Number.isInteger);
fuzz(numbers[0] ?? TEXTS, numbers[1] ?? 1);
