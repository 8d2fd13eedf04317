import type { Requirement } from "@/lib/language/ast";
import { marginsOf } from "./margin";
import type { RequirementDocument } from "./result";
import type { Rows } from "./rows";
import { finite } from "./spread";

/**
 * The reading per sweep that a requirement bounds, with its limits at each setting of the outer knobs, of the nominal design. Limits
 * on its size bound it on both sides. Null where the requirement is about anything else.
 */
export function boundedReading(
  { value, relation, windows }: Requirement,
  rows: Rows,
): RequirementDocument["reading"] {
  const isSize = value.op === "call" && value.callee === "abs";
  const own = isSize ? value.args[0]! : value;
  if (own.op !== "reading") return null;
  const selection = rows.select(windows);
  const limits: { low: number | null; high: number | null }[] = [];
  for (let row = 0; row < rows.count && rows.drawOf(row) === 0; row++) {
    const margins = rows.isWithin(row, windows)
      ? marginsOf(value, relation, false, rows, row, selection)
      : null;
    const [low, high] = [margins?.low[0] ?? Number.NaN, margins?.high[0] ?? Number.NaN];
    if (!isSize) limits.push({ low: finite(low), high: finite(high) });
    // A size that has a lower limit too is allowed in two parts, which no one pair of limits describes.
    else limits.push(low > 0 ? { low: null, high: null } : { low: finite(-high), high: finite(high) });
  }
  return { name: own.name, limits };
}
