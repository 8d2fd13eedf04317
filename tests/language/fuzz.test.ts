import { expect, test } from "vitest";
import { check } from "@/lib/language/checker";
import { complaintOf, randomTexts } from "./random-texts";
import { EXAMPLES } from "./texts";

const TEXTS = 4_000;

// The long part, a million texts, is tests/bench/fuzz.ts.
test("random and mutated texts are answered soundly, and some of them are right", {
  timeout: 120_000,
}, () => {
  const next = randomTexts(
    1,
    EXAMPLES.map(([, text]) => text),
  );
  let right = 0;
  for (let k = 0; k < TEXTS; k++) {
    const text = next();
    const complaint = complaintOf(text);
    expect(complaint === null ? null : { complaint, text }).toBeNull();
    if (check(text).design !== null) right += 1;
  }
  expect(right).toBeGreaterThan(TEXTS / 200);
  expect(right).toBeLessThan(TEXTS);
});

test.each([
  "a block without braces before a comment\nblock .5current\n#",
  "let a = 1 V\nblock stage(in, out) {\n  let x = 1 V\n}Xe out. 1 V\n}\nrequire out.v ",
  '" \\ ',
  '"\\ \nnet -- ',
])("a text whose form was once not kept: %j", (text) => {
  expect(complaintOf(text)).toBeNull();
});
