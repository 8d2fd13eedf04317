import { KELVIN, sameDimension } from "@/lib/units/dimension";
import type { Agreement } from "./agreement";
import type { Knob, NamedValue, Typed } from "./ast";
import type { Flat, ParameterStatement } from "./expand";
import { type Names, ownName } from "./names";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import type { Report } from "./report";
import { quote } from "./token";
import type { Judged, Known, Typing } from "./typing";
import { describeDimension, spellableUnit } from "./unit-check";
import { inOrder, type ValueStatement } from "./value-order";

/** What the values of a file are worked out with. */
interface Bench {
  readonly names: Names;
  readonly agreement: Agreement;
  readonly typing: Typing;
  readonly quantities: Quantities;
  readonly nominal: Nominal;
  readonly known: Map<string, Known>;
  readonly report: Report;
}

/** The value of a block's knob, and the range in which it must stay. */
export interface RangedValue extends NamedValue {
  readonly low: number;
  readonly high: number;
}

/** Checks all lets and knobs, in an order in which each uses only those before it, and fills `known` and `nominal`. */
export function checkValues(
  statements: readonly Flat[],
  bench: Bench,
): { knobs: Knob[]; lets: NamedValue[]; ranges: RangedValue[] } {
  const owners = new Map<string, ValueStatement>();
  for (const statement of statements) {
    if (statement.kind !== "let" && statement.kind !== "knob" && statement.kind !== "parameter") continue;
    const { text, from } = statement.name;
    const owns =
      text === "temperature"
        ? statement.kind === "knob"
        : isOwner(bench.names, text, from, statement.kind === "knob" ? "knob" : "let");
    if (text !== "" && owns && !owners.has(text)) owners.set(text, statement);
  }
  const knobs: Knob[] = [];
  const lets: NamedValue[] = [];
  const ranges: RangedValue[] = [];
  if (!owners.has("temperature")) knobs.push(defaultTemperature(bench));
  for (const statement of inOrder(owners, bench.names, bench.report)) {
    const judged =
      statement.kind === "parameter"
        ? parameterOf(statement, bench)
        : bench.typing.judge(statement.value, { signals: false, wanted: wantedFor(statement) });
    if (judged === null) continue;
    if (statement.kind !== "knob") {
      const value = letOf(statement, judged, bench);
      lets.push(value);
      const range = statement.kind === "parameter" ? rangeOf(statement, value.value, bench) : null;
      if (range !== null) ranges.push({ ...value, ...range });
    } else {
      const knob = knobOf(statement, judged, bench);
      if (knob !== null) knobs.push(knob);
    }
  }
  const textual = (a: NamedValue, b: NamedValue) => a.from - b.from;
  return { knobs: knobs.sort(textual), lets, ranges };
}

function isOwner(names: Names, name: string, from: number, kind: "let" | "knob"): boolean {
  return names.meaningOf(name) === kind && names.placeOf(name).from === from;
}

function wantedFor(statement: ValueStatement): string | null {
  return statement.name.text === "temperature" ? "°C" : null;
}

function defaultTemperature({ nominal, known }: Bench): Knob {
  const value: Typed = {
    op: "constant",
    value: nominal.of({ op: "knob", name: "temperature", dimension: KELVIN }),
    dimension: KELVIN,
  };
  known.set("temperature", { dimension: KELVIN, point: true });
  return { name: "temperature", value, tolerance: null, range: null, from: 0, to: 0 };
}

/** The value of a block's knob; where the instance gives it, it has the dimension of the default. */
function parameterOf(statement: ParameterStatement, { typing, quantities }: Bench): Judged | null {
  const { standard, value, name } = statement;
  const judged = typing.judge(standard ?? value, { signals: false, wanted: null });
  if (judged === null || standard === null) return judged;
  const { dimension } = judged.typed;
  const what = `The knob ${quote(ownName(name))} of the instance`;
  const typed = quantities.fitting(value, { dimension, unit: spellableUnit(dimension) ?? "1", what });
  return typed === null ? null : { typed, point: judged.point };
}

function letOf(statement: ValueStatement, { typed, point }: Judged, bench: Bench): NamedValue {
  const { name, value } = statement;
  const mover = bench.nominal.mover(typed);
  const number = bench.nominal.of(typed);
  if (mover === null) bench.quantities.finite(number, value);
  bench.known.set(name.text, { dimension: typed.dimension, point });
  bench.nominal.set(name.text, number);
  bench.nominal.setMover(name.text, mover);
  const tolerance = bench.quantities.tolerance(statement.tolerance, typed);
  return { name: name.text, value: typed, tolerance, from: statement.from, to: statement.to };
}

function knobOf(statement: ValueStatement, { typed, point }: Judged, bench: Bench): Knob | null {
  const { name, value } = statement;
  const { quantities, nominal, known, report } = bench;
  const isTemperature = name.text === "temperature";
  if (isTemperature && !sameDimension(typed.dimension, KELVIN)) {
    const what = describeDimension(typed.dimension);
    report.error(
      "UNI3",
      value,
      `The temperature is in °C or K, but ${bench.agreement.text(value)} is ${what}.`,
    );
    known.set(name.text, { dimension: KELVIN, point: true });
    return null;
  }
  known.set(name.text, { dimension: typed.dimension, point: point || isTemperature });
  const number = quantities.fixedNumber(typed, value, `The default of the knob ${quote(name.text)}`);
  if (number === null) return null;
  if (isTemperature && number <= 0) {
    report.error("UNI8", value, "The temperature must be above 0 K.");
    return null;
  }
  nominal.set(name.text, number);
  const folded: Typed = { op: "constant", value: number, dimension: typed.dimension };
  const tolerance = quantities.tolerance(statement.tolerance, folded);
  const range = rangeOf(statement, folded, bench);
  return { name: name.text, value: folded, tolerance, range, from: statement.from, to: statement.to };
}

/** The range of a knob, in which its value must lie. */
function rangeOf(statement: ValueStatement, folded: Typed, bench: Bench): Knob["range"] {
  if (statement.range === null) return null;
  const { quantities, nominal, report, agreement } = bench;
  const number = nominal.of(folded);
  const unit = spellableUnit(folded.dimension) ?? "1";
  const want = {
    dimension: folded.dimension,
    unit,
    what: `The range of the knob ${quote(ownName(statement.name))}`,
  };
  const low = quantities.fixed(statement.range.low, want);
  const high = quantities.fixed(statement.range.high, want);
  if (low === null || high === null) return null;
  const span = { from: statement.range.low.from, to: statement.range.high.to };
  if (low >= high) {
    const text = `${agreement.source(statement.range.high)} .. ${agreement.source(statement.range.low)}`;
    const fix = { title: "Exchange the two", ...span, text };
    const message = "The range of a knob goes from its lower end to its higher end; exchange the two.";
    report.error("PLN7", span, message, low > high ? fix : undefined);
    return null;
  }
  if (number < low || number > high) {
    const what = statement.kind === "knob" ? "default" : "value";
    const message = `The ${what} ${agreement.text(statement.value)} of the knob ${quote(ownName(statement.name))} is outside its range ${agreement.text(span)}.`;
    report.error("PLN6", statement.value, message);
  }
  return { low, high };
}
