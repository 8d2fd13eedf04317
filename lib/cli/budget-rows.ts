import { allBudgets, type Budget } from "@/lib/analyses/budget";
import type { Job } from "@/lib/analyses/compile";
import { formatQuantity } from "@/lib/units/quantity";

/** Parts that are named for each reading or requirement. */
const MOST_PARTS = 3;

/**
 * What costs readings and requirements the most: a row each with its first-order standard deviation and the parts with the largest
 * shares of its variance. A reading is told where it deviates most. The heading comes first; only that without tolerances.
 */
export function budgetRows(job: Job): string[][] {
  const { readings, requirements } = allBudgets(job) ?? { readings: [], requirements: [] };
  const widest = new Map<string, Budget>();
  for (const one of [...readings, ...requirements]) {
    const known = widest.get(one.reading);
    if (one.sigma > 0 && (known === undefined || one.sigma > known.sigma)) widest.set(one.reading, one);
  }
  const rows = [...widest.values()].map(({ reading, unit, sigma, parts }) => [
    reading,
    formatQuantity(sigma, unit, 3),
    parts
      .filter(({ share }) => share >= 0.005)
      .slice(0, MOST_PARTS)
      .map(({ part, parameter, share }) => {
        return `${parameter === "" || parameter === "value" ? part : `${part} ${parameter}`} ${Math.round(100 * share)} %`;
      })
      .join(", "),
  ]);
  return [["budget", "one sigma", "of which"], ...rows];
}
