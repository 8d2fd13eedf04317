import { compile } from "@/lib/analyses/compile";

type Compiled = ReturnType<typeof compile>;

/** Texts of which the meaning is kept; a plan may have a million values. */
const KEPT = 4;
const kept = new Map<string, Compiled>();

/**
 * What a text means, which never changes: a run that is read again and again while it is solved, or by several people, is
 * compiled once. Whoever gets it changes nothing in it.
 */
export function compiled(text: string): Compiled {
  const found = kept.get(text) ?? compile(text);
  kept.delete(text);
  kept.set(text, found);
  if (kept.size > KEPT) kept.delete(kept.keys().next().value!);
  return found;
}
