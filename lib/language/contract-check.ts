import type { Agreement } from "./agreement";
import type { Reading, Requirement, Typed, Window } from "./ast";
import type { ContractTerms } from "./contract-terms";
import { requirementText } from "./contract-text";
import type { Flat } from "./expand";
import type { Names } from "./names";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import { highestRank, type Rank, type Ranks, within } from "./rank";
import { REDUCTIONS } from "./reductions";
import { RelationCheck } from "./relation-check";
import type { Report } from "./report";
import type { Expression, Statement } from "./syntax";
import { quote } from "./token";
import { narrowed } from "./window";
import type { WindowCheck } from "./window-check";

type ReadStatement = Extract<Statement, { kind: "read" }>;
type RequireStatement = Extract<Statement, { kind: "require" }>;

/** What readings and requirements are checked with. `random` is the number of random draws, null where it is not understood. */
export interface ContractBench {
  readonly source: string;
  readonly terms: ContractTerms;
  readonly windows: WindowCheck;
  readonly ranks: Ranks;
  readonly agreement: Agreement;
  readonly quantities: Quantities;
  readonly nominal: Nominal;
  readonly names: Names;
  readonly random: number | null;
  readonly report: Report;
}

/** Checks readings in the order of the text, each using only those before it, then requirements. */
export class ContractCheck {
  /** The windows in which each reading is known, with those of the readings it is made of. */
  private readonly known = new Map<string, readonly Window[]>();
  private readonly labels = new Set<string>();
  private readonly relations: RelationCheck;

  constructor(private readonly bench: ContractBench) {
    this.relations = new RelationCheck(bench);
  }

  reads(statements: readonly Flat[]): Reading[] {
    return statements.flatMap((statement) => {
      if (statement.kind !== "read") return [];
      const reading = statement.whole ? this.reading(statement) : null;
      if (reading === null) this.bench.terms.readings.set(statement.name.text, null);
      return reading === null ? [] : [reading];
    });
  }

  requirements(statements: readonly Flat[]): Requirement[] {
    return statements.flatMap((statement) => {
      const one = statement.kind === "require" && statement.whole ? this.requirement(statement) : null;
      return one === null ? [] : [one];
    });
  }

  private reading({ name, value, windows: syntaxes, from, to }: ReadStatement): Reading | null {
    const { terms, windows, ranks, names } = this.bench;
    const typed = terms.judge(value);
    const own = windows.windows(syntaxes);
    const isOwner = names.meaningOf(name.text) === "reading" && names.placeOf(name.text).from === name.from;
    if (typed === null || own === null || !isOwner || !terms.isFree(name)) return null;
    const all = narrowed([...own, ...this.inherited([typed])]);
    if (!this.isMeasured(value, [typed]) || !this.hasPoints(value, [typed], all)) return null;
    const rank = this.rankOf([typed], all);
    if (rank === "point" && !within(typed).some((part) => givesTrace(part))) {
      const text = this.bench.agreement.text(value);
      const message = `${text} is a trace and has no single value; reduce it, as in \`highest(…)\`, or keep it with ${quote("show")}.`;
      this.bench.report.error("CON6", value, message);
      return null;
    }
    ranks.setReading(name.text, rank);
    terms.readings.set(name.text, typed.dimension);
    const first = windows.first?.knob;
    this.known.set(name.text, rank === "point" ? all : all.filter(({ knob }) => knob !== first));
    return { name: name.text, value: typed, windows: all, from, to };
  }

  private requirement(statement: RequireStatement): Requirement | null {
    const { terms, windows, report, source } = this.bench;
    const { value, windows: syntaxes, label, from, to } = statement;
    const typed = terms.judge(value);
    const relation = typed === null ? null : this.relations.relation(statement, typed);
    const own = windows.windows(syntaxes);
    const share = this.relations.share(statement.share);
    if (typed === null || relation === null || own === null || share === false) return null;
    const all = [typed, ...relation.values];
    const whole = narrowed([...own, ...this.inherited(all)]);
    if (!this.isMeasured(value, all) || !this.isOpen(statement, all) || !this.hasPoints(value, all, whole))
      return null;
    if (!this.relations.canRise(statement, this.rankOf([typed], []), windows.placesOfFirst(whole)))
      return null;
    const text = label?.text ?? requirementText(statement, source);
    if (this.labels.has(text)) {
      const message = `Two requirements are called ${quote(text)}; give this one a name of its own with \`as "…"\`.`;
      report.error("CON14", label ?? { from, to }, message);
    }
    this.labels.add(text);
    return { label: text, value: typed, relation: relation.typed, windows: whole, share, from, to };
  }

  /** How often a value changes within its windows: a trace at one place of the first knob is one number a sweep. */
  private rankOf(all: readonly Typed[], windows: readonly Window[]): Rank {
    const rank = highestRank(all.map((typed) => this.bench.ranks.of(typed)));
    const places = this.bench.windows.placesOfFirst(windows);
    return rank === "point" && places === 1 ? "sweep" : rank;
  }

  /** The windows of the readings used: where these are not known, nothing is asked. */
  private inherited(all: readonly Typed[]): Window[] {
    const found = new Set<Window>();
    for (const typed of all) {
      for (const part of within(typed)) {
        if (part.op !== "reading") continue;
        for (const window of this.known.get(part.name) ?? []) found.add(window);
      }
    }
    return [...found];
  }

  /** Something that the circuit decides must be among what is read or required. */
  private isMeasured(value: Expression, all: readonly Typed[]): boolean {
    if (all.some((typed) => within(typed).some(({ op }) => op === "trace" || op === "reading"))) return true;
    const message = `${this.bench.agreement.text(value)} says nothing of the circuit; use a trace, a signal or a reading.`;
    this.bench.report.error("CON7", value, message);
    return false;
  }

  /** A window on the first knob needs something that still goes along it. */
  private isOpen({ windows }: RequireStatement, all: readonly Typed[]): boolean {
    const first = this.bench.windows.first?.knob;
    const closed = windows.find(({ knob }) => knob.text === first);
    const goes = all.some((typed) => this.bench.ranks.of(typed) === "point" || within(typed).some(goesAlong));
    if (closed === undefined || goes) return true;
    const message = `What is required here is one number a sweep of ${quote(closed.knob.text)}; give this window to its ${quote("read")}.`;
    this.bench.report.error("CON13", closed, message);
    return false;
  }

  /** The windows together hold a point, and two where a line is drawn. */
  private hasPoints(value: Expression, all: readonly Typed[], windows: readonly Window[]): boolean {
    const empty = this.bench.windows.emptySweep(windows);
    if (empty !== null) {
      const message = `No point of the sweep of ${quote(empty)} lies in this window and in that of every reading used.`;
      this.bench.report.error("CON1", value, message);
      return false;
    }
    const line = all
      .flatMap((typed) => within(typed))
      .find((part) => part.op === "reduce" && REDUCTIONS[part.reduction].line);
    if (line?.op !== "reduce" || this.bench.windows.placesOfFirst(windows) > 1) return true;
    const message = `${quote(line.reduction)} goes along two points at least, and this window holds one; widen it.`;
    this.bench.report.error("CON5", value, message);
    return false;
  }
}

/** Something that is reduced over the first knob here, and not by a reading of its own. */
function goesAlong(part: Typed): boolean {
  return part.op === "reduce" && part.at === null;
}

function givesTrace(part: Typed): boolean {
  return part.op === "reading" || (part.op === "reduce" && REDUCTIONS[part.reduction].gives === "point");
}
