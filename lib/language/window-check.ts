import { KELVIN, sameDimension } from "@/lib/units/dimension";
import { unitOf } from "@/lib/units/quantity";
import type { Agreement } from "./agreement";
import type { Knob, Sweep, Window } from "./ast";
import { spellQuantity } from "./literal";
import { Names } from "./names";
import type { Quantities, Want } from "./quantities";
import type { Report } from "./report";
import type { Span } from "./span";
import type { Binding, Expression, WindowSyntax, Word } from "./syntax";
import { quote } from "./token";
import type { Known } from "./typing";
import { Grid, isInWindow, narrowed } from "./window";

/** The plan as far as it is understood; `isPlanKnown` is false where a sweep was not, and nothing is then said of its points. */
export interface WindowPlan {
  readonly sweeps: readonly Sweep[];
  readonly knobs: readonly Knob[];
  readonly known: ReadonlyMap<string, Known>;
  readonly isPlanKnown: boolean;
}

/** Checks windows and the places of `at(…)` against the plan. */
export class WindowCheck {
  private readonly defaults: ReadonlyMap<string, number>;
  private readonly grids: ReadonlyMap<string, Grid>;

  constructor(
    private readonly plan: WindowPlan,
    private readonly names: Names,
    private readonly quantities: Quantities,
    private readonly agreement: Agreement,
    private readonly report: Report,
  ) {
    this.defaults = new Map(
      plan.knobs.flatMap(({ name, value }) => (value.op === "constant" ? [[name, value.value]] : [])),
    );
    this.grids = new Map(plan.sweeps.map((sweep) => [sweep.knob, new Grid(sweep)]));
  }

  /** The sweep that readings go along; null where there is none. */
  get first(): Sweep | null {
    return this.plan.sweeps[0] ?? null;
  }

  get isPlanKnown(): boolean {
    return this.plan.isPlanKnown;
  }

  /** The windows, one a knob, null where one was reported: together those of a knob hold a point of the plan. */
  windows(syntaxes: readonly WindowSyntax[]): Window[] | null {
    let windows: Window[] = [];
    for (const syntax of syntaxes) {
      const window = this.window(syntax);
      if (window === null) return null;
      windows = narrowed([...windows, window]);
      if (this.emptySweep(windows) === null) continue;
      const message = `No point of the sweep of ${quote(window.knob)} lies in all of these windows; widen one of them.`;
      this.report.error("CON1", syntax, message);
      return null;
    }
    return windows;
  }

  /** The place of `at(trace, KNOB = value)`. */
  bound({ name, value, ...span }: Binding): { knob: string; value: number } | null {
    const window = this.window({ knob: name, low: value, high: null, ...span });
    return window === null ? null : { knob: window.knob, value: window.low };
  }

  /** How many places of the first sweep lie in the windows; 1 without a sweep. */
  placesOfFirst(windows: readonly Window[]): number {
    if (!this.isPlanKnown) return Number.POSITIVE_INFINITY;
    if (this.first === null) return 1;
    const { knob, values } = this.first;
    const window = windows.find((one) => one.knob === knob);
    return window === undefined ? values.length : this.grids.get(knob)!.count(window);
  }

  /** The knob of a sweep of which no point lies in the windows, null where each has one. */
  emptySweep(windows: readonly Window[]): string | null {
    if (!this.isPlanKnown) return null;
    const isEmpty = (window: Window) => this.grids.get(window.knob)?.count(window) === 0;
    return windows.find(isEmpty)?.knob ?? null;
  }

  private window({ knob, low, high, from, to }: WindowSyntax): Window | null {
    const want = this.wantOf(knob);
    if (want === null) return null;
    const least = this.quantities.fixed(low, want);
    const most = high === null ? least : this.quantities.fixed(high, want);
    if (least === null || most === null) return null;
    if (least > most) {
      const span = { from: low.from, to: high!.to };
      const text = `${this.agreement.source(high!)} .. ${this.agreement.source(low)}`;
      const fix = { title: "Exchange the two", ...span, text };
      const message = "A window goes from its lower end to its higher end; exchange the two.";
      this.report.error("CON2", span, message, fix);
      return null;
    }
    const window = { knob: knob.text, low: least, high: most, from, to };
    return this.holdsPoint(window, low, high, want) ? window : null;
  }

  private wantOf(knob: Word): Want | null {
    if (knob.text === "") return null;
    const meaning = this.names.meaningOf(knob.text);
    if (meaning === null) this.names.unknown(knob, ["knob"]);
    else if (meaning !== "knob" && meaning !== "unread") {
      const message = `A window is set on a knob, and ${quote(knob.text)} is ${Names.describe(meaning)}.`;
      this.report.error("CON1", knob, message);
    }
    const known = this.plan.known.get(knob.text);
    if (meaning !== "knob" || known === undefined) return null;
    const unit = sameDimension(known.dimension, KELVIN)
      ? known.point
        ? "°C"
        : "K"
      : unitOf(known.dimension);
    return { dimension: known.dimension, unit, what: `The knob ${quote(knob.text)}` };
  }

  private holdsPoint(window: Window, low: Expression, high: Expression | null, { unit }: Want): boolean {
    if (!this.isPlanKnown) return true;
    const grid = this.grids.get(window.knob);
    const fixed = this.defaults.get(window.knob) ?? window.low;
    if (grid === undefined ? isInWindow(window, fixed) : grid.count(window) > 0) return true;
    const place: Span = high === null ? low : { from: low.from, to: high.to };
    const text = spellQuantity(grid === undefined ? fixed : grid.nearest(window.low), unit);
    const start =
      grid === undefined
        ? `${quote(window.knob)} is ${text} at every point, since it is not swept`
        : `The sweep of ${quote(window.knob)} has no point ${high === null ? "there" : "in this window"}; the nearest is ${text}`;
    const fix = high === null ? { title: `Change to ${text}`, from: low.from, to: low.to, text } : undefined;
    this.report.error("CON1", place, `${start}.`, fix);
    return false;
  }
}
