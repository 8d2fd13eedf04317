import type { Preview } from "@/db/schema/run";
import type { Plan } from "@/lib/analyses/plan";

/** Points of a small curve, at most. */
const MOST = 64;

/** The evenly spaced points that show the first axis of a plan in small; null where no curve can be drawn. */
export function previewOf({ axes, traces }: Pick<Plan, "axes" | "traces">): Preview | null {
  const [axis] = axes;
  if (axis === undefined || axis.values.length < 2 || traces.length === 0) return null;
  const { values } = axis;
  const logarithmic = axis.scale === "logarithmic";
  const place = (value: number) => (logarithmic ? Math.log10(value) : value);
  const low = place(values.reduce((least, value) => Math.min(least, value), Number.POSITIVE_INFINITY));
  const high = place(values.reduce((most, value) => Math.max(most, value), Number.NEGATIVE_INFINITY));
  if (!Number.isFinite(high - low) || high === low) return null;
  const size = Math.min(MOST, values.length);
  const shown = Array.from({ length: size }, (_, i) => Math.round((i * (values.length - 1)) / (size - 1)))
    .map((point) => ({ point, x: (place(values[point]!) - low) / (high - low) }))
    .sort((one, other) => one.x - other.x);
  return {
    points: shown.map(({ point }) => point),
    x: shown.map(({ x }) => x),
    decades: logarithmic ? high - low : 0,
  };
}
