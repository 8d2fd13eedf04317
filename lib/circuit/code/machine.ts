import { EXPONENTIAL } from "@/lib/devices/exponential";
import { type ExponentialPlaces, expm1Body, exponentialsBody } from "./exponentials";
import { moduleOf, pagesFor } from "./module";
import type { StraightCode } from "./straight";

/** Modules kept with the text they were made from, so that the shards of one run share what is compiled. */
const MOST_KEPT = 64;

const kept = new Map<string, WebAssembly.Module>();
let isAllowed: boolean | null = null;

/** The number of the function that works out all exponentials, behind EXPM1. */
export const EXPONENTIALS = 1;

/** Generated code: 1, or 0 where a demand is not met. The parameter is the share of the sources. */
export type Compiled = (share: number) => number;

/** Whether code may be generated here; a page's content policy may forbid it. Tried once. */
export function mayCompile(): boolean {
  if (isAllowed === null) {
    try {
      isAllowed = new WebAssembly.Module(moduleOf([], 0)) instanceof WebAssembly.Module;
    } catch {
      isAllowed = false;
    }
  }
  return isAllowed;
}

/** What generated code works on: a memory, in numbers from its beginning, with the tables of the exponentials at its end. */
export class Machine {
  readonly numbers: Float64Array;
  private readonly memory: WebAssembly.Memory;
  private readonly bytes: number;
  private readonly places: ExponentialPlaces;

  /** `count` numbers, and the exponentials of which of them. */
  constructor(
    count: number,
    exponentials: Pick<ExponentialPlaces, "count" | "exponents" | "less" | "whole">,
  ) {
    const { powers, scales } = EXPONENTIAL;
    this.places = { ...exponentials, powers: count, scales: count + powers.length };
    this.bytes = 8 * (count + powers.length + scales.length);
    const pages = pagesFor(this.bytes);
    this.memory = new WebAssembly.Memory({ initial: pages, maximum: pages });
    this.numbers = new Float64Array(this.memory.buffer, 0, this.bytes / 8);
    this.numbers.set(powers, this.places.powers);
    this.numbers.set(scales, this.places.scales);
  }

  /** Compiles codes, each to a function of its name. */
  compile<Name extends string>(
    codes: Readonly<Record<Name, StraightCode>>,
  ): Readonly<Record<Name, Compiled>> {
    const entries = Object.entries<StraightCode>(codes);
    const key = [JSON.stringify(this.places), ...entries.map(([name, { text }]) => `${name}\n${text}`)].join(
      "\n\n",
    );
    let module = kept.get(key);
    if (module === undefined) {
      if (kept.size >= MOST_KEPT) kept.clear();
      const bodies = entries.map(([name, code]) => code.compile(name));
      module = new WebAssembly.Module(
        moduleOf([expm1Body(this.places), exponentialsBody(this.places), ...bodies], this.bytes),
      );
      kept.set(key, module);
    }
    const { exports } = new WebAssembly.Instance(module, { memory: { memory: this.memory } });
    return exports as Record<Name, Compiled>;
  }
}
