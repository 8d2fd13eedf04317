import type { SparklineData } from "@/app/_components/ui/sparkline";
import { compile } from "@/lib/analyses/compile";
import { rowLength } from "@/lib/analyses/plan";
import { solveRange } from "@/lib/analyses/sweep";
import type { Example } from "./examples";

/** Points of a sketch, at most. */
const MOST = 64;
const known = new Map<string, SparklineData | null>();

/** The first trace of an example over its first sweep, nominal, in small; solved once a process. */
export function sketchOf({ name, text }: Pick<Example, "name" | "text">): SparklineData | null {
  if (!known.has(name)) known.set(name, solve(text));
  return known.get(name) ?? null;
}

function solve(text: string): SparklineData | null {
  const { job } = compile(text);
  const axis = job?.plan.axes[0];
  if (job === null || axis === undefined) return null;
  const values = solveRange(job, 0, rowLength(job.plan)).traces[0] ?? new Float64Array();
  const isRatio = axis.scale === "logarithmic";
  const along = axis.values.map((value) => (isRatio ? Math.log10(value) : value));
  const first = along[0]!;
  const width = along.at(-1)! - first;
  const step = Math.max(1, Math.ceil(along.length / MOST));
  const places = along.flatMap((_, index) =>
    index % step === 0 || index === along.length - 1 ? [index] : [],
  );
  return {
    x: places.map((index) => (along[index]! - first) / width),
    y: places.map((index) => (Number.isFinite(values[index]) ? values[index]! : null)),
    decades: isRatio ? Math.abs(width) : 0,
  };
}
