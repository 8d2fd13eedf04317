import type { Requirement } from "@/lib/language/ast";
import { Ranks } from "@/lib/language/rank";
import { unitOf } from "@/lib/units/quantity";
import { boundedReading } from "./bounded-reading";
import { boundedTrace, windowsOf } from "./bounded-trace";
import { type Margins, marginsOf, valuesOf } from "./margin";
import { placeOnAxes } from "./plan";
import type { RequirementDocument, Verdict } from "./result";
import type { Contract, Rows, Selection } from "./rows";
import { type Compared, finite, Spread } from "./spread";
import { yieldOf } from "./yield";

/** The worst of a draw: its margin, its flat point and what was compared there. */
interface Worst extends Compared {
  readonly margin: number;
  readonly point: number;
}

/** What a requirement came to in one draw; `worst` is null where no margin is known. */
interface DrawResult {
  readonly draw: number;
  readonly worst: Worst | null;
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
  { design, plan }: Contract,
  rows: Rows,
  ranks: Ranks,
): RequirementDocument {
  const { label, value, relation, share } = requirement;
  const isTrace =
    !("bound" in relation || "target" in relation || "low" in relation) ||
    [value, ...valuesOf(relation)].some((typed) => ranks.of(typed) === "point");
  const spread = new Spread();
  const results = resultsOf(requirement, isTrace, rows, spread);
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
    share,
    ...comparedAt(worst, results, spread),
    windows: windowsOf(requirement, design),
    bounds: boundedTrace(requirement, isTrace, spread.limits),
    reading: isTrace ? null : boundedReading(requirement, rows),
  };
}

/** What is compared over all draws, as the limits of the worst place show it. */
function comparedAt(
  worst: Worst | null,
  results: readonly DrawResult[],
  spread: Spread,
): Pick<RequirementDocument, "allowed" | "value" | "drawn"> {
  if (worst === null) {
    return {
      allowed: { low: null, high: null },
      value: { nominal: null, worst: null, low: null, high: null },
      drawn: results.map(() => null),
    };
  }
  const drawn = results.map((one) => one.worst && spread.shownAt(worst, one.worst));
  return {
    allowed: { low: finite(worst.low), high: finite(worst.high) },
    value: { nominal: drawn[0] ?? null, worst: finite(worst.value), ...spread.endsAt(worst) },
    drawn,
  };
}

/** One result a draw, the nominal one first; all that is compared goes into `spread`. */
function resultsOf(
  { value, relation, windows }: Requirement,
  isTrace: boolean,
  rows: Rows,
  spread: Spread,
): DrawResult[] {
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
      if (!Number.isFinite(margin)) return;
      const compared = comparedIn(margins, i);
      spread.add(compared);
      if (!(margin >= (worst?.margin ?? Number.POSITIVE_INFINITY))) {
        const place = isTrace ? selection.places[i]! : 0;
        worst = { margin, point: row * rows.length + place, ...compared };
      }
    });
    if (margins.values.length === 0) lacks = true;
    results[draw] = { draw, worst, isBroken, lacks };
  }
  // Without a margin nothing was looked at, whatever the reason.
  return results.map((one) => (one.worst === null ? { ...one, lacks: true } : one));
}

function comparedIn({ compared, low, high }: Margins, i: number): Compared {
  return { value: compared[i]!, low: low[i]!, high: high[i]! };
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
