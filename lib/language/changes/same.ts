import { type Dimension, sameDimension } from "@/lib/units/dimension";

/** Whether two checked things mean the same; where they stand in their texts does not count. */
export function sameMeaning(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== "object" || typeof b !== "object" || a === null || b === null) return false;
  if (a instanceof Map || b instanceof Map) {
    if (!(a instanceof Map && b instanceof Map) || a.size !== b.size) return false;
    return [...a].every(([key, value]) => b.has(key) && sameMeaning(value, b.get(key)));
  }
  if (Array.isArray(a) !== Array.isArray(b)) return false;
  if (!sameDimension(dimensionOf(a), dimensionOf(b))) return false;
  const keys = new Set([...Object.keys(a), ...Object.keys(b)]);
  for (const key of keys) {
    if (key === "from" || key === "to" || key === "dimension") continue;
    // A value is named alike whether a knob or a let; that it became the other is said of the value itself.
    if (key === "op" && isNamed(a) && isNamed(b)) continue;
    if (!sameMeaning(a[key as keyof typeof a], b[key as keyof typeof b])) return false;
  }
  return true;
}

const NONE: Dimension = [0, 0, 0, 0, 0];

function dimensionOf(one: object): Dimension {
  return "dimension" in one ? (one.dimension as Dimension) : NONE;
}

function isNamed(one: object): boolean {
  return "op" in one && (one.op === "knob" || one.op === "let");
}
