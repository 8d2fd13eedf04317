import { describe, expect, test } from "vitest";
import { solveWhole, type WholeResult } from "@/app/_components/live-example/whole-plan";
import { STEPS } from "@/app/docs/tour/steps";
import { MENDED, ROOMY, TOUR_TEXT, withBulk, withDraws, withRequirement } from "@/app/docs/tour/tour-text";
import { format } from "@/lib/language/format";

function solve(text: string): WholeResult {
  const answer = solveWhole(
    text,
    () => {},
    () => 0,
  );
  if (answer.kind !== "result") throw new Error(`The text is not solved: ${answer.kind}`);
  return answer.result;
}

const required = withRequirement(TOUR_TEXT);
const mended = withBulk(required, MENDED);
const drawn = withDraws(mended);
const roomy = withBulk(drawn, ROOMY);

test("every text of the tour is canonical, and doing a step twice changes nothing", () => {
  for (const text of [TOUR_TEXT, required, mended, drawn, roomy]) expect(format(text)).toBe(text);
  expect(withRequirement(required)).toBe(required);
  expect(withBulk(mended, MENDED)).toBe(mended);
  expect(withDraws(drawn)).toBe(drawn);
});

test("a step that is skipped to does what it needs of those before it", () => {
  expect(withBulk(TOUR_TEXT, MENDED)).toBe(mended);
  expect(withDraws(TOUR_TEXT)).toContain("R_bulk = 1 Ω ± 30 % in 100 mΩ .. 100 Ω");
  expect(withDraws('title "Something else"\n')).toBe(withDraws(TOUR_TEXT));
});

describe("what the steps say", () => {
  test("59 mV a decade", () => {
    // V_T · ln 10 at 25 °C by the exact constants of the SI, V; the bulk adds a part of a per mille.
    const decade = ((1.380649e-23 * 298.15) / 1.602176634e-19) * Math.LN10;
    const slope = solve(TOUR_TEXT).frame.readings.find(({ name }) => name === "slope")!.values[0]!;
    expect(Math.abs(slope / decade - 1)).toBeLessThan(2e-3);
  });

  test("the requirement is broken at 1 Ω and holds at half of it", () => {
    const [broken] = solve(required).frame.requirements;
    expect(broken).toMatchObject({ verdict: "broken", label: "log conformance" });
    expect(solve(mended).frame.requirements.map(({ verdict }) => verdict)).toEqual(["holds"]);
  });

  test("a tolerance of 30 % breaks some of 200 draws, and none with 400 mΩ", () => {
    expect(solve(drawn).frame.requirements[0]!.yield).toMatchObject({ holds: 181, of: 200 });
    expect(solve(roomy).frame.requirements[0]).toMatchObject({ verdict: "holds", yield: { holds: 200 } });
  }, 60_000);

  test("what is to be written stands in the text when it is shown", () => {
    const quoted = STEPS.flatMap(({ task }) => [...task.matchAll(/`([^`]*)`/gu)].map(([, words]) => words!));
    expect(quoted.length).toBeGreaterThan(4);
    expect(quoted.filter((words) => !drawn.includes(words))).toEqual([]);
  });
});
