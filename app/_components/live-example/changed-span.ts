import type { Span } from "@/lib/language/span";

/** What of the text `after` lies between the beginnings and the ends that it shares with `before`. */
export function changedSpan(before: string, after: string): Span {
  let from = 0;
  const most = Math.min(before.length, after.length);
  while (from < most && before[from] === after[from]) from += 1;
  let shared = 0;
  while (shared < most - from && before.at(-1 - shared) === after.at(-1 - shared)) shared += 1;
  return { from, to: after.length - shared };
}
