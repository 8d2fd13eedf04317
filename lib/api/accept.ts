import { AppError } from "@/lib/errors";

/**
 * The media type of `offered` that a request wants most (Accept; RFC 9110, 12.5.1), the earlier of several that it wants alike; the
 * first without that header. Throws "not acceptable" where it takes none of them.
 */
export function acceptedType<T extends string>(request: Request, offered: readonly [T, ...T[]]): T {
  const accept = request.headers.get("accept")?.trim() || "*/*";
  const ranges = accept.split(",").map(rangeOf);
  let best: T | null = null;
  let most = 0;
  for (const type of offered) {
    const weight = weightOf(type, ranges);
    if (weight > most) [best, most] = [type, weight];
  }
  if (best !== null) return best;
  throw new AppError("not acceptable", `This comes as ${offered.join(", ")}. Name one of them in Accept.`, {
    offered,
  });
}

interface Range {
  readonly range: string;
  readonly weight: number;
}

function rangeOf(text: string): Range {
  const [range = "", ...parameters] = text.split(";").map((part) => part.trim().toLowerCase());
  const weight = parameters.find((part) => part.startsWith("q="));
  const value = weight === undefined ? 1 : Number(weight.slice(2));
  return { range, weight: Number.isFinite(value) ? value : 1 };
}

/** The weight of the most particular range that a type falls in; 0 where there is none. */
function weightOf(type: string, ranges: readonly Range[]): number {
  for (const asked of [type, `${type.split("/")[0]}/*`, "*/*"]) {
    const found = ranges.find(({ range }) => range === asked);
    if (found !== undefined) return found.weight;
  }
  return 0;
}
