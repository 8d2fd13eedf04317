import { type Dimension, divide, PURE } from "@/lib/units/dimension";
import type { Agreement } from "./agreement";
import type { ReductionName, Show, Typed } from "./ast";
import type { Names } from "./names";
import type { Ranks } from "./rank";
import { REDUCTIONS, type ReductionShape } from "./reductions";
import type { Report } from "./report";
import { signalName } from "./signals-of";
import type { Span } from "./span";
import type { Expression, Word } from "./syntax";
import { quote } from "./token";
import type { ContractPlace, Judged, Place, Typing } from "./typing";
import type { WindowCheck } from "./window-check";

type Call = Extract<Expression, { kind: "call" }>;

/** Traces by their names: those that the text shows, and signals that a contract alone asks for. */
export type Traces = Map<string, Show>;

/** What names, signals and calls mean in readings and requirements. */
export class ContractTerms implements ContractPlace {
  /** Dimensions of the readings so far, null where one was not understood. */
  readonly readings = new Map<string, Dimension | null>();
  /** The traces that show a signal and nothing else, by the signal. */
  private readonly shown = new Map<string, string>();
  private readonly place: Place = { signals: true, wanted: null, contract: this };

  constructor(
    private readonly traces: Traces,
    private readonly typing: Typing,
    private readonly agreement: Agreement,
    private readonly names: Names,
    private readonly ranks: Ranks,
    private readonly windows: WindowCheck,
    private readonly report: Report,
  ) {
    for (const { name, value } of traces.values()) {
      if (value.op === "signal") this.shown.set(signalName(value.signal), name);
    }
  }

  judge(expression: Expression, wanted: string | null = null): Typed | null {
    return this.judged(expression, wanted)?.typed ?? null;
  }

  judged(expression: Expression, wanted: string | null): Judged | null {
    return this.typing.judge(expression, { ...this.place, wanted });
  }

  /** A reading may not have the name of a trace. */
  isFree(name: Word): boolean {
    if (!this.traces.has(name.text)) return true;
    const message = `${quote(name.text)} is already a trace, and a name means one thing; choose another for this reading.`;
    this.report.error("NAM1", name, message);
    return false;
  }

  named(word: Word): Judged | null | undefined {
    const reading = this.readings.get(word.text);
    if (reading === null) return null;
    if (reading !== undefined) return plain({ op: "reading", name: word.text, dimension: reading });
    const trace = this.traces.get(word.text);
    const meaning = this.names.meaningOf(word.text);
    if (meaning === "reading") {
      const message = `The reading ${quote(word.text)} is not known yet here; move its ${quote("read")} above.`;
      this.report.error("CON12", word, message);
      return null;
    }
    if (trace === undefined && meaning === null) {
      this.unknown(word);
      return null;
    }
    if (trace === undefined) return undefined;
    if (meaning === "knob" || meaning === "let") {
      if (trace.value.op === meaning && trace.value.name === word.text) return undefined;
      const message = `${quote(word.text)} is both a ${meaning} and a trace; give the trace another name.`;
      this.report.error("NAM1", word, message);
      return null;
    }
    return plain({ op: "trace", name: word.text, dimension: trace.value.dimension });
  }

  private unknown(word: Word): void {
    const start = `Nothing here is called ${quote(word.text)}`;
    const known = () => [
      ...this.traces.keys(),
      ...this.readings.keys(),
      ...this.names.namesOf(["knob", "let", "net"]),
    ];
    const search = () => this.names.near(word.text, known());
    const otherwise = "declare it, or use a trace, a reading or a name of this file";
    if (!this.names.isIncomplete) this.report.propose("NAM3", word, start, search, otherwise);
  }

  /** The trace that a signal is kept as: the one that shows it, or one of its own by its spelling. */
  kept(signal: Typed, { from, to }: Span): Typed {
    if (signal.op !== "signal") return signal;
    const name = signalName(signal.signal);
    const shown = this.shown.get(name) ?? name;
    if (!this.traces.has(shown)) this.traces.set(shown, { name: shown, value: signal, from, to });
    return { op: "trace", name: shown, dimension: signal.dimension };
  }

