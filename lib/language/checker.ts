import { Agreement } from "./agreement";
import type { Design, Element, Show, Sweep } from "./ast";
import { checkBounds } from "./bounds";
import { checkContract } from "./contract";
import { type Diagnostic, removal } from "./diagnostic";
import { DrawsCheck } from "./draws-check";
import { ElementCheck, modelKinds } from "./elements";
import { Expander, type Expansion, type Flat } from "./expand";
import { FUNCTION_NAMES } from "./functions";
import { tokenize } from "./lexer";
import {
  count,
  LEAST_SHELF_TEXT,
  MOST_POINTS,
  MOST_SHELF_TEXT,
  MOST_VALUES,
  MOST_WORD,
  SHARED,
  type Size,
} from "./limits";
import { declareAll, Names } from "./names";
import { Nominal } from "./nominal";
import { parseTokens } from "./parser";
import { Quantities } from "./quantities";
import { Report } from "./report";
import { type CheckShelf, type Library, Shelves } from "./shelves";
import { checkShows } from "./shows";
import type { Span } from "./span";
import { SweepCheck } from "./sweeps";
import type { Netlist } from "./syntax";
import { quote, type Token } from "./token";
import { type Known, Typing } from "./typing";
import { checkValues } from "./values";
import { Wirer } from "./wired";

/** `design` is null exactly where a diagnostic is an error; diagnostics are sorted by place. */
export interface Checked {
  readonly netlist: Netlist;
  readonly design: Design | null;
  readonly diagnostics: Diagnostic[];
}

/** Where the texts are that `use` names; without it no shelf is at hand. */
export interface CheckOptions {
  readonly library?: Library | null;
  /** How large a circuit may be; SHARED where it is not said. */
  readonly size?: Size;
}

/** Reads and checks a netlist text: everything but its wiring, which is checked on the design. Never throws; linear time. */
export function check(text: string, { library = null, size = SHARED }: CheckOptions = {}): Checked {
  const shelves = new Map<string, Checked>();
  let left = MOST_SHELF_TEXT;
  const one = (own: string, active: readonly string[]): Checked | null => {
    left -= Math.max(own.length, LEAST_SHELF_TEXT);
    if (left < 0) return null;
    const known = shelves.get(own);
    if (known !== undefined) return known;
    const checked = checkText(own, active, library, one, size);
    shelves.set(own, checked);
    return checked;
  };
  return checkText(text, [], library, one, size);
}

/** As `check`, for a text that the shelves `active` are being fetched around. */
function checkText(
  text: string,
  active: readonly string[],
  library: Library | null,
  checkShelf: CheckShelf,
  size: Size,
): Checked {
  const report = new Report();
  if (text.length > size.text) {
    const message = `The text has ${count(text.length)} characters, and a netlist can have ${count(size.text)} at most; split it.`;
    report.error("CAP1", { from: 0, to: text.length }, message);
    return { netlist: { statements: [] }, design: null, diagnostics: report.sorted() };
  }
  const tokens = tokenize(text, report);
  const { netlist } = parseTokens(tokens, text.length, report);
  if (hasLongWords(tokens, report)) return { netlist, design: null, diagnostics: report.sorted() };
  const shelves = new Shelves(library, checkShelf, report);
  const imports = shelves.imports(netlist.statements, active);
  const expansion = new Expander(report, size.unfolded).file(netlist.statements, imports);
  const design = checkExpansion(expansion, { source: text, isComplete: shelves.isComplete, size }, report);
  return { netlist, design: report.hasErrors ? null : design, diagnostics: report.sorted() };
}

