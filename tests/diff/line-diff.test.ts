import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { changesIn, foldsOf } from "@/app/_components/diff/folds";
import { type DiffLine, diffTexts, linesOf } from "@/app/_components/diff/line-diff";

const LINE = fc.constantFrom(
  "let a = 1 V",
  "let b = 2 kΩ ± 1 %",
  "",
  "show a.v",
  "  x -- R1 : resistor 1 kΩ -- y",
  "# note",
);
const TEXT = fc
  .array(LINE, { maxLength: 24 })
  .map((lines) => (lines.length === 0 ? "" : `${lines.join("\n")}\n`));

const written = (line: DiffLine) =>
  line.marks.reduceRight(
    (text, { from, to }) => `${text.slice(0, from)}[${text.slice(from, to)}]${text.slice(to)}`,
    line.text,
  );

/** Rows as people would write them: " same", "-gone", "+come". */
const rowsOf = (before: string, after: string) =>
  diffTexts(before, after).flatMap(({ isSame, before: a, after: b }) =>
    isSame ? [` ${a!.text}`] : [...(a ? [`-${written(a)}`] : []), ...(b ? [`+${written(b)}`] : [])],
  );

describe("two texts line by line", () => {
  test("a changed line stands beside what it became, the words that differ marked", () => {
    const before = 'title "x"\nlet R = 100 kΩ ± 0.1 %\nshow v\n';
    expect(rowsOf(before, before.replace("100", "47.5"))).toEqual([
      ' title "x"',
      "-let R = [100] kΩ ± 0.1 %",
      "+let R = [47.5] kΩ ± 0.1 %",
      " show v",
    ]);
  });

  test("a line is paired with the one it is most like, and others are added or removed whole", () => {
    const rows = diffTexts("let a = 1 V\nlet b = 2 V\n", "# the supplies\nlet b = 3 V\n");
    expect(rows.map(({ before, after }) => [before?.text ?? null, after?.text ?? null])).toEqual([
      ["let a = 1 V", null],
      [null, "# the supplies"],
      ["let b = 2 V", "let b = 3 V"],
    ]);
  });

  test("both texts can be read off the rows, numbered without gaps, and marks stand only in changed lines", () => {
    fc.assert(
      fc.property(TEXT, TEXT, (before, after) => {
        const rows = diffTexts(before, after);
        for (const [side, text] of [
          ["before", before],
          ["after", after],
        ] as const) {
          const lines = rows.flatMap((row) => row[side] ?? []);
          expect(lines.map((line) => line.text)).toEqual(linesOf(text));
          expect(lines.map((line) => line.number)).toEqual(lines.map((_, k) => k + 1));
        }
        for (const { isSame, before: a, after: b } of rows) {
          if (isSame) expect(a!.text).toBe(b!.text);
          else expect(a?.text === b?.text && a !== null).toBe(false);
        }
      }),
      { numRuns: 300 },
    );
  });

  test("what is not marked in a changed line is the same on both sides", () => {
    fc.assert(
      fc.property(TEXT, TEXT, (before, after) => {
        const unmarked = ({ text, marks }: DiffLine) =>
          marks.reduceRight((left, { from, to }) => left.slice(0, from) + left.slice(to), text);
        for (const { before: a, after: b } of diffTexts(before, after)) {
          if (a !== null && b !== null) expect(unmarked(a)).toBe(unmarked(b));
        }
      }),
      { numRuns: 200 },
    );
  });
});

/** Work that would grow as the square of a hostile text: each of these took minutes, on the server as in the browser. */
describe("texts made to be long to compare", () => {
  const words = (count: number, step: number) => {
    return Array.from({ length: count }, (_, k) => `w${(k * step) % 997}`).join(" ");
  };

  test("one long line with its words in another order is marked from end to end", () => {
    const [before, after] = [`same ${words(40_000, 7)} end`, `same ${words(40_000, 11)} end`];
    const [row, ...others] = diffTexts(before, after);
    expect(others).toEqual([]);
    expect(row!.before!.marks.length).toBe(1);
    const [{ from, to }] = row!.before!.marks as [{ from: number; to: number }];
    expect(before.slice(0, from)).toBe(after.slice(0, from));
    expect(before.slice(to)).toBe(after.slice(after.length - (before.length - to)));
  });

  test("many long lines and many short ones are told apart at once", () => {
    const lines = (step: number) => Array.from({ length: 50 }, (_, k) => words(1_000, step + k)).join("\n");
    expect(diffTexts(lines(3), lines(501)).length).toBe(50);
    const short = (of: (k: number) => number) => Array.from({ length: 20_000 }, (_, k) => of(k)).join("\n");
    expect(
      diffTexts(
        short((k) => k % 97),
        short((k) => (k * k) % 89),
      ).length,
    ).toBe(20_000);
  });

  test("a mark cuts no character of two units", () => {
    const [before, after] = [`😀${words(3_000, 7)}😀`, `😁${words(3_000, 11)}😂`];
    const [row] = diffTexts(before, after);
    for (const { text, marks } of [row!.before!, row!.after!])
      for (const { from, to } of marks)
        expect(
          [text.slice(0, from), text.slice(from, to), text.slice(to)].some((part) =>
            /\p{Surrogate}/u.test(part),
          ),
        ).toBe(false);
  });
});

describe("folds", () => {
  test("cover every row once, hide no change, and leave three rows around each", () => {
    fc.assert(
      fc.property(TEXT, TEXT, (before, after) => {
        const rows = diffTexts(`${"# same\n".repeat(9)}${before}`, `${"# same\n".repeat(9)}${after}`);
        const stretches = foldsOf(rows);
        let next = 0;
        for (const { from, to, isFolded } of stretches) {
          expect(from).toBe(next);
          next = to;
          if (isFolded)
            expect(
              rows
                .slice(Math.max(0, from - 3), to + 3)
                .every(({ isSame }, k) => isSame || k < 3 || k >= 3 + to - from),
            ).toBe(true);
          if (isFolded) expect(rows.slice(from, to).every(({ isSame }) => isSame)).toBe(true);
        }
        expect(next).toBe(rows.length);
      }),
    );
  });

  test("neighbouring lines are one change", () => {
    const rows = diffTexts("a\nb\nc\nd\n", "a\nx\ny\nd\nz\n");
    expect(changesIn(rows).length).toBe(2);
    expect(changesIn(diffTexts("a\n", "a\n"))).toEqual([]);
    expect(foldsOf(diffTexts("a\n".repeat(20), "a\n".repeat(20)))).toEqual([
      { from: 0, to: 20, isFolded: false },
    ]);
  });
});
