import { expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { MOST_SOUGHT_POINTS, MOST_SOUGHT_SWEEPS } from "@/lib/language/limits";

/** A current through a diode (invented), with what is asked of it. */
const text = (lines: string, more = "") => `knob I_in = 1 µA
knob I_more = 1 µA
model d : diode { Is = 1 fA }
ground -- I1 : current I_in + I_more -- a
a -- D1 : d -- ground
${more}${lines}
show a.v
`;

const found = (source: string) => {
  const { job, diagnostics } = compile(source);
  return {
    runs: job !== null,
    all: diagnostics.map(({ code, severity, from, to, message }) => {
      return { code, severity, at: source.slice(from, to), message };
    }),
  };
};

test("CAP10: a search in more sweeps than are gone through is refused where it is asked for", () => {
  const asked = (outer: number) =>
    text(
      `sweep I_in over 1 µA, 2 µA\nsweep I_more from 1 µA to 2 µA, ${outer} points\n  seek 3   # all of them`,
    );
  expect(found(asked(MOST_SOUGHT_SWEEPS))).toEqual({ runs: true, all: [] });
  const { runs, all } = found(asked(MOST_SOUGHT_SWEEPS + 1));
  expect(runs).toBe(false);
  expect(all).toHaveLength(1);
  expect(all[0]).toMatchObject({ code: "CAP10", severity: "error", at: "seek 3" });
  expect(all[0]!.message).toMatch(
    /1\u202f001 sweeps of `I_in`.* 1\u202f000 is the most; give the other sweeps fewer values\.$/,
  );
});

test("CAP10: a search at more points than are gone through is refused, with draws not counted", () => {
  const asked = (points: number) => text(`sweep I_in from 1 µA to 2 µA, ${points} points\nseek 3`);
  expect(found(asked(MOST_SOUGHT_POINTS)).runs).toBe(true);
  expect(found(asked(MOST_SOUGHT_POINTS + 1)).all[0]!.message).toMatch(
    /100\u202f001 points.*sweep fewer points\.$/,
  );
  expect(found(`${text(`sweep I_in from 1 µA to 2 µA, 2 points\nseek 3\ndraws 400000 seed 1`)}`).runs).toBe(
    true,
  );
});

test("CAP10: a circuit with more unknowns than are judged for stability is refused", () => {
  const ladder = (sections: number) =>
    Array.from(
      { length: sections },
      (_, k) =>
        `${k === 0 ? "a" : `n${k}`} -- R${k} : resistor 1 kΩ -- n${k + 1}\nn${k + 1} -- S${k} : resistor 1 kΩ -- ground\n`,
    ).join("");
  expect(found(text("seek 2", ladder(99)))).toEqual({ runs: true, all: [] });
  const { runs, all } = found(text("seek 2", ladder(100)));
  expect([runs, all[0]!.code, all[0]!.at]).toEqual([false, "CAP10", "seek 2"]);
  expect(all[0]!.message).toMatch(/^The circuit has 101 unknowns/);
});

test("without `seek` none of this is asked", () => {
  expect(found(text("sweep I_in over 1 µA, 2 µA\nsweep I_more from 1 µA to 2 µA, 2000 points")).runs).toBe(
    true,
  );
});
