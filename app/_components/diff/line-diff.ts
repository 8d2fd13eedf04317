import { diffArrays } from "diff";

/** A stretch of a line, in UTF-16 units from its start, that the other text has not. */
export interface Mark {
  readonly from: number;
  readonly to: number;
}

/** A line of one of two texts; numbers count from 1. */
export interface DiffLine {
  readonly number: number;
  readonly text: string;
  readonly marks: readonly Mark[];
}

/** A line of both texts, or of one; a line that was changed stands beside what it became. */
export interface DiffRow {
  readonly isSame: boolean;
  readonly before: DiffLine | null;
  readonly after: DiffLine | null;
}

/**
 * Lines removed and added beyond which two texts count as wholly different: work grows as its square. A limit in time would part what
 * the server renders from what the browser makes of it.
 */
const MOST_EDITS = 2_000;
/** Words removed and added beyond which two lines are marked from the first to the last that differs, for the same reason. */
const MOST_WORD_EDITS = 200;
/** Lines removed times lines added at one place, up to which each is paired with the one it is most like. */
const MOST_PAIRS = 2_500;
/** The same in UTF-16 units that are read for it. */
const MOST_READ = 2_000_000;
/** Least share of common words at which a line counts as changed and not as another one. */
const ALIKE = 0.4;

/** Two texts line by line, with the words that differ marked. */
export function diffTexts(before: string, after: string): DiffRow[] {
  const [old, now] = [linesOf(before), linesOf(after)];
  const parts = diffArrays(old, now, { maxEditLength: MOST_EDITS }) ?? [
    { value: old, removed: true, added: false },
    { value: now, removed: false, added: true },
  ];
  const rows: DiffRow[] = [];
  let [left, right] = [0, 0];
  for (let k = 0; k < parts.length; k += 1) {
    const { value, removed, added } = parts[k]!;
    if (!removed && !added) {
      for (const text of value)
        rows.push({ isSame: true, before: plain(text, ++left), after: plain(text, ++right) });
      continue;
    }
    const next = parts[k + 1];
    const isPair = next !== undefined && next.added !== added && (next.added || next.removed);
    const gone = removed ? value : isPair ? next.value : [];
    const come = added ? value : isPair ? next.value : [];
    for (const [a, b] of paired(gone, come)) {
      const marks = a === null || b === null ? NONE : wordMarks(gone[a]!, come[b]!);
      rows.push({
        isSame: false,
        before: a === null ? null : { number: left + a + 1, text: gone[a]!, marks: marks.before },
        after: b === null ? null : { number: right + b + 1, text: come[b]!, marks: marks.after },
      });
    }
    left += gone.length;
    right += come.length;
    if (isPair) k += 1;
  }
  return rows;
}

const NONE = { before: [], after: [] };

function plain(text: string, number: number): DiffLine {
  return { number, text, marks: [] };
}

/** Lines of a text; the end of its last line is no line of its own. */
export function linesOf(text: string): string[] {
  const lines = text.replaceAll("\r\n", "\n").split("\n");
  if (lines.at(-1) === "") lines.pop();
  return lines;
}

/** Indices of lines removed and added, in order: each with what it became, or alone. */
function paired(gone: readonly string[], come: readonly string[]): [number | null, number | null][] {
  const pairs: [number | null, number | null][] = [];
  const read = unitsIn(gone) * come.length + unitsIn(come) * gone.length;
  if (gone.length * come.length > MOST_PAIRS || read > MOST_READ) {
    for (let k = 0; k < Math.max(gone.length, come.length); k += 1)
      pairs.push([k < gone.length ? k : null, k < come.length ? k : null]);
    return pairs;
  }
  const best = alignments(gone.map(wordsOf), come.map(wordsOf));
  let [a, b] = [0, 0];
  while (a < gone.length || b < come.length) {
    const here = best[a]![b]!;
    if (here.step === "pair") pairs.push([a++, b++]);
    else if (here.step === "gone") pairs.push([a++, null]);
    else pairs.push([null, b++]);
  }
  return pairs;
}

