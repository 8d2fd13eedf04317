import { describe, expect, test } from "vitest";
import { checkWiring } from "@/lib/circuit/wiring";
import { CATALOGUE } from "@/lib/language/catalogue";
import { check } from "@/lib/language/checker";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { MOST_TEXT, MOST_WORD, OWN, SHARED } from "@/lib/language/limits";
import { WIRING_PROBLEMS } from "@/tests/circuit/problems";
import { BLOCK_PROBLEMS } from "./block-problems";
import { CONTRACT_PROBLEMS } from "./contract-problems";
import { LAW_PROBLEMS } from "./law-problems";
import { LANGUAGE_PROBLEMS, type Problem } from "./problems";
import { SPELLING_PROBLEMS } from "./spelling-problems";

function unmark(marked: string): { text: string; from: number; to: number } {
  const from = marked.indexOf("«");
  const to = marked.indexOf("»") - 1;
  return { text: marked.replace("«", "").replace("»", ""), from, to };
}

function expectProblem(problem: Problem, diagnose: (text: string) => Diagnostic[]): void {
  const { text, from, to } = unmark(problem.text);
  const found = diagnose(text);
  expect(found).toHaveLength(1);
  const { fix, message, ...place } = found[0]!;
  expect(place).toEqual({ code: problem.code, severity: problem.severity ?? "error", from, to });
  expect(message).toMatch(/^[^\n]*[.?]$/u);
  expect(message).not.toMatch(/[.?] [A-Z]/u);
  if (problem.says !== undefined) expect(message).toContain(problem.says);
  if (problem.mended === undefined) return;
  const mended = text.slice(0, fix!.from) + fix!.text + text.slice(fix!.to);
  expect(mended).toBe(problem.mended);
  expect(diagnose(mended).map((one) => one.code)).not.toContain(problem.code);
}

describe("each problem of a text is found once, at its place, in one sentence", { timeout: 60_000 }, () => {
  test.each([
    ...LANGUAGE_PROBLEMS,
    ...BLOCK_PROBLEMS,
    ...LAW_PROBLEMS,
    ...CONTRACT_PROBLEMS,
    ...SPELLING_PROBLEMS,
  ])("$code: $text", (problem) => {
    expectProblem(problem, (text) => check(text).diagnostics);
  });
  test.each(WIRING_PROBLEMS)("$code: $text", (problem) => {
    expectProblem(problem, (text) => {
      const { design, diagnostics } = check(text);
      expect(diagnostics.filter((one) => one.code !== "PLN8")).toEqual([]);
      return checkWiring(design!, text);
    });
  });
});

describe("limits", () => {
  const code = (text: string): string[] => check(text).diagnostics.map((one) => one.code);

  test("CAP1: a text as long as allowed is read, one character more is not", () => {
    const text = `${"#".repeat(MOST_TEXT - 1)}\n`;
    expect(code(text)).toEqual(["PLN8"]);
    expect(code(`${text}\n`)).toEqual(["CAP1"]);
    expect(check(`${text}\n`, { size: OWN }).diagnostics.map((one) => one.code)).toEqual(["PLN8"]);
  });

  test("CAP3: too many elements", () => {
    const line = (i: number): string => `ground -- R${i} : resistor 1 kΩ -- a\n`;
    const most = Array.from({ length: SHARED.elements }, (_, i) => line(i)).join("");
    expect(code(`${most}show a.v`)).toEqual([]);
    const more = `${most}${line(SHARED.elements)}show a.v`;
    expect(code(more)).toEqual(["CAP3"]);
    expect(check(more, { size: OWN }).diagnostics).toEqual([]);
  });

  test("CAP5: too many values to keep", () => {
    const nets = Array.from({ length: 60 }, (_, i) => `ground -- R${i} : resistor 1 kΩ -- n${i}\n`).join("");
    expect(code(`${nets}knob k = 1 V\nsweep k from 1 V to 2 V, 819672 points\nshow n1.v`)).toEqual([]);
    expect(code(`${nets}knob k = 1 V\nsweep k from 1 V to 2 V, 819673 points\nshow n1.v`)).toEqual(["CAP5"]);
  });

  test("CAP9: a name as long as allowed is understood, one character more is not", () => {
    const named = (length: number) => {
      const net = "x".repeat(length);
      return `ground -- V1 : voltage 1 V -- ${net} -- R1 : resistor 1 kΩ -- ground\nshow ${net}.v\n`;
    };
    expect(code(named(MOST_WORD))).toEqual([]);
    expect(code(named(MOST_WORD + 1))).toEqual(["CAP9", "CAP9"]);
  });

  test("CAP6: after two hundred problems the rest is counted", () => {
    const { diagnostics } = check("let = 1\n".repeat(300));
    expect(diagnostics).toHaveLength(201);
    expect(diagnostics.at(-1)).toMatchObject({
      code: "CAP6",
      message: "100 further problems are not listed; mend these first.",
    });
  });
});

test("every code of the catalogue is produced by a test, and no test knows another", () => {
  const tested = new Set(
    [
      ...LANGUAGE_PROBLEMS,
      ...BLOCK_PROBLEMS,
      ...LAW_PROBLEMS,
      ...CONTRACT_PROBLEMS,
      ...SPELLING_PROBLEMS,
      ...WIRING_PROBLEMS,
    ].map((problem) => problem.code),
  );
  // Those of `use` are in use.test.ts, that of `seek` in seek-size.test.ts.
  for (const code of ["CAP1", "CAP3", "CAP5", "CAP6", "CAP9", "CAP10", "NAM13", "NAM14"]) tested.add(code);
  expect([...tested].sort()).toEqual(Object.keys(CATALOGUE).sort());
});
