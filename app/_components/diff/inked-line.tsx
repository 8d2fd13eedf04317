import type { Piece } from "../editor/plain-lines";
import type { Mark } from "./line-diff";

/** What a line is to the text it stands in. */
export type LineSort = "same" | "removed" | "added";

const MARKS: Record<LineSort, string> = {
  same: "",
  removed: "bg-[color-mix(in_srgb,var(--broken)_22%,var(--surface))] decoration-broken",
  added: "bg-[color-mix(in_srgb,var(--holds)_22%,var(--surface))] decoration-holds",
};

/** Class names of the ground that a line stands on. */
export const GROUNDS: Record<LineSort, string> = {
  same: "",
  removed: "bg-[color-mix(in_srgb,var(--broken)_7%,var(--surface))]",
  added: "bg-[color-mix(in_srgb,var(--holds)_7%,var(--surface))]",
};

/** A line in its colours, with the words that the other text has not underlined. `start` is its offset in the text. */
export function InkedLine({
  pieces,
  marks,
  start,
  sort,
}: {
  readonly pieces: readonly Piece[];
  readonly marks: readonly Mark[];
  readonly start: number;
  readonly sort: LineSort;
}) {
  return (
    <code className="whitespace-pre-wrap break-words" style={{ fontSize: "inherit" }}>
      {cut(pieces, marks, start).map(({ at, text, ink, isMarked }) =>
        isMarked ? (
          <mark key={at} className={`text-ink underline decoration-2 underline-offset-3 ${MARKS[sort]}`}>
            {text}
          </mark>
        ) : (
          <span key={at} style={ink === undefined ? undefined : { color: `var(${ink})` }}>
            {text}
          </span>
        ),
      )}
    </code>
  );
}

interface Cut extends Piece {
  readonly isMarked: boolean;
}

/** The pieces of a line cut at the ends of its marks; pieces of one mark stay together. */
function cut(pieces: readonly Piece[], marks: readonly Mark[], start: number): Cut[] {
  const found: Cut[] = [];
  for (const { at, text, ink } of pieces) {
    const [from, to] = [at - start, at - start + text.length];
    const inside = marks.flatMap((mark) => [mark.from, mark.to]).filter((end) => end > from && end < to);
    const ends = [from, ...inside, to];
    for (let k = 0; k + 1 < ends.length; k += 1) {
      const [a, b] = [ends[k]!, ends[k + 1]!];
      const isMarked = marks.some((mark) => mark.from <= a && b <= mark.to);
      const part = text.slice(a - from, b - from);
      const last = found.at(-1);
      if (isMarked && last?.isMarked === true && last.at + last.text.length === start + a)
        found[found.length - 1] = { ...last, text: last.text + part };
      else found.push({ at: start + a, text: part, ink, isMarked });
    }
  }
  return found;
}
