import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it, test } from "vitest";
import { Cautions } from "@/app/(work)/[workspace]/runs/[id]/cautions";
import { FailedPoints } from "@/app/(work)/[workspace]/runs/[id]/failed-points";
import { RequirementList } from "@/app/(work)/[workspace]/runs/[id]/requirement-list";
import type { RunState } from "@/app/(work)/[workspace]/runs/[id]/run-shapes";
import { RunStatusLine } from "@/app/(work)/[workspace]/runs/[id]/run-status-line";
import { StaleNotice } from "@/app/(work)/[workspace]/runs/[id]/stale-notice";
import { UnstablePoints } from "@/app/(work)/[workspace]/runs/[id]/unstable-points";
import type { RequirementDocument } from "@/lib/analyses/result";
import { ENGINE_VERSION } from "@/lib/analyses/version";

const AXES = [{ knob: "V_in", unit: "V", scale: "linear" as const, values: [1, 2, 3, 4] }];
const text = (element: React.ReactElement) =>
  renderToStaticMarkup(element)
    .replace(/<[^>]+>/g, " ")
    .replace(/[\u202f\s]+/g, " ");

describe("a run that time has gone past", () => {
  const run = { netlistId: "n", revision: 2, status: "done", engineVersion: ENGINE_VERSION } as RunState;
  const notice = (change: Partial<RunState>, latestRevision: number) =>
    text(
      <StaleNotice workspace="w" run={{ ...run, ...change }} latestRevision={latestRevision} again="again" />,
    );

  it("says which engine solved it, and offers to queue it again", () => {
    expect(notice({ engineVersion: "0" }, 2)).toMatch(
      /Of an earlier engine Version 0 solved this run.* again/,
    );
  });

  it("says that the netlist has moved on", () => {
    expect(notice({}, 5)).toMatch(
      /Of an earlier revision The netlist is at revision 5 now; this is revision 2\./,
    );
  });

  it("says nothing while it is current, or under way", () => {
    expect(notice({}, 2)).toBe("");
    expect(notice({ status: "running" }, 5)).toBe("");
  });
});

test("a run whose operating points are still sought says how far that is", () => {
  const run = { status: "running", points: 26, pointsDone: 26, pointsFailed: 0, error: null } as RunState;
  const words = text(<RunStatusLine run={{ ...run, search: { rows: 2, rowsDone: 1 } }} behind={false} />);
  expect(words).toMatch(/All points are solved; operating points are still being sought: 1 of 2 settings/);
  expect(text(<RunStatusLine run={{ ...run, pointsDone: 3 }} behind={false} />)).toMatch(
    /Being solved: 3 of 26 points/,
  );
});

test("failed points stand by their reason, with places and draws to go to, the most first", () => {
  const failures = [
    { point: 0, outcome: "undetermined" as const, unsettled: [] },
    { point: 2, outcome: "did not settle" as const, unsettled: ["out", "Q1"] },
    { point: 6, outcome: "did not settle" as const, unsettled: ["out", "Q1"] },
  ];
  const none = () => {};
  const words = text(
    <FailedPoints failures={failures} axes={AXES} draws={1} ofOneDraw={4} onPoint={none} onAll={none} />,
  );
  expect(words).toMatch(
    /3 failed points 2 did not settle\. Step after step.*Farthest from settled: out, Q1\. V_in 3 V V_in 3 V, draw 1 1 undetermined\..*V_in 1 V/,
  );
});

test("unstable points are told by their range", () => {
  const words = text(<UnstablePoints ranges={[{ from: 1, to: 3 }]} axes={AXES} ofOneDraw={4} />);
  expect(words).toMatch(/2 unstable points Solved, but the circuit would leave them .*V_in 2 V to V_in 3 V/);
  expect(renderToStaticMarkup(<UnstablePoints ranges={[]} axes={AXES} ofOneDraw={4} />)).toBe("");
});

describe("requirements of a run", () => {
  const one: RequirementDocument = {
    label: "zero",
    verdict: "holds",
    margin: 0.001,
    unit: "V",
    worst: { draw: 14, at: [] },
    yield: { holds: 19, of: 20, low: 0.751, high: 0.999 },
    share: 0.9,
    allowed: { low: -0.012, high: 0.012 },
    value: { nominal: 0.001, worst: 0.011, low: -0.02, high: 0.02 },
    drawn: [0.001],
    windows: [],
    bounds: null,
    reading: null,
  };
  const links = {
    latestRevision: 1,
    toleranceLines: {},
    readingLines: {},
    requirementLines: [48, 49],
    lineHref: (line: number) => `#L${line}`,
    sheetHref: () => null,
  };
  const list = (requirements: readonly RequirementDocument[], partly: "so far" | null = null) =>
    text(<RequirementList requirements={requirements} links={links} partly={partly} onPlace={() => {}} />);

  it("say how many draws hold beside how many must", () => {
    expect(list([one])).toMatch(
      /The requirement holds .*margin 1\.00 mV; 19 of 20 draws hold, 90 % needed: 75\.1 % to 99\.9 % of boards \(95 % confidence\) draw 14 line 48/,
    );
  });

  it("claim no yield where points are missing, and say that they are judged so far", () => {
    const unknown = { ...one, verdict: "no data" as const, margin: null, worst: null };
    const words = list([one, unknown], "so far");
    expect(words).toContain("One requirement has no data · 1 holds · so far");
    expect(words).toContain("a point that it needs is not solved; known to hold in 19 of 20 draws");
  });

  it("carry what must be known besides", () => {
    const remark = "Broken at another stable operating point.";
    expect(list([{ ...one, remark }])).toContain(remark);
  });
});

describe("cautions", () => {
  const low = { net: "a.v", volts: -5 };
  const hot = { element: "R1", watts: 2.88, at: [{ knob: "V_in", unit: "V", value: -12 }] };
  const words = (volts: number, power: typeof hot | null, draws = 0) =>
    text(<Cautions span={{ low, high: { net: "b.v", volts } }} power={power} draws={draws} />);

  it("say that dangerous voltages and heat are for local codes and a licensed engineer to judge", () => {
    const both = words(70, hot);
    expect(both).toMatch(
      /Hazardous voltage .*75\.00 V apart.*more than 60 V DC\. Follow local codes and have a licensed/,
    );
    expect(both).toMatch(
      /Heat R1 dissipates 2\.88 W at V_in −12 V .*250 mW.*stated power\. Follow local codes/,
    );
    expect(both.match(/no proof of safety/g)).toHaveLength(3);
  });

  it("warn of nothing where nothing is high, and say what was looked at", () => {
    const calm = words(10, { ...hot, watts: 0.2 });
    expect(calm).not.toMatch(/Hazardous|Heat/);
    expect(calm).toMatch(/in the netlist, at nominal values\./);
    expect(words(10, null, 40)).toMatch(/at nominal values and in 40 random draws of the tolerances/);
  });
});
