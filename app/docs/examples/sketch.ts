import type { SparklineData } from "@/app/_components/ui/sparkline";
import { compile } from "@/lib/analyses/compile";
import { coarsePlaces, excerptOf, thinned } from "@/lib/analyses/excerpt";
import { solvePoints } from "@/lib/analyses/sweep";
import type { Example } from "./examples";

/** Points of a sketch, about. */
const PLACES = 40;
const known = new Map<string, SparklineData | null>();

/** The first trace of an example over its first sweep, nominal, at the usual settings, in small; solved once a process. */
export function sketchOf({ name, text }: Pick<Example, "name" | "text">): SparklineData | null {
  if (!known.has(name)) known.set(name, solve(text));
  return known.get(name) ?? null;
}

function solve(text: string): SparklineData | null {
  const { job } = compile(text);
  if (job === null || job.plan.axes.length === 0) return null;
  const row = excerptOf(job, new Map());
  const thin = thinned(row, coarsePlaces(row, PLACES));
  // A sketch proves nothing, so the proof of each point is left out.
  const steps = solvePoints(thin.job, thin.from, thin.to, false);
  let step = steps.next();
  while (step.done !== true) step = steps.next();
  const values = step.value.traces[0] ?? new Float64Array();
  const axis = thin.plan.axes[0]!;
  const isRatio = axis.scale === "logarithmic";
  const along = axis.values.map((value) => (isRatio ? Math.log10(value) : value));
  const width = along.at(-1)! - along[0]!;
  return {
    x: along.map((value) => (value - along[0]!) / width),
    y: along.map((_, index) => (Number.isFinite(values[index]) ? values[index]! : null)),
    decades: isRatio ? Math.abs(width) : 0,
  };
}