function unitsIn(lines: readonly string[]): number {
  return lines.reduce((sum, line) => sum + line.length, 0);
}

interface Cell {
  readonly score: number;
  readonly step: "pair" | "gone" | "come";
}

/** For the rest of both lists from [a][b]: the most likeness that pairs in order can have, and the first step to it. */
function alignments(gone: readonly string[][], come: readonly string[][]): Cell[][] {
  const best: Cell[][] = gone.map(() => []);
  best.push(Array.from({ length: come.length + 1 }, () => ({ score: 0, step: "come" })));
  for (let a = gone.length - 1; a >= 0; a -= 1) {
    const [row, below] = [best[a]!, best[a + 1]!];
    row[come.length] = { score: 0, step: "gone" };
    for (let b = come.length - 1; b >= 0; b -= 1) {
      const likeness = alike(gone[a]!, come[b]!);
      const pair = likeness < ALIKE ? -1 : likeness + below[b + 1]!.score;
      const [skip, wait] = [below[b]!.score, row[b + 1]!.score];
      if (pair >= skip && pair >= wait) row[b] = { score: pair, step: "pair" };
      else row[b] = skip >= wait ? { score: skip, step: "gone" } : { score: wait, step: "come" };
    }
  }
  return best;
}

const WORD = /\d+(?:\.\d+)?(?:e[+-]?\d+)?|[\p{L}_][\p{L}\p{N}_]*|\s+|[^\p{L}\p{N}_\s]/gu;

function wordsOf(line: string): string[] {
  return line.match(WORD) ?? [];
}

/** The share of words, blanks left out, that two lines have in common. */
function alike(a: readonly string[], b: readonly string[]): number {
  const counts = new Map<string, number>();
  const own = a.filter((word) => word.trim() !== "");
  const other = b.filter((word) => word.trim() !== "");
  for (const word of own) counts.set(word, (counts.get(word) ?? 0) + 1);
  let common = 0;
  for (const word of other) {
    const left = counts.get(word) ?? 0;
    if (left > 0) common += 1;
    counts.set(word, left - 1);
  }
  const most = Math.max(own.length, other.length);
  return most === 0 ? 1 : common / most;
}

/** Where two lines differ, word by word. */
function wordMarks(before: string, after: string): { before: Mark[]; after: Mark[] } {
  const marks = { before: [] as Mark[], after: [] as Mark[] };
  let [left, right] = [0, 0];
  const parts = diffArrays(wordsOf(before), wordsOf(after), { maxEditLength: MOST_WORD_EDITS });
  if (parts === undefined) return betweenEnds(before, after);
  for (const { value, added, removed } of parts) {
    const length = value.join("").length;
    if (removed) marks.before.push({ from: left, to: left + length });
    if (added) marks.after.push({ from: right, to: right + length });
    if (!added) left += length;
    if (!removed) right += length;
  }
  return marks;
}

/** One mark in each line: all but the characters that both begin with, and end with beyond those. */
function betweenEnds(before: string, after: string): { before: Mark[]; after: Mark[] } {
  const least = Math.min(before.length, after.length);
  let head = 0;
  while (head < least && before[head] === after[head]) head += 1;
  let tail = 0;
  while (tail < least - head && before.at(-1 - tail) === after.at(-1 - tail)) tail += 1;
  // No mark begins or ends within a character of two units.
  if (/[\uD800-\uDBFF]/.test(before.charAt(head - 1))) head -= 1;
  if (/[\uDC00-\uDFFF]/.test(before.charAt(before.length - tail))) tail -= 1;
  const mark = ({ length }: string) => (length > head + tail ? [{ from: head, to: length - tail }] : []);
  return { before: mark(before), after: mark(after) };
}
