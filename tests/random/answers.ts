import { readFileSync } from "node:fs";
import type { RandomSet } from "./sets";

/** Decimals of a volt to which the answers are kept; the narrowest bound is a thousand times as wide. */
export const DECIMALS = 19;

/** The voltages of a circuit's nets at 50 digits, cut to 19 decimals, in units of 1e-19 V and in the order of its nets. */
export function readAnswers({ answers }: RandomSet): readonly (readonly bigint[])[] {
  const lines = readFileSync(`tests/reference/${answers}`, "utf8").trimEnd().split("\n");
  return lines
    .filter((line) => !line.startsWith("#"))
    .map((line) => line.split(" ").map((word) => BigInt(word)));
}

/** |value − answer| in V; the difference is taken in whole numbers. */
export function distance(value: number, answer: bigint): number {
  const difference = exact(value) - (answer << SHIFT);
  return Number(difference < 0n ? -difference : difference) / Number(1n << SHIFT) / 10 ** DECIMALS;
}

const SHIFT = 120n;

/** value·10^19·2^120, rounded down to a whole number. */
function exact(value: number): bigint {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  const bits = view.getBigUint64(0);
  const exponent = (bits >> 52n) & 0x7ffn;
  const fraction = (bits & 0xfffffffffffffn) | (exponent === 0n ? 0n : 1n << 52n);
  const size = fraction * 10n ** BigInt(DECIMALS);
  const power = SHIFT + (exponent === 0n ? 1n : exponent) - 1075n;
  const scaled = power >= 0n ? size << power : size >> -power;
  return bits >> 63n === 1n ? -scaled : scaled;
}
