import { diff3MergeRegions } from "node-diff3";
import { linesOf } from "./line-diff";

/** A stretch of a merge: lines that need no choice, with whose change they are, or a place that both changed. */
export type MergePart =
  | {
      readonly kind: "agreed";
      readonly lines: readonly string[];
      readonly by: "nobody" | "mine" | "theirs" | "both";
    }
  | {
      readonly kind: "conflict";
      readonly mine: readonly string[];
      readonly base: readonly string[];
      readonly theirs: readonly string[];
      /** Line of `theirs`, counted from 1, at which it stands. */
      readonly line: number;
    };

export type Conflict = Extract<MergePart, { kind: "conflict" }>;

/** What is taken at a place that both changed. `edit` holds lines written by hand. */
export type Choice =
  | { readonly take: "mine" | "theirs" | "mine first" | "theirs first" }
  | { readonly take: "edit"; readonly text: string };

/** Brings two texts together that were written upon `base`, line by line: what only one changed is taken, the rest is for the reader to choose. */
export function mergeTexts(mine: string, base: string, theirs: string): MergePart[] {
  const [a, o, b] = [linesOf(mine), linesOf(base), linesOf(theirs)];
  const parts: MergePart[] = [];
  for (const region of diff3MergeRegions(a, o, b)) {
    if ("buffer" in region) {
      const lines: string[] = region.bufferContent;
      if (lines.length > 0 || region.buffer !== "o") {
        const by = region.buffer === "a" ? "mine" : region.buffer === "b" ? "theirs" : "nobody";
        parts.push({ kind: "agreed", lines, by });
      }
      continue;
    }
    const { aContent, oContent, bContent, bStart } = region;
    if (same(aContent, bContent)) parts.push({ kind: "agreed", lines: aContent, by: "both" });
    else parts.push({ kind: "conflict", mine: aContent, base: oContent, theirs: bContent, line: bStart + 1 });
  }
  return parts;
}

function same(a: readonly string[], b: readonly string[]): boolean {
  return a.length === b.length && a.every((line, k) => line === b[k]);
}

export function conflictsIn(parts: readonly MergePart[]): Conflict[] {
  return parts.filter((part) => part.kind === "conflict");
}

/** The lines that a choice stands for. */
export function linesFor({ mine, theirs }: Conflict, choice: Choice): readonly string[] {
  switch (choice.take) {
    case "mine":
      return mine;
    case "theirs":
      return theirs;
    case "mine first":
      return [...mine, ...theirs];
    case "theirs first":
      return [...theirs, ...mine];
    case "edit":
      return linesOf(choice.text);
  }
}

/** The merged text; null while a place is left to choose. `choices` are by the number of the conflict, from 0. */
export function mergedText(parts: readonly MergePart[], choices: ReadonlyMap<number, Choice>): string | null {
  const lines: string[] = [];
  let number = 0;
  for (const part of parts) {
    if (part.kind === "agreed") {
      lines.push(...part.lines);
      continue;
    }
    const choice = choices.get(number);
    number += 1;
    if (choice === undefined) return null;
    lines.push(...linesFor(part, choice));
  }
  return lines.length === 0 ? "" : `${lines.join("\n")}\n`;
}
