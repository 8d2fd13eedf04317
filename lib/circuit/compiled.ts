/** Generated code: numbers in arrays in, numbers in arrays out. */
export type Compiled = (...arrays: Float64Array[]) => number;

/** Texts kept with their functions, so that the shards of one run share what is compiled. */
const MOST_KEPT = 64;

const kept = new Map<string, unknown>();
let isAllowed: boolean | null = null;

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
 * A function F of the parameters (a comma between them) with the text as its body; null where no code may be generated. The text is
 * the caller's own: nothing of the user's but numbers may stand in it.
 */
export function compiled<F = Compiled>(parameters: string, text: string): F | null {
  if (!mayCompile()) return null;
  const known = kept.get(text);
  if (known !== undefined) return known as F;
  if (kept.size >= MOST_KEPT) kept.clear();
  const made = new Function(parameters, `"use strict";\n${text}`);
  kept.set(text, made);
  return made as F;
}
