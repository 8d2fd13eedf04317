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

/** Lines of one text times lines of the other up to which they are aligned; what is longer is one place to choose. */
const MOST_ALIGNED = 9_000_000;

/**
 * Brings two texts together that were written upon `base`, line by line: what only one changed is taken, the rest is for the reader
 * to choose.
 */
export function mergeTexts(mine: string, base: string, theirs: string): MergePart[] {
  const all = [linesOf(mine), linesOf(base), linesOf(theirs)] as const;
  const [head, tail] = commonEnds(all);
  const [a, o, b] = all.map((lines) => lines.slice(head, lines.length - tail)) as [
    string[],
    string[],
    string[],
  ];
  const parts: MergePart[] = [];
  const add = (lines: readonly string[], by: Agreed["by"]) => {
    if (lines.length > 0 || by !== "nobody") parts.push({ kind: "agreed", lines, by });
  };
  add(all[1].slice(0, head), "nobody");
  if (o.length * Math.max(a.length, b.length) > MOST_ALIGNED) {
    parts.push({ kind: "conflict", mine: a, base: o, theirs: b, line: head + 1 });
  } else {
    for (const region of diff3MergeRegions(a, o, b)) {
      if ("buffer" in region) {
        const lines: string[] = region.bufferContent;
        add(lines, region.buffer === "a" ? "mine" : region.buffer === "b" ? "theirs" : "nobody");
        continue;
      }
      const { aContent, oContent, bContent, bStart } = region;
      const line = head + Number(bStart) + 1;
      if (same(aContent, bContent)) add(aContent, "both");
      else parts.push({ kind: "conflict", mine: aContent, base: oContent, theirs: bContent, line });
    }
  }
  add(all[1].slice(all[1].length - tail), "nobody");
  return parts;
}

type Agreed = Extract<MergePart, { kind: "agreed" }>;

/** How many lines all three begin with, and end with beyond those. */
function commonEnds(all: readonly (readonly string[])[]): [head: number, tail: number] {
  const [first] = all;
  const least = Math.min(...all.map((lines) => lines.length));
  let head = 0;
  while (head < least && all.every((lines) => lines[head] === first![head])) head += 1;
  let tail = 0;
  while (tail < least - head && all.every((lines) => lines.at(-1 - tail) === first!.at(-1 - tail))) tail += 1;
  return [head, tail];
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
  const stretches: (readonly string[])[] = [];
  let number = 0;
  for (const part of parts) {
    if (part.kind === "agreed") {
      stretches.push(part.lines);
      continue;
    }
    const choice = choices.get(number);
    number += 1;
    if (choice === undefined) return null;
    stretches.push(linesFor(part, choice));
  }
  const lines = stretches.flat();
  return lines.length === 0 ? "" : `${lines.join("\n")}\n`;
}
