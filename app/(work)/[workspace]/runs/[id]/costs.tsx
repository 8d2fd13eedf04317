import { formatValue } from "@/app/_components/curves/figures-in-words";
import type { Budget } from "@/lib/analyses/budget";

/** Parts of a budget that are named; the rest is their sum. */
const NAMED = 3;

/** The worst case of a reading or of what is required, and what costs it the most, to first order. */
export function Costs({ budget }: { readonly budget: Budget | undefined }) {
  if (budget === undefined) return null;
  const named = budget.parts.slice(0, NAMED).filter(({ share }) => share >= 0.005);
  if (named.length === 0) return null;
  const words = named.map(
    ({ part, parameter, share }) => `${part}${parameter && ` ${parameter}`} ${Math.round(100 * share)} %`,
  );
  const [low, high] = [budget.low, budget.high].map((value) => formatValue(value, budget.unit));
  return (
    <p className="text-quiet text-xs">
      Worst case {low} to {high}; of its spread: {words.join(", ")}
    </p>
  );
}
