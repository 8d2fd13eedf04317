import { KELVIN, sameDimension } from "@/lib/units/dimension";
import type { Agreement } from "./agreement";
import type { Knob, NamedValue, Typed } from "./ast";
import type { Names } from "./names";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import type { Report } from "./report";
import type { Expression, Statement } from "./syntax";
import { quote } from "./token";
import type { Judged, Known, Typing } from "./typing";
import { describeDimension, spellableUnit } from "./unit-check";

type ValueStatement = Extract<Statement, { kind: "let" | "knob" }>;

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

/** Checks all lets and knobs, in an order in which each uses only those before it, and fills `known` and `nominal`. */
export function checkValues(
  statements: readonly Statement[],
  bench: Bench,
): { knobs: Knob[]; lets: NamedValue[] } {
  const owners = new Map<string, ValueStatement>();
  for (const statement of statements) {
    if (statement.kind !== "let" && statement.kind !== "knob") continue;
    const { text, from } = statement.name;
    const owns =
      text === "temperature" ? statement.kind === "knob" : isOwner(bench.names, text, from, statement.kind);
    if (text !== "" && owns && !owners.has(text)) owners.set(text, statement);
  }
  const knobs: Knob[] = [];
  const lets: NamedValue[] = [];
  if (!owners.has("temperature")) knobs.push(defaultTemperature(bench));
  for (const statement of inOrder(owners, bench.report)) {
    const judged = bench.typing.judge(statement.value, { signals: false, wanted: wantedFor(statement) });
    if (judged === null) continue;
    if (statement.kind === "let") lets.push(letOf(statement, judged, bench));
    else {
      const knob = knobOf(statement, judged, bench);
      if (knob !== null) knobs.push(knob);
    }
  }
  const textual = (a: NamedValue, b: NamedValue) => a.from - b.from;
  return { knobs: knobs.sort(textual), lets };
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
  const range = rangeOf(statement, folded, number, bench);
  return { name: name.text, value: folded, tolerance, range, from: statement.from, to: statement.to };
}

function rangeOf(statement: ValueStatement, folded: Typed, number: number, bench: Bench): Knob["range"] {
  if (statement.range === null) return null;
  const { quantities, report, agreement } = bench;
  const unit = spellableUnit(folded.dimension) ?? "1";
  const want = {
    dimension: folded.dimension,
    unit,
    what: `The range of the knob ${quote(statement.name.text)}`,
  };
  const low = quantities.fixed(statement.range.low, want);
  const high = quantities.fixed(statement.range.high, want);
  if (low === null || high === null) return null;
  const span = { from: statement.range.low.from, to: statement.range.high.to };
  if (low >= high) {
    report.error(
      "PLN7",
      span,
      "The range of a knob goes from its lower end to its higher end; exchange the two.",
    );
    return null;
  }
  if (number < low || number > high) {
    const message = `The default ${agreement.text(statement.value)} of the knob ${quote(statement.name.text)} is outside its range ${agreement.text(span)}.`;
    report.error("PLN6", statement.value, message);
  }
  return { low, high };
}

/** Orders by use (Kahn 1962); what uses itself, directly or round a ring, is reported and left out, as is what uses that. */
function inOrder(owners: ReadonlyMap<string, ValueStatement>, report: Report): ValueStatement[] {
  const waiting = new Map<string, number>();
  const usedBy = new Map<string, string[]>();
  const uses = new Map<string, Set<string>>();
  for (const [name, statement] of owners) {
    const used = new Set<string>();
    const amounts = [
      statement.tolerance?.amount,
      statement.tolerance?.track?.within,
      statement.range?.low,
      statement.range?.high,
    ];
    for (const expression of [statement.value, ...amounts])
      if (expression) collectNames(expression, owners, used);
    uses.set(name, used);
    waiting.set(name, used.size);
    for (const one of used) usersOf(usedBy, one).push(name);
  }
  const ready = [...owners.keys()].filter((name) => waiting.get(name) === 0);
  const ordered: ValueStatement[] = [];
  for (let i = 0; i < ready.length; i++) {
    ordered.push(owners.get(ready[i]!)!);
    for (const user of usedBy.get(ready[i]!) ?? []) {
      const left = waiting.get(user)! - 1;
      waiting.set(user, left);
      if (left === 0) ready.push(user);
    }
  }
  if (ordered.length < owners.size) reportRings(owners, uses, new Set(ready), report);
  return ordered;
}

/** Strips what only hangs on a ring, then names each member that is left with the one it uses. */
function reportRings(
  owners: ReadonlyMap<string, ValueStatement>,
  uses: ReadonlyMap<string, ReadonlySet<string>>,
  done: ReadonlySet<string>,
  report: Report,
): void {
  const rest = new Set([...owners.keys()].filter((name) => !done.has(name)));
  const usersLeft = new Map<string, number>();
  for (const name of rest)
    for (const used of uses.get(name)!) usersLeft.set(used, (usersLeft.get(used) ?? 0) + 1);
  const loose = [...rest].filter((name) => !usersLeft.get(name));
  for (let i = 0; i < loose.length; i++) {
    rest.delete(loose[i]!);
    for (const used of uses.get(loose[i]!)!) {
      const left = usersLeft.get(used)! - 1;
      usersLeft.set(used, left);
      if (left === 0 && rest.has(used)) loose.push(used);
    }
  }
  for (const name of rest) {
    const through = [...uses.get(name)!].find((used) => rest.has(used))!;
    const way = through === name ? "" : ` through ${quote(through)}`;
    const message = `${quote(name)} is defined by itself${way}; give one of them a value of its own.`;
    report.error("NAM9", owners.get(name)!.name, message);
  }
}

function collectNames(expression: Expression, owners: ReadonlyMap<string, unknown>, into: Set<string>): void {
  switch (expression.kind) {
    case "name":
      if (expression.path.length === 1) {
        const name = expression.path[0]!.text === "V_T" ? "temperature" : expression.path[0]!.text;
        if (owners.has(name)) into.add(name);
      }
      break;
    case "unary":
      collectNames(expression.operand, owners, into);
      break;
    case "binary":
      collectNames(expression.left, owners, into);
      collectNames(expression.right, owners, into);
      break;
    case "call":
      for (const arg of expression.args) collectNames(arg, owners, into);
      break;
  }
}

function usersOf(usedBy: Map<string, string[]>, name: string): string[] {
  const users = usedBy.get(name) ?? [];
  usedBy.set(name, users);
  return users;
}
