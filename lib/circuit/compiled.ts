/** Generated code: numbers in arrays in, numbers in arrays out. */
export type Compiled = (...arrays: Float64Array[]) => number;

/** Texts kept with their functions, so that the shards of one run share what is compiled. */
const MOST_KEPT = 64;

const kept = new Map<string, { readonly made: unknown; readonly warmth: Warmth }>();
let isAllowed: boolean | null = null;

/** Calls after which V8 takes up optimising a function without loops, whatever its length (measured). */
const WARMING = 1200;

/** Calls of the slower way for which it is then given time, in the background; unoptimised code is ten times as slow as either. */
const RESTING = 20_000;

/** How far code has come that is shared by all who have the same text: at first it is used to warm it up, then left alone, then used. */
export class Warmth {
  private calls = 0;

  /** Whether this call should go to the code; the other way must give the same bytes. */
  isUsed(): boolean {
    const calls = ++this.calls;
    return calls <= WARMING || calls > WARMING + RESTING;
  }
}

/** Whether code may be generated here; a page's content policy may forbid it. Tried once. */
export function mayCompile(): boolean {
  if (isAllowed === null) {
    try {
      isAllowed = new Function("return 1")() === 1;
    } catch {
      isAllowed = false;
    }
  }
  return isAllowed;
}

/**
 * With its warmth, a function F of the parameters (a comma between them) with the text as its body; null where no code may be generated. The text is
 * the caller's own: nothing of the user's but numbers may stand in it.
 */
export function compiled<F = Compiled>(
  parameters: string,
  text: string,
): { readonly made: F; readonly warmth: Warmth } | null {
  if (!mayCompile()) return null;
  let found = kept.get(text);
  if (found === undefined) {
    if (kept.size >= MOST_KEPT) kept.clear();
    found = { made: new Function(parameters, `"use strict";\n${text}`), warmth: new Warmth() };
    kept.set(text, found);
  }
  return { made: found.made as F, warmth: found.warmth };
}
