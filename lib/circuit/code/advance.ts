import type { Frame } from "../frame";
import { bytesOf } from "./expression";
import { EMPTY, type FunctionBody, get, INTEGER, integer, load, NUMBER, OPCODE, set, store } from "./module";
import type { StraightCode } from "./straight";

/** The two-sum of `advance` of a state: from a + l and the step d to h and what is left of it. */
const SUMS = [
  ["s", "a0+d0"],
  ["p", "s0-a0"],
  ["r", "l0+(a0-(s0-p0)+(d0-p0))"],
  ["h", "s0+r0"],
  ["q", "r0-(h0-s0)"],
] as const;

/** Writes `advance` of a state as straight code; the step has the letter d. */
export function writeAdvance(code: StraightCode, { size, starts }: Frame): void {
  for (let j = 0; j < size; j++) {
    const names = new Map([
      ["a0", `z${starts.x + j}`],
      ["l0", `z${starts.low + j}`],
      ["d0", `d${j}`],
    ]);
    for (const [name, sum] of SUMS) {
      names.set(`${name}0`, code.let(sum.replace(/[a-z]0/g, (word) => names.get(word)!)));
    }
    code.set(`z${starts.x + j}`, names.get("h0")!);
    code.set(`z${starts.low + j}`, names.get("q0")!);
  }
}

/** The same as a loop; `solution` tells where the step begins. */
export function advanceLoop({ size, starts }: Frame, solution: number): FunctionBody {
  const letters = ["a", "l", "d", ...SUMS.map(([name]) => name)];
  const localOf = (name: string) => 2 + letters.indexOf(name[0]!);
  const at = get(1);
  const bring = (letter: string, start: number) => [...at, ...load(8 * start), ...set(localOf(letter))];
  const bytes = [
    ...[OPCODE.loop, EMPTY],
    ...[...bring("a", starts.x), ...bring("l", starts.low), ...bring("d", solution)],
    ...SUMS.flatMap(([name, sum]) => [...bytesOf(sum, localOf), ...set(localOf(name))]),
    ...[
      ...at,
      ...get(localOf("h")),
      ...store(8 * starts.x),
      ...at,
      ...get(localOf("q")),
      ...store(8 * starts.low),
    ],
    ...[...at, ...integer(8), OPCODE.integerAdd, ...set(1)],
    ...[...at, ...integer(8 * size), OPCODE.integerLess, OPCODE.branchIf, 0, OPCODE.end, ...integer(1)],
  ];
  return { name: "advance", bytes, variables: [INTEGER, ...letters.map(() => NUMBER as typeof NUMBER)] };
}
