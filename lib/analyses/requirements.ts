import type { Requirement } from "@/lib/language/ast";
import { Ranks } from "@/lib/language/rank";
import { unitOf } from "@/lib/units/quantity";
import { marginsOf, valuesOf } from "./margin";
import { placeOnAxes } from "./plan";
import type { RequirementDocument, Verdict } from "./result";
import type { Contract, Rows, Selection } from "./rows";
import { yieldOf } from "./yield";

/** What a requirement came to in one draw: its worst margin with its flat point, null where none is known. */
interface DrawResult {
  readonly draw: number;
  readonly worst: { readonly margin: number; readonly point: number } | null;
  readonly isBroken: boolean;
  /** Something that it needs is not known. */
  readonly lacks: boolean;
}

/** Judges every requirement of a run; the readings must be in `rows`. */
export function requireAll(contract: Contract, rows: Rows): RequirementDocument[] {
  const { design } = contract;
  const ranks = new Ranks(design.sweeps, design.lets);
  for (const { name } of design.reads) {
    ranks.setReading(name, rows.readings.get(name)!.isTrace ? "point" : "sweep");
  }
  return design.requirements.map((requirement) => judgeOne(requirement, contract, rows, ranks));
}

function judgeOne(
  requirement: Requirement,
  { plan }: Contract,
  rows: Rows,
  ranks: Ranks,
): RequirementDocument {
  const { label, value, relation, share } = requirement;
  const isTrace =
    !("bound" in relation || "target" in relation || "low" in relation) ||
    [value, ...valuesOf(relation)].some((typed) => ranks.of(typed) === "point");
  const results = resultsOf(requirement, isTrace, rows);
  const random = results.slice(1);
  const decisive = share === null ? lowest(results) : atShare(random, share);
  const { worst, draw } = decisive ?? { worst: null, draw: 0 };
  const places = worst === null ? [] : placeOnAxes(plan, worst.point);
  const at = places.flatMap((place, axis) => {
    const { knob, unit, values } = plan.axes[axis]!;
    return axis === 0 && !isTrace ? [] : [{ knob, unit, value: values[place]! }];
  });
  const held = random.filter(({ isBroken, lacks }) => !isBroken && !lacks).length;
  return {
    label,
    verdict: share === null ? ofEvery(results) : ofShare(random, share),
    margin: worst?.margin ?? null,
    unit: unitOf(value.dimension),
    worst: worst === null ? null : { draw, at },
    ...(random.length === 0 ? {} : { yield: yieldOf(held, random.length) }),
  };
}

/** One result a draw, the nominal one first. */
function resultsOf({ value, relation, windows }: Requirement, isTrace: boolean, rows: Rows): DrawResult[] {
  const selection: Selection = rows.select(windows);
  const results: DrawResult[] = [];
  for (let row = 0; row < rows.count; row++) {
    const draw = rows.drawOf(row);
    let { worst, isBroken, lacks } = results[draw] ?? { worst: null, isBroken: false, lacks: false };
    results[draw] ??= { draw, worst, isBroken, lacks };
    if (!rows.isWithin(row, windows)) continue;
    const margins = marginsOf(value, relation, isTrace, rows, row, selection);
    margins.values.forEach((margin, i) => {
      if (Number.isNaN(margin)) lacks = true;
      else if (margin < 0 || (margins.isStrict && margin === 0)) isBroken = true;
      const place = isTrace ? selection.places[i]! : 0;
      if (Number.isFinite(margin) && !(margin >= (worst?.margin ?? Number.POSITIVE_INFINITY))) {
        worst = { margin, point: row * rows.length + place };
      }
    });
    if (margins.values.length === 0) lacks = true;
    results[draw] = { draw, worst, isBroken, lacks };
  }
  // Without a margin nothing was looked at, whatever the reason.
  return results.map((one) => (one.worst === null ? { ...one, lacks: true } : one));
}

function lowest(results: readonly DrawResult[]): DrawResult | null {
  return inOrder(results)[0] ?? null;
}

/** The draw that decides whether the share holds: as many are at least as good as must hold. */
function atShare(random: readonly DrawResult[], share: number): DrawResult | null {
  const known = inOrder(random);
  return known[Math.max(0, known.length - needed(random, share))] ?? null;
}

/** Results with a margin, the worst first. */
function inOrder(results: readonly DrawResult[]): DrawResult[] {
  const known = results.filter(({ worst }) => worst !== null);
  return known.sort((a, b) => a.worst!.margin - b.worst!.margin || a.draw - b.draw);
}

function needed(random: readonly DrawResult[], share: number): number {
  return Math.ceil(share * random.length - 1e-9);
}

function ofEvery(results: readonly DrawResult[]): Verdict {
  if (results.some(({ isBroken }) => isBroken)) return "broken";
  return results.some(({ lacks }) => lacks) ? "no data" : "holds";
}

function ofShare(random: readonly DrawResult[], share: number): Verdict {
  const broken = random.filter(({ isBroken }) => isBroken).length;
  if (random.length - broken < needed(random, share)) return "broken";
  return random.some(({ isBroken, lacks }) => lacks && !isBroken) ? "no data" : "holds";
}
