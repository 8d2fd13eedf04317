import { formatQuantity, unitOf } from "@/lib/units/quantity";
import type { Element, Model, NamedValue, Sweep, Typed } from "./ast";
import { KINDS } from "./kinds";
import type { Nominal } from "./nominal";
import type { Report } from "./report";
import { quote } from "./token";
import type { RangedValue } from "./values";

/** Values worked out at most; beyond it the last sweeps are not judged here. */
const MOST_WORK = 2_000_000;

/** A value that a knob moves, with what it is called and where it must stay. */
interface Moved {
  readonly typed: Typed;
  readonly what: string;
  readonly low: number;
  readonly high: number;
  /** Whether the lower bound itself is out of bounds. */
  readonly isOpen: boolean;
}

interface Parts {
  readonly lets: readonly NamedValue[];
  readonly ranges: readonly RangedValue[];
  readonly models: readonly Model[];
  readonly elements: readonly Element[];
  readonly sweeps: readonly Sweep[];
}

/**
 * Reports sweeps that lead a value of an element or model out of its bounds or to no number. Each sweep is judged at its two ends,
 * the other knobs at their defaults; what happens elsewhere is the solver's to say, point by point.
 */
export function checkBounds(
  { lets, ranges, models, elements, sweeps }: Parts,
  nominal: Nominal,
  report: Report,
): void {
  const moved = [...ranges.map(ofRange), ...models.flatMap(ofModel), ...elements.flatMap(ofElement)].filter(
    ({ typed }) => nominal.mover(typed) !== null,
  );
  if (moved.length === 0) return;
  const moving = lets.filter(({ value }) => nominal.mover(value) !== null);
  const judge = (sweep: Sweep, value: number): boolean => {
    const restore = nominal.turn(sweep.knob, value, moving);
    const wrong = moved.find(
      ({ typed, low, high, isOpen }) => !isWithin(nominal.of(typed), low, high, isOpen),
    );
    if (wrong !== undefined) {
      const number = nominal.of(wrong.typed);
      const reached = formatQuantity(number, unitOf(wrong.typed.dimension));
      const must = Number.isFinite(number) ? boundOf(wrong, number) : "needs one";
      const at = `${quote(sweep.knob)} = ${formatQuantity(value, unitOf(sweep.dimension))}`;
      report.error("PLN9", sweep, `At ${at} ${wrong.what} has ${reached} but ${must}; narrow the sweep.`);
    }
    restore();
    return wrong === undefined;
  };
  const judged = Math.ceil(MOST_WORK / (moving.length + moved.length));
  for (const sweep of sweeps.slice(0, judged)) {
    const [least, most] = endsOf(sweep.values);
    if (judge(sweep, least) && most !== least) judge(sweep, most);
  }
}

function boundOf({ typed, low, high, isOpen }: Moved, number: number): string {
  const bound = formatQuantity(number > high ? high : low, unitOf(typed.dimension));
  if (number > high) return `must be at most ${bound}`;
  return `must be ${isOpen ? "above" : "at least"} ${bound}`;
}

function ofRange({ name, value, low, high }: RangedValue): Moved {
  return { typed: value, what: quote(name), low, high, isOpen: false };
}

function ofModel({ name, kind, params }: Model): Moved[] {
  return [...params].map(([key, { value }]) => {
    const {
      low = Number.NEGATIVE_INFINITY,
      high = Number.POSITIVE_INFINITY,
      open = false,
    } = KINDS[kind].parameters[key]!;
    return { typed: value, what: `${quote(key)} of the model ${quote(name)}`, low, high, isOpen: open };
  });
}

function ofElement({ name, kind, value, params }: Element): Moved[] {
  const found: Moved[] = [...params].map(([key, { value: typed }]) => {
    const {
      low = Number.NEGATIVE_INFINITY,
      high = Number.POSITIVE_INFINITY,
      open = false,
    } = KINDS[kind].parameters[key]!;
    return { typed, what: `${quote(key)} of ${quote(name)}`, low, high, isOpen: open };
  });
  if (value === null) return found;
  const low = kind === "resistor" ? 0 : Number.NEGATIVE_INFINITY;
  return [
    {
      typed: value.value,
      what: `the ${kind} ${quote(name)}`,
      low,
      high: Number.POSITIVE_INFINITY,
      isOpen: kind === "resistor",
    },
    ...found,
  ];
}

function isWithin(value: number, low: number, high: number, isOpen: boolean): boolean {
  return Number.isFinite(value) && (isOpen ? value > low : value >= low) && value <= high;
}

function endsOf(values: readonly number[]): readonly [number, number] {
  let least = Number.POSITIVE_INFINITY;
  let most = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    least = Math.min(least, value);
    most = Math.max(most, value);
  }
  return [least, most];
}