function checkExpansion(
  { statements, trials, isWhole }: Expansion,
  { source, isComplete, size }: { source: string; isComplete: boolean; size: Size },
  report: Report,
): Design {
  const names = new Names(report, FUNCTION_NAMES);
  const nominal = new Nominal();
  const known = new Map<string, Known>();
  const pins = new Map<string, Readonly<Record<string, string>>>();
  const agreement = new Agreement(source, report);
  const typing = new Typing(agreement, names, report, known, (element) => pins.get(element) ?? null);
  const quantities = new Quantities(typing, agreement, nominal, report);

  names.isIncomplete = !isComplete || statements.some((one) => one.kind === "block" && !one.isClosed);
  declareAll(statements, names);
  const kinds = modelKinds(statements, names, report);
  const wired = new Wirer(names, kinds, report).wire(statements);
  for (const one of wired) pins.set(one.name.text, one.pins);

  const {
    knobs,
    lets: allLets,
    ranges,
  } = checkValues(statements, {
    names,
    agreement,
    typing,
    quantities,
    nominal,
    known,
    report,
  });
  const elementCheck = new ElementCheck(quantities, nominal, report);
  const own = ownOf(trials);
  const lets = allLets.filter(own);
  const models = elementCheck.models(statements, kinds).filter(own);
  const elements = wired.map((one) => elementCheck.element(one)).filter(own);
  const sweeps = new SweepCheck(names, typing, agreement, quantities, known, knobs, report).sweeps(
    statements,
  );
  const drawsCheck = new DrawsCheck(quantities, report);
  const draws = drawsCheck.draws(statements);
  const seek = drawsCheck.seek(statements);
  const shown = checkShows(statements, source, typing, report);
  const understood = { names, nominal, agreement, typing, quantities, known, report };
  const asked = { source, knobs, lets: allLets, sweeps, shows: shown, draws };
  const contract = checkContract(statements, { ...understood, ...asked });
  const { shows } = contract;

  if (!report.hasErrors)
    checkBounds({ lets, ranges: ranges.filter(own), models, elements, sweeps }, nominal, report);
  const title = titleOf(statements, report);
  const netPlaces = placesOf(names, own);
  const nets = [...netPlaces.keys()];
  const random = draws?.count ?? 0;
  if (isWhole) checkElements(elements, size, report);
  checkValueCount(isWhole ? elements : [], nets, { sweeps, random }, shows, report);
  checkDraws(statements, sweeps, random, report);
  if (shows.length === 0 && !report.hasErrors) {
    const span = { from: source.length, to: source.length };
    report.warning(
      "PLN8",
      span,
      "Nothing is shown, so a run keeps no trace; add a line such as `show out.v`.",
    );
  }
  const plan = { sweeps, draws, seek, ...contract };
  return { title, knobs, lets, models, elements, nets, netPlaces, ...plan };
}

/** Reports the words that are too long for names; with them a text is understood no further. */
function hasLongWords(tokens: readonly Token[], report: Report): boolean {
  const long = tokens.filter(({ kind, text }) => kind === "word" && text.length > MOST_WORD);
  for (const word of long) {
    const message = `${quote(word.text)} has ${count(word.text.length)} characters, and a name can have ${count(MOST_WORD)} at most; shorten it.`;
    report.error("CAP9", { from: word.from, to: word.to }, message);
  }
  return long.length > 0;
}

/** Tells what belongs to the circuit from what was made to check a block without an instance. */
function ownOf(trials: readonly string[]): (named: { readonly name: string }) => boolean {
  const tried = new Set(trials);
  return ({ name }) => {
    if (tried.size === 0) return true;
    for (let dot = name.indexOf("."); dot !== -1; dot = name.indexOf(".", dot + 1)) {
      if (tried.has(name.slice(0, dot + 1))) return false;
    }
    return true;
  };
}

function titleOf(statements: readonly Flat[], report: Report): string {
  let title: string | null = null;
  for (const statement of statements) {
    if (statement.kind !== "title") continue;
    if (title !== null)
      report.error(
        "FRM9",
        statement,
        "A netlist has one title; remove this one or the other.",
        removal(statement),
      );
    title ??= statement.text.text;
  }
  return title ?? "";
}

function placesOf(names: Names, own: (named: { readonly name: string }) => boolean): Map<string, Span> {
  const places = new Map<string, Span>();
  for (const net of names.namesOf(["net"])) {
    if (net !== "ground" && own({ name: net })) places.set(net, names.placeOf(net));
  }
  return places;
}

function checkElements(elements: readonly Element[], { elements: most }: Size, report: Report): void {
  const first = elements[most];
  if (first === undefined) return;
  const message = `The netlist has ${count(elements.length)} elements, and a circuit can have ${count(most)} at most.`;
  report.error("CAP3", first, message);
}

function checkValueCount(
  elements: readonly Element[],
  nets: readonly string[],
  { sweeps, random }: { readonly sweeps: readonly Sweep[]; readonly random: number },
  shows: readonly Show[],
  report: Report,
): void {
  const points = sweeps.reduce((product, sweep) => product * sweep.values.length, random + 1);
  const branches = elements.filter(
    ({ kind, law }) => kind === "voltage" || kind === "opamp" || kind === "gain" || law?.quantity === "volts",
  ).length;
  const values = points * (shows.length + nets.length + branches);
  if (values > MOST_VALUES) {
    const message = `The plan would keep ${count(values)} values (points times traces and unknowns), and ${count(MOST_VALUES)} is the most; sweep fewer points.`;
    report.error("CAP5", sweeps[sweeps.length - 1] ?? shows[0] ?? elements[0]!, message);
  }
}

/** The nominal points are bounded with the sweeps; here those of all draws. */
function checkDraws(
  statements: readonly Flat[],
  sweeps: readonly Sweep[],
  random: number,
  report: Report,
): void {
  const points = sweeps.reduce((product, sweep) => product * sweep.values.length, 1);
  const statement = statements.find(({ kind }) => kind === "draws");
  if (statement === undefined || points * (random + 1) <= MOST_POINTS) return;
  const message = `With ${count(random)} draws and the nominal one the plan has ${count(points * (random + 1))} points, and a plan can have ${count(MOST_POINTS)} at most; draw fewer.`;
  report.error("CAP4", statement, message);
}
