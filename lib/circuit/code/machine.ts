import { EXPONENTIAL } from "@/lib/units/exponential";
import { type ExponentialPlaces, expm1Body, exponentialsBody } from "./exponentials";
import { type FunctionBody, moduleOf, pagesFor } from "./module";

/** Modules kept with the text they were made from, so that the shards of one run share what is compiled. */
const MOST_KEPT = 64;

const kept = new Map<string, WebAssembly.Module>();
let isAllowed: boolean | null = null;

/** The number of the function that works out all exponentials, behind EXPM1. */
export const EXPONENTIALS = 1;
export const FIRST_OWN = 2;

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

/** Code that becomes a function; the text names what it does. */
export interface Code {
  readonly text: string;
  compile(name: string): FunctionBody;
}

/** What generated code works on: a memory, with numbers from its beginning, the tables of the exponentials, and integers at its end. */
export class Machine {
  readonly numbers: Float64Array;
  readonly integers: Int32Array;
  private readonly memory: WebAssembly.Memory;
  private readonly bytes: number;
  private readonly places: ExponentialPlaces;

  /** `count` numbers, the exponentials of which of them, and a count of integers. */
  constructor(
    count: number,
    exponentials: Pick<ExponentialPlaces, "count" | "exponents" | "less" | "whole">,
    integers = 0,
  ) {
    const { powers, scales } = EXPONENTIAL;
    this.places = { ...exponentials, powers: count, scales: count + powers.length };
    this.bytes = Machine.integersStart(count) + 4 * integers;
    const pages = pagesFor(this.bytes);
    this.memory = new WebAssembly.Memory({ initial: pages, maximum: pages });
    const { buffer } = this.memory;
    this.numbers = new Float64Array(buffer, 0, Machine.integersStart(count) / 8);
    this.integers = new Int32Array(buffer, Machine.integersStart(count), integers);
    this.numbers.set(powers, this.places.powers);
    this.numbers.set(scales, this.places.scales);
  }

  /** The byte at which the integers begin behind so many numbers. */
  static integersStart(count: number): number {
    return 8 * (count + EXPONENTIAL.powers.length + EXPONENTIAL.scales.length);
  }

  /** Compiles codes, each to a function of its name; those before it may be called by their numbers, which begin at FIRST_OWN. */
  compile<Name extends string>(codes: Readonly<Record<Name, Code>>): Readonly<Record<Name, Compiled>> {
    const entries = Object.entries<Code>(codes);
    const texts = entries.map(([name, { text }]) => `${name}\n${text}`);
    const key = [JSON.stringify(this.places), this.bytes, ...texts].join("\n\n");
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
