import { readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { tokenizeLine } from "@/app/_components/editor/token-lines";
import { highlight } from "@/lib/language/highlight";

/** The classes of a text read line by line, as offsets in the whole text. */
function lineByLine(text: string): { from: number; class: string }[] {
  const found: { from: number; class: string }[] = [];
  let open = "";
  let start = 0;
  for (const line of text.split("\n")) {
    const read = tokenizeLine(line, open);
    for (const token of read.tokens) {
      if (token.class !== null) found.push({ from: start + token.at, class: token.class });
    }
    open = read.open;
    start += line.length + 1;
  }
  return found;
}

const whole = (text: string) => highlight(text).map(({ from, class: kind }) => ({ from, class: kind }));

describe("lines read one by one have the colours of the whole text", () => {
  const names = readdirSync("examples").filter((name) => name.endsWith(".swn"));
  test.each(names)("%s", (name) => {
    const text = readFileSync(`examples/${name}`, "utf8");
    expect(lineByLine(text)).toEqual(whole(text));
  });

  test("a statement that goes on over comments and empty lines", () => {
    const text = [
      "in -- R1 : resistor 1 kΩ",
      "# between",
      "",
      "   -- x -- R2 : resistor 2 kΩ -- out",
      "model d : diode {",
      "  Is = 1 fA, # leakage",
      "  n = 1.1 }",
      "show from = out.v",
      "sweep a from 1 V",
      "  to 2 V, 3 points",
    ].join("\n");
    // A line that ends inside a statement cannot see what follows it; nothing here depends on that.
    expect(lineByLine(text)).toEqual(whole(text));
  });

  test("a statement too long to remember costs its colours, not the rest", () => {
    const long = `model d : diode {\n${"  n = 1.1,\n".repeat(2000)}}\nlet a = 1 V`;
    const last = lineByLine(long).slice(-5);
    expect(last.map((one) => one.class)).toEqual(["keyword", "name", "operator", "number", "unit"]);
  });
});

test("tokens of any line tile it from its start, whatever stands open", () => {
  fc.assert(
    fc.property(fc.string(), fc.string(), (line, open) => {
      const text = line.replaceAll("\n", " ");
      const { tokens } = tokenizeLine(text, open);
      const starts = tokens.map((token) => token.at);
      expect(starts).toEqual([...new Set(starts)].sort((a, b) => a - b));
      if (text.length > 0) expect(starts[0]).toBe(0);
      expect(starts.every((at) => at < Math.max(1, text.length))).toBe(true);
    }),
  );
});
