import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type Case, junit } from "@/lib/cli/junit";
import { sparkline } from "@/lib/cli/sparkline";

/** Reads XML strictly enough to tell that it is well-formed: tags that match, quoted attributes, known entities, legal characters. */
function readXml(text: string): { name: string; attributes: Record<string, string> }[] {
  const found: { name: string; attributes: Record<string, string> }[] = [];
  const open: string[] = [];
  let roots = 0;
  const body = text.replace(/^<\?xml version="1\.0" encoding="UTF-8"\?>\n/u, "");
  expect(body).not.toBe(text);
  const token = /<(\/?)([a-z]+)((?: [a-z]+="[^"<]*")*)(\/?)>|([^<]+)/guy;
  let at = 0;
  for (const [whole, closing, name, attributes, empty, data] of body.matchAll(token)) {
    at += whole.length;
    // Production 2 of XML 1.0.
    expect(whole).toMatch(/^[\t\n\r\u{20}-\u{d7ff}\u{e000}-\u{fffd}\u{10000}-\u{10ffff}]*$/u);
    expect(whole.replace(/&(amp|lt|gt|quot|apos|#\d+);/gu, "")).not.toContain("&");
    if (data !== undefined) {
      if (open.length === 0) expect(data.trim()).toBe("");
    } else if (closing === "/") expect(open.pop()).toBe(name);
    else {
      if (open.length === 0) roots += 1;
      const pairs = [...attributes!.matchAll(/ ([a-z]+)="([^"]*)"/gu)].map((pair) => [pair[1]!, pair[2]!]);
      expect(new Set(pairs.map(([key]) => key)).size).toBe(pairs.length);
      found.push({ name: name!, attributes: Object.fromEntries(pairs) });
      if (empty === "") open.push(name!);
    }
  }
  expect({ at, roots, open }).toEqual({ at: body.length, roots: 1, open: [] });
  return found;
}

const broken: Case = {
  name: 'slope "at" <25 °C>',
  problem: { kind: "failure", type: "broken", message: "by 1 mV\n& more", details: "]]> <a>" },
};

describe("the report for pipelines", () => {
  test("counts cases, failures and errors in all and a suite", () => {
    const error: Case = { name: "e", problem: { kind: "error", type: "NAM3", message: "m", details: "d" } };
    const text = junit([
      { file: "a.swn", title: "A", cases: [{ name: "ok", problem: null }, broken] },
      { file: "b.swn", title: "", cases: [error] },
    ]);
    const elements = readXml(text);
    expect(elements[0]).toEqual({
      name: "testsuites",
      attributes: { name: "sweepwright", tests: "3", failures: "1", errors: "1" },
    });
    const suites = elements.filter(({ name }) => name === "testsuite").map(({ attributes }) => attributes);
    expect(suites).toEqual([
      { name: "A", file: "a.swn", tests: "2", failures: "1", errors: "0" },
      { name: "b.swn", file: "b.swn", tests: "1", failures: "0", errors: "1" },
    ]);
    expect(elements.filter(({ name }) => name === "testcase")).toHaveLength(3);
  });

  test("is well-formed whatever stands in names and messages", () => {
    const anything = fc.string({ unit: "binary", maxLength: 40 });
    fc.assert(
      fc.property(anything, anything, anything, (name, message, details) => {
        const problem = { kind: "failure", type: "broken", message, details } as const;
        readXml(junit([{ file: name, title: name, cases: [{ name, problem }] }]));
      }),
      { seed: 3, numRuns: 300 },
    );
    readXml(junit([{ file: "\u0000\ud800", title: "\ufffe", cases: [broken] }]));
  });
});

describe("a curve in one line", () => {
  test.each([
    [[0, 1, 2, 3, 4, 5, 6, 7], 8, "▁▂▃▄▅▆▇█"],
    [[7, 0], 8, "█▁"],
    [[1, 1, 1], 8, "▁▁▁"],
    [[0, null, 7], 8, "▁ █"],
    [[0, 2, 7, 7], 2, "▁█"],
    [[null, null], 8, "  "],
  ])("%j in %i", (values, width, line) => {
    expect(sparkline(values, width)).toBe(line);
  });
});
