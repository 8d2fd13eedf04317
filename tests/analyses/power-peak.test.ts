import { describe, expect, test } from "vitest";
import { compile, type Job } from "@/lib/analyses/compile";
import { powerPeak } from "@/lib/analyses/power-peak";
import { solveRange } from "@/lib/analyses/sweep";
import { finalJudgement } from "@/lib/analyses/verdict";

function jobOf(text: string): Job {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return job;
}

describe("the part that takes in most power", () => {
  test("is by Joule's law the smaller of two resistors in parallel, at the greatest voltage of either sign", () => {
    const job = jobOf(`title "Two heaters"
knob V_in = 1 V
knob R_b = 50 Ω
ground -- VS : voltage V_in -- in
in -- R1 : resistor 100 Ω -- ground
in -- R2 : resistor R_b -- ground
sweep V_in from -12 V to 10 V, 201 points
sweep R_b over 400 Ω, 200 Ω, 50 Ω
show v = in.v
`);
    const peak = powerPeak(job)!;
    expect(peak.element).toBe("R2");
    // V²/R = 144 V² / 50 Ω.
    expect(peak.watts).toBeCloseTo(2.88, 9);
    expect(peak.at.map(({ value }) => value)).toEqual([-12, 50]);
    expect(finalJudgement(job, { traces: [new Float64Array(603)] }).power).toEqual(peak);
  });

  test("is a transistor where one carries the voltage: what its supply gives, less what the resistor takes", () => {
    const job = jobOf(`title "Follower"
knob V_in = 5 V
model t : npn { Is = 1 fA, beta_f = 100 }
ground -- VS : voltage 20 V -- top
ground -- VB : voltage V_in -- b
Q1 : t { c = top, b = b, e = e }
e -- R1 : resistor 100 Ω -- ground
sweep V_in over 5 V
show out = e.v
show taken = R1.p
show given = VS.i * 20 V + VB.i * 5 V
`);
    const peak = powerPeak(job)!;
    expect(peak.element).toBe("Q1");
    const [, taken, given] = solveRange(job, 0, 1).traces.map((values) => values[0]!);
    expect(peak.watts).toBeCloseTo(given! - taken!, 9);
    expect(peak.watts).toBeGreaterThan(0.6);
  });

  test("is none in a circuit without parts that become hot, and many sweeps take no longer than one", () => {
    const none = jobOf(
      'title "Nothing"\nground -- V1 : voltage 1 V -- a\na -- V2 : voltage 1 V -- b\nb -- L1 : law { amps = 1 mA } -- ground\nshow v = b.v\n',
    );
    expect(powerPeak(none)).toBeNull();
    const knobs = Array.from({ length: 6 }, (_, k) => `k${k}`);
    const many = jobOf(
      [
        'title "Many sweeps"',
        ...knobs.map((knob) => `knob ${knob} = 1 V`),
        `ground -- V1 : voltage ${knobs.join(" + ")} -- a`,
        "a -- R1 : resistor 1 kΩ -- ground",
        ...knobs.map((knob) => `sweep ${knob} over 1 V, 2 V, 3 V, 4 V, 5 V`),
        "show v = a.v",
      ].join("\n"),
    );
    expect(many.plan.points).toBe(15_625);
    expect(powerPeak(many)!.watts).toBeGreaterThan(0);
  });
});
