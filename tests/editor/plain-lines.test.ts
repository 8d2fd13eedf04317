import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { linesOf, MOST_LINES, shownLinesOf } from "@/app/_components/editor/plain-lines";
import { highlight } from "@/lib/language/highlight";

const text = readFileSync("examples/log-ratio-head.swn", "utf8");

test("the lines shown before the editor has arrived hold the whole text", () => {
  const lines = linesOf(text);
  expect(lines.map((line) => line.pieces.map((piece) => piece.text).join("")).join("\n")).toBe(text);
  expect(lines.map((line) => line.number)).toEqual(lines.map((_, index) => index + 1));
});

test("each coloured piece is a token of the highlighting", () => {
  const tokens = new Set(highlight(text).map(({ from, to }) => `${from} ${to}`));
  const coloured = linesOf(text).flatMap((line) => line.pieces.filter((piece) => piece.ink !== undefined));
  expect(coloured.length).toBeGreaterThan(50);
  for (const piece of coloured) expect(tokens).toContain(`${piece.at} ${piece.at + piece.text.length}`);
});

test("a very long text is shown without colours, and whole", () => {
  const long = "let a = 1 V\n".repeat(5000);
  const lines = linesOf(long);
  expect(lines).toHaveLength(5001);
  expect(lines.every((line) => line.pieces.every((piece) => piece.ink === undefined))).toBe(true);
});

test("of a text of very many lines all after the first ones are one block, and no character is lost", () => {
  const text = Array.from({ length: 100_000 }, (_, k) => `# ${k}`).join("\n");
  const lines = shownLinesOf(text);
  expect(lines).toHaveLength(MOST_LINES + 1);
  expect(lines.at(-1)!.number).toBe(MOST_LINES + 1);
  expect(lines.map(({ pieces }) => pieces.map((piece) => piece.text).join("")).join("\n")).toBe(text);
  for (const { at, pieces } of lines) expect(text.startsWith(pieces[0]!.text, at)).toBe(true);
  const fitting = text.split("\n").slice(0, MOST_LINES).join("\n");
  expect(shownLinesOf(fitting)).toEqual(linesOf(fitting));
});
