import { expect, test } from "vitest";
import { parse } from "@/lib/language/parser";
import { foldsOf } from "@/lib/language/symbols/folds";

const folds = (text: string) =>
  foldsOf(parse(text).netlist, text).map(({ first, last, what }) => `${first}-${last} ${what}`);

test("blocks, statements over several lines and runs of comments fold; single lines do not", () => {
  const text = `# one
# two
title "Folds"

model array : npn {
  Is = 1 fA,
  beta_f = 100
}
block stage(in, out) {
  # within
  # the block
  Q : array {
    c = in, b = ground, e = out
  }
}
# alone
let R = 1 kΩ
  # last
  # of all`;
  expect(folds(text)).toEqual([
    "1-2 comment",
    "5-8 statement",
    "9-15 statement",
    "10-11 comment",
    "12-14 statement",
    "18-19 comment",
  ]);
});

test("an empty text has nothing to fold", () => {
  expect(folds("")).toEqual([]);
});
