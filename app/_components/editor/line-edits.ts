import { lineStarts, type Span } from "@/lib/language/span";

/** Put `text` over [from, to). */
export interface LineEdit extends Span {
  readonly text: string;
}

/** Lines of two texts that are compared one by one at most; beyond it a stretch is put in whole. */
const MOST_COMPARED = 400;

/**
 * The edits, in order, that make `after` out of `before` and touch only lines that differ, so that the cursor and what is folded stay
 * where they are. Stretches between equal lines are replaced whole.
 */
export function lineEdits(before: string, after: string): LineEdit[] {
  const old = before.split("\n");
  const fresh = after.split("\n");
  const starts = lineStarts(before);
  const edits: LineEdit[] = [];
  let [i, j] = [0, 0];
  while (i < old.length || j < fresh.length) {
    if (i < old.length && j < fresh.length && old[i] === fresh[j]) {
      i += 1;
      j += 1;
      continue;
    }
    const [nextOld, nextFresh] = meeting(old, fresh, i, j);
    edits.push(replaceLines({ before, starts, old }, fresh, [i, nextOld], [j, nextFresh]));
    [i, j] = [nextOld, nextFresh];
  }
  return edits;
}

/** The nearest pair of lines from `i` and `j` on that are equal; the ends where none is near. */
function meeting(
  old: readonly string[],
  fresh: readonly string[],
  i: number,
  j: number,
): readonly [number, number] {
  const most = Math.min(MOST_COMPARED, old.length - i + fresh.length - j);
  for (let steps = 1; steps <= most; steps += 1) {
    for (let down = Math.min(steps, old.length - 1 - i); down >= 0; down -= 1) {
      const across = steps - down;
      if (j + across >= fresh.length) break;
      if (old[i + down] === fresh[j + across]) return [i + down, j + across];
    }
  }
  return [old.length, fresh.length];
}

function replaceLines(
  { before, starts, old }: { before: string; starts: readonly number[]; old: readonly string[] },
  fresh: readonly string[],
  [i, nextOld]: readonly [number, number],
  [j, nextFresh]: readonly [number, number],
): LineEdit {
  const lines = fresh.slice(j, nextFresh);
  const isLast = nextOld >= old.length;
  if (!isLast) {
    const text = lines.map((line) => `${line}\n`).join("");
    return { from: starts[i]!, to: starts[nextOld]!, text };
  }
  // At the end of the text there is no line break behind the stretch, so the one before it goes with it.
  const from = i === 0 ? 0 : starts[i - 1]! + old[i - 1]!.length;
  const text = i === 0 ? lines.join("\n") : lines.map((line) => `\n${line}`).join("");
  return { from, to: before.length, text };
}