  reduce(call: Call, reduction: ReductionName): Judged | null {
    const shape = REDUCTIONS[reduction];
    if (!this.hasForm(call, shape)) return null;
    const args =
      reduction === "decades_where"
        ? [this.condition(call.args[0]!)]
        : call.args.map((arg) => this.judge(arg));
    if (!args.every((arg) => arg !== null)) return null;
    const at = shape.bound ? this.windows.bound(call.bindings[0]!) : null;
    if (shape.bound && at === null) return null;
    const knob = this.windows.first;
    if (!this.windows.isPlanKnown) return null;
    if (shape.line && (knob === null || knob.values.length < 2)) {
      const message = `${quote(reduction)} goes along a sweep of two points at least, and the plan has none; add a ${quote("sweep")}.`;
      this.report.error("CON5", call, message);
      return null;
    }
    if (shape.decades && !this.hasDecades(call, reduction)) return null;
    if (!this.fits(call, reduction, args)) return null;
    const of = args[0]!.dimension;
    const unit = knob?.dimension ?? PURE;
    const dimension =
      reduction === "per_unit"
        ? divide(of, unit)
        : reduction === "reach"
          ? unit
          : reduction === "decades_where"
            ? PURE
            : of;
    return plain({ op: "reduce", reduction, args, at, dimension });
  }

  private hasForm({ callee, args, bindings, ...span }: Call, { values, bound }: ReductionShape): boolean {
    if (args.length === values && bindings.length === (bound ? 1 : 0)) return true;
    const form = bound
      ? "a trace and a place, as in `at(out.v, KNOB = value)`"
      : values === 1
        ? "1 value"
        : "2 values";
    this.report.error("FRM12", span, `${quote(callee.text)} wants ${form} in its brackets.`);
    return false;
  }

  /** The comparison that `decades_where` goes over. */
  private condition(expression: Expression): Typed | null {
    if (expression.kind === "hole") return null;
    const message = "`decades_where` wants a comparison, such as `decades_where(abs(bend) <= 1 mV)`.";
    return this.typing.comparison(expression, this.place, "CON4", message)?.typed ?? null;
  }

  private hasDecades(call: Call, reduction: string): boolean {
    const knob = this.windows.first;
    if (knob === null) {
      this.report.error(
        "CON5",
        call,
        `${quote(reduction)} counts decades of a sweep, and the plan has none; add a ${quote("sweep")}.`,
      );
      return false;
    }
    const { values } = knob;
    if (values.every((value) => value * values[0]! > 0)) return true;
    const message = `${quote(reduction)} counts decades of ${quote(knob.knob)}, whose sweep reaches or crosses zero; sweep one sign only.`;
    this.report.error("CON5", call, message);
    return false;
  }

  /** Whether the values go together and the first is a trace, the level of `reach` one number. */
  private fits(call: Call, reduction: ReductionName, args: readonly Typed[]): boolean {
    const [first, second] = args as [Typed, Typed?];
    const rank = this.ranks.of(first);
    if (reduction === "at" ? rank === "fixed" : rank !== "point") {
      const what = rank === "fixed" ? "the same everywhere" : "one number a sweep already";
      const text = this.agreement.text(call.args[0]!);
      this.report.error(
        "CON3",
        call.args[0]!,
        `${quote(reduction)} goes along a trace, and ${text} is ${what}.`,
      );
      return false;
    }
    if (second === undefined) return true;
    if (!this.agreement.alike(call.args[0]!, first.dimension, call.args[1]!, second.dimension, "compared"))
      return false;
    if (reduction !== "reach" || this.ranks.of(second) !== "point") return true;
    const message = `The level of ${quote("reach")} is one number, and ${this.agreement.text(call.args[1]!)} changes along the sweep.`;
    this.report.error("CON6", call.args[1]!, message);
    return false;
  }
}

function plain(typed: Typed): Judged {
  return { typed, point: false };
}
