import fc from "fast-check";
import { expect, test } from "vitest";
import { nearest } from "@/lib/language/nearest";

// The edits that typing makes: Damerau, Commun. ACM 7 (1964) 171–176, from memory.
test.each([
  ["resistr", "resistor"],
  ["ressistor", "resistor"],
  ["resistot", "resistor"],
  ["reisstor", "resistor"],
  ["Resistor", "resistor"],
  ["oot", "out"],
])("%s is taken for %s", (typed, meant) => {
  expect(nearest(typed, ["voltage", meant, "ground"])).toBe(meant);
});

test("what is far from everything, or the name itself, is taken for nothing", () => {
  expect(nearest("capacitor", ["resistor", "voltage", "x"])).toBeNull();
  expect(nearest("out", ["out"])).toBeNull();
  expect(nearest("x", ["y"])).toBeNull();
});

test("a beginning is taken for the one name that goes on from it, and for none where there are two", () => {
  expect(nearest("temp", ["tempo", "temperature"])).toBe("tempo");
  expect(nearest("temp", ["V_in", "temperature", "tail", "temperature"])).toBe("temperature");
  expect(nearest("gain", ["gain_first", "gain_second", "gain_second"])).toBeNull();
  expect(nearest("tem", ["temperature"])).toBeNull();
});

test("of two the nearer is taken, whatever their order", () => {
  expect(nearest("V_ref1", ["V_ref22", "V_ref2", "V_rel2"])).toBe("V_ref2");
  expect(nearest("V_ref1", ["V_rel2", "V_ref22", "V_ref2"])).toBe("V_ref2");
});

test("one edit of any name of some length is mended", () => {
  const letters = fc.string({ unit: fc.constantFrom(..."abcxyz_"), minLength: 4, maxLength: 20 });
  fc.assert(
    fc.property(letters, fc.nat(), fc.constantFrom(..."QWZ"), (name, place, letter) => {
      const at = place % name.length;
      const [before, after] = [name.slice(0, at), name.slice(at + 1)];
      for (const typed of [before + letter + after, before + after, `${before}${letter}${name.slice(at)}`]) {
        expect(nearest(typed, ["0000000000", name])).toBe(typed === name ? null : name);
      }
    }),
  );
});
