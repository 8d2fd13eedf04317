import { EXPONENTIAL as E } from "@/lib/units/exponential";
import { bytesOf } from "./expression";
import {
  EMPTY,
  type FunctionBody,
  get,
  INTEGER,
  integer,
  type Kind,
  load,
  NUMBER,
  number,
  OPCODE,
  set,
  store,
  TRUNCATE,
} from "./module";

/** Where the exponents and what is made of them stand in the memory, and the tables of `lib/devices/exponential`; in numbers. */
export interface ExponentialPlaces {
  readonly count: number;
  readonly exponents: number;
  readonly less: number;
  readonly whole: number;
  readonly powers: number;
  readonly scales: number;
}

/** Variables by name, the integers first: y the exponent, n, r, q as in `exponential.ts`, h and k high and low of the power, s its scale. */
const [BYTE, INDEX] = [1, 2];
const LOCALS = ["y", "n", "r", "q", "h", "k", "s", "m", "e"];
const VARIABLES: readonly Kind[] = [INTEGER, INTEGER, ...LOCALS.map((): Kind => NUMBER)];
const localOf = (name: string): number => 3 + LOCALS.indexOf(name[0]!);
const give = (name: string, expression: string): number[] => [
  ...bytesOf(expression, localOf),
  ...set(localOf(name)),
];

/** From y: m + e is e^y where m is the table's part of it and e the rest, in the order of `exponential.ts`. */
function powers(places: Pick<ExponentialPlaces, "powers" | "scales">): number[] {
  const index = [...get(INDEX)];
  const power = [...index, ...integer(31), OPCODE.and, ...integer(4), OPCODE.shiftLeft];
  const scale = [...index, ...integer(5), OPCODE.shiftRight, ...integer(E.zero), OPCODE.integerAdd];
  return [
    ...give("n0", `y0*${E.inverseStep}+${E.rounder}-${E.rounder}`),
    ...give("r0", `y0-n0*${E.stepHigh}-n0*${E.stepLow}`),
    ...[...get(localOf("n0")), ...TRUNCATE, ...set(INDEX)],
    ...[...power, ...load(8 * places.powers), ...set(localOf("h0"))],
    ...[...power, ...load(8 * places.powers + 8), ...set(localOf("k0"))],
    ...[...scale, ...integer(3), OPCODE.shiftLeft, ...load(8 * places.scales), ...set(localOf("s0"))],
    ...give("q0", "r0*r0"),
    ...give("m0", "h0*s0"),
    ...give(
      "e0",
      `(h0*(r0+(q0*(0.5+r0*${1 / 6})+q0*q0*(${1 / 24}+r0*${1 / 120}+q0*(${1 / 720}+r0*${1 / 5040}))))+k0)*s0`,
    ),
  ];
}

/** `exponentials` of the same module as a function of WebAssembly, to the bit. */
export function exponentialsBody(places: ExponentialPlaces): FunctionBody {
  const y = get(localOf("y0"));
  const put = (start: number, expression: string) => [
    ...get(BYTE),
    ...bytesOf(expression, localOf),
    ...store(8 * start),
  ];
  const bytes = [
    ...[OPCODE.loop, EMPTY],
    ...[...get(BYTE), ...load(8 * places.exponents), ...set(localOf("y0"))],
    ...[...y, ...number(E.largest), OPCODE.lessOrEqual, ...y, ...number(E.smallest), OPCODE.greaterOrEqual],
    ...[OPCODE.and, OPCODE.if, EMPTY],
    ...powers(places),
    ...give("n0", `-40>y0?-1:m0-1+e0`),
    ...put(places.less, "n0"),
    ...put(places.whole, "-1>y0?m0+e0:n0+1"),
    OPCODE.else,
    ...give("n0", `y0>${E.largest}?1/0:-${-E.smallest}>y0?-1:y0`),
    ...put(places.less, "n0"),
    ...put(places.whole, "-1>y0?0:n0+1"),
    OPCODE.end,
    ...[...get(BYTE), ...integer(8), OPCODE.integerAdd, ...set(BYTE)],
    ...[...get(BYTE), ...integer(8 * places.count), OPCODE.integerLess, OPCODE.branchIf, 0],
    ...[OPCODE.end, ...integer(1)],
  ];
  return {
    name: "exponentials",
    bytes: places.count === 0 ? integer(1) : bytes,
    variables: VARIABLES,
  };
}

/** e^y − 1 for |y| ≤ 40 or not a number. */
export function expm1Body(places: Pick<ExponentialPlaces, "powers" | "scales">): FunctionBody {
  const bytes = [...get(0), ...set(localOf("y0")), ...powers(places), ...bytesOf("m0-1+e0", localOf)];
  return { name: "expm1", bytes, variables: VARIABLES, givesNumber: true };
}
