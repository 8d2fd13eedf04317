import { coherentValue, isAmbient, shownValue } from "@/app/_components/curves/figures-in-words";
import { LINEAR, type Mapping, placeOf, valueAt } from "@/app/_components/curves/scale";
import { niceStep, type Tick, ticksOf } from "@/app/_components/curves/ticks";
import type { KnobOutline, Outline } from "./messages";

/** The ruler of a knob: whole steps from 0 to `steps` with a value each, coherent SI. */
export interface KnobScale {
  readonly low: number;
  readonly high: number;
  readonly isLogarithmic: boolean;
  readonly steps: number;
  valueAt(step: number): number;
  /** The step nearest to a value; one beyond the ruler stands at its end. */
  stepOf(value: number): number;
  /** Engraved marks, with their places from 0 to 1. */
  readonly ticks: readonly Pick<Tick, "place" | "rank">[];
}

/** From this ratio of its ends on a ruler is logarithmic. */
const DECADE = 10;
const STEPS_A_DECADE = 50;
const MOST_STEPS = 1000;
const LINEAR_STEPS = 200;
/** Values along a ruler have as many significant digits, so that what is written into the text is short. */
const DIGITS = 3;
/** °C; what parts for rough surroundings are commonly made for (common practice). */
const AMBIENT = { low: -40, high: 125 };

/**
 * The ruler of a knob goes over the sweep where it is the horizontal axis, else over the range that the text gives, else over an outer sweep,
 * else a decade to either side of its value. It is logarithmic where its ends have one sign and stand a decade apart.
 */
export function knobScale(knob: KnobOutline, { axes }: Pick<Outline, "axes">): KnobScale {
  const unit = { knob: knob.name, unit: knob.unit };
  const ends = endsOf(knob, axes);
  const low = shownValue(unit, ends.low);
  const high = shownValue(unit, ends.high);
  const sign = high < 0 ? -1 : 1;
  const isLogarithmic = !isAmbient(unit) && low * high > 0 && Math.max(low / high, high / low) >= DECADE;
  const mapping: Mapping = isLogarithmic ? { scale: "logarithmic", sign } : LINEAR;
  const [from, to] = [placeOf(mapping, low)!, placeOf(mapping, high)!];
  const step = niceStep(high - low, LINEAR_STEPS);
  const steps = isLogarithmic
    ? Math.min(MOST_STEPS, Math.ceil((to - from) * STEPS_A_DECADE - 1e-9))
    : Math.ceil((high - low) / step - 1e-9);
  const across = (place: number) => (place - from) / (to - from);
  const at = (k: number): number => {
    if (k <= 0) return low;
    if (k >= steps) return high;
    if (!isLogarithmic) return Number((low + k * step).toPrecision(12));
    return Number(valueAt(mapping, from + (k * (to - from)) / steps).toPrecision(DIGITS));
  };
  return {
    low: ends.low,
    high: ends.high,
    isLogarithmic,
    steps,
    valueAt: (k) => coherentValue(unit, at(k)),
    stepOf: (value) => {
      const place = placeOf(mapping, shownValue(unit, value));
      if (place === null) return 0;
      const share = isLogarithmic ? across(place) * steps : (place - low) / step;
      return Math.min(steps, Math.max(0, Math.round(share)));
    },
    ticks: ticksOf(from, to, mapping, 6).map(({ place, rank }) => ({ place: across(place), rank })),
  };
}

function endsOf(knob: KnobOutline, axes: Outline["axes"]): { low: number; high: number } {
  const axis = axes.find((one) => one.knob === knob.name);
  const swept = axis === undefined ? null : extentOf(axis.values);
  const given = knob.sweep === "first" ? (swept ?? knob.range) : (knob.range ?? swept);
  if (given !== null && given.low < given.high) return given;
  if (isAmbient({ knob: knob.name, unit: knob.unit })) return ambientWith(knob.value);
  const { value } = knob;
  if (value === 0 || !Number.isFinite(value)) return { low: -1, high: 1 };
  const [near, far] = [value / DECADE, value * DECADE].map((one) => Number(one.toPrecision(12)));
  return value > 0 ? { low: near!, high: far! } : { low: far!, high: near! };
}

function extentOf(values: readonly number[]): { low: number; high: number } {
  return {
    low: values.reduce((a, b) => Math.min(a, b)),
    high: values.reduce((a, b) => Math.max(a, b)),
  };
}

/** Kelvin; wide enough for the value too. */
function ambientWith(value: number): { low: number; high: number } {
  const coherent = (shown: number) => coherentValue({ knob: "temperature", unit: "K" }, shown);
  return { low: Math.min(coherent(AMBIENT.low), value), high: Math.max(coherent(AMBIENT.high), value) };
}
