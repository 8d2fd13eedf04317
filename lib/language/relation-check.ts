import { PURE, sameDimension } from "@/lib/units/dimension";
import type { Relation, Typed } from "./ast";
import type { ContractBench } from "./contract-check";
import type { Rank } from "./rank";
import type { Expression, Statement } from "./syntax";
import { quote } from "./token";
import { describeDimension, spellableUnit } from "./unit-check";

type RequireStatement = Extract<Statement, { kind: "require" }>;

/** A checked relation with the values it brings. */
export interface CheckedRelation {
  readonly typed: Relation;
  readonly values: readonly Typed[];
}

/** Checks what a requirement asks: relation, share of the draws. */
export class RelationCheck {
  constructor(private readonly bench: ContractBench) {}

  /** The relation against a value, or null and a diagnostic. */
  relation({ value, relation }: RequireStatement, typed: Typed): CheckedRelation | null {
    switch (relation.kind) {
      case "rising":
      case "falling":
        return { typed: { kind: relation.kind }, values: [] };
      case "compare": {
        const bound = this.beside(value, typed, relation.bound);
        if (bound === null) return null;
        return { typed: { kind: "compare", operator: relation.operator, bound }, values: [bound] };
      }
      case "between": {
        const low = this.beside(value, typed, relation.low);
        const high = this.beside(value, typed, relation.high);
        if (low === null || high === null || !this.isUpright(relation, low, high)) return null;
        return { typed: { kind: "between", low, high }, values: [low, high] };
      }
      case "within": {
        const target = this.beside(value, typed, relation.target);
        const half = target === null ? null : this.half(relation.half, target);
        if (target === null || half === null) return null;
        return { typed: { kind: "within", target, ...half }, values: [target, half.half] };
      }
    }
  }

  private beside(value: Expression, typed: Typed, other: Expression): Typed | null {
    const { terms, agreement } = this.bench;
    const judged = terms.judge(other, spellableUnit(typed.dimension));
    if (judged === null) return null;
    return agreement.alike(value, typed.dimension, other, judged.dimension, "compared") ? judged : null;
  }

  private isUpright({ low, high }: { low: Expression; high: Expression }, a: Typed, b: Typed): boolean {
    const { report, agreement } = this.bench;
    if (!(this.fixed(a) > this.fixed(b))) return true;
    const text = `${agreement.source(high)} and ${agreement.source(low)}`;
    const fix = { title: "Exchange the two", from: low.from, to: high.to, text };
    report.error(
      "CON2",
      { from: low.from, to: high.to },
      "The lower end comes first; exchange the two.",
      fix,
    );
    return false;
  }

  /** `± 1 %`, `± 50 µV`: a share of the target or a value beside it, never negative. */
  private half(written: Expression, target: Typed): { half: Typed; relative: boolean } | null {
    const { terms, quantities, report, agreement } = this.bench;
    const unit = spellableUnit(target.dimension);
    const found = terms.judged(written, unit);
    if (found === null || !quantities.isDifference(written, found)) return null;
    const judged = found.typed;
    const suffix = written.kind === "number" ? written.unit?.text : undefined;
    const pure = sameDimension(judged.dimension, PURE);
    const relative = pure && (suffix === "%" || suffix === "ppm" || !sameDimension(target.dimension, PURE));
    if (!pure && !sameDimension(judged.dimension, target.dimension)) {
      const message = `${agreement.text(written)} is ${describeDimension(judged.dimension)} but the value to be met is ${describeDimension(target.dimension)}; give it in the same unit or in %.`;
      report.error("UNI3", written, message);
      return null;
    }
    if (relative && written.kind === "number" && suffix === undefined) {
      const text = `${written.value} ${unit ?? "%"}`;
      const fix = { title: `Write ${text}`, from: written.from, to: written.to, text };
      report.error(
        "UNI10",
        written,
        `What follows ${quote("±")} wants a unit; write ${quote(text)} or ${quote(`${written.value} %`)}.`,
        fix,
      );
      return null;
    }
    if (!(this.fixed(judged) < 0)) return { half: judged, relative };
    report.error("CON9", written, "What follows `±` reaches to both sides and cannot be negative.");
    return null;
  }

  /** The number of a value that nothing moves; NaN of another. */
  private fixed(typed: Typed): number {
    const { nominal, ranks } = this.bench;
    return ranks.of(typed) === "fixed" ? nominal.of(typed) : Number.NaN;
  }

  /** A share of the draws, 0 to 1; null where every draw counts, false and a diagnostic where it cannot be. */
  share(written: Expression | null): number | null | false {
    if (written === null) return null;
    const { quantities, random, report, agreement } = this.bench;
    const share = quantities.fixed(written, { dimension: PURE, unit: "1", what: "A share of the draws" });
    if (share === null) return false;
    if (random === null) return false;
    if (random === 0) {
      const message = `${agreement.text(written)} of the draws are asked for and there are none; add a line such as \`draws 400 seed 1\`.`;
      report.error("CON8", written, message);
      return false;
    }
    if (share > 0 && share <= 1) return share;
    const bare = written.kind === "number" && written.unit === null && share > 1 && share <= 100;
    const text = bare ? `${written.value} %` : null;
    const fix =
      text === null ? undefined : { title: `Write ${text}`, from: written.from, to: written.to, text };
    const message = `A share of the draws is above 0 and at most 100 %${text === null ? "" : `; write ${quote(text)}`}.`;
    report.error("CON8", written, message, fix);
    return false;
  }

  /** Only a trace of two points can rise or fall. */
  canRise({ value, relation }: RequireStatement, rank: Rank, places: number): boolean {
    if (relation.kind !== "rising" && relation.kind !== "falling") return true;
    if (rank === "point" && places > 1) return true;
    const what = rank === "point" ? "has one point in this window" : "is no trace";
    const message = `Only a trace of two points at least can be ${relation.kind}, and ${this.bench.agreement.text(value)} ${what}.`;
    this.bench.report.error("CON11", value, message);
    return false;
  }
}
