import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { linesOf } from "@/app/_components/editor/plain-lines";
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
