import { formatAxis } from "@/lib/units/quantity";
import type { Tick } from "./ticks";

/** Labels of an axis and the unit written once beside its name. */
export interface TickLabels {
  readonly unit: string;
  readonly texts: ReadonlyMap<Tick, string>;
}

const NARROW = "\u202f";

/**
 * Labels of a linear axis with one prefix for all of them: "−200", "0", "200" and the unit "mV". As many decimals as the step
 * between labels needs, however far from zero the axis stands. A unit that takes no prefix is written with each label's own power.
 */
export function linearLabels(ticks: readonly Tick[], unit: string): TickLabels {
  const labelled = ticks.filter((tick) => tick.labelled);
  const largest = Math.max(0, ...labelled.map(({ value }) => Math.abs(value)));
  const power = largest === 0 ? 0 : 3 * Math.floor(Math.log10(largest) / 3 + 1e-9);
  const [one, prefixed] = formatAxis(Number(`1e${power}`), unit).split(NARROW);
  if (one !== "1" || prefixed === undefined) {
    return { unit, texts: new Map(labelled.map((tick) => [tick, bare(tick, labelled, unit)])) };
  }
  const decimals = decimalsOf(labelled, power);
  const texts = new Map(labelled.map((tick) => [tick, written(tick.value, power, decimals)]));
  return { unit: prefixed, texts };
}

/** Labels of a logarithmic axis: each with its own prefix and unit, "10 nA", "1 µA". */
export function decadeLabels(ticks: readonly Tick[], unit: string): TickLabels {
  const labelled = ticks.filter((tick) => tick.labelled);
  return { unit, texts: new Map(labelled.map((tick) => [tick, formatAxis(tick.value, unit)])) };
}

function decimalsOf(ticks: readonly Tick[], power: number): number {
  const [first, second] = ticks;
  if (first === undefined || second === undefined) return 3;
  const step = Math.abs(second.value - first.value);
  return Math.min(12, Math.max(0, power - Math.floor(Math.log10(step) + 1e-9)));
}

function written(value: number, power: number, decimals: number): string {
  return value === 0 ? "0" : (value / 10 ** power).toFixed(decimals).replace("-", "\u2212");
}

/** A label without a prefix: plain decimals within reach of the eye, a power of ten beyond. */
function bare(tick: Tick, ticks: readonly Tick[], unit: string): string {
  const text = formatAxis(tick.value, unit);
  if (text.includes("·10") || tick.value === 0) return text.split(NARROW + unit)[0]!;
  return written(tick.value, 0, decimalsOf(ticks, 0));
}
