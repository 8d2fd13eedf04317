import { describe, expect, test } from "vitest";
import { bipolarAt, bipolarLaw } from "@/lib/devices/bipolar";
import { bipolarDoubt, bipolarSpread } from "@/lib/devices/bipolar-proof";
import reference from "@/tests/reference/device-laws.json";

// Source of the figures: tests/reference/device-laws.py, the published laws with 60 digits, slopes by differences.

type Row = (typeof reference.bipolar)[number];

/** S. The differences behind the reference lose what is smaller. */
const VANISHED = 1e-40;

const none = () => ({ ic: 0, ib: 0, icF: 0, icR: 0, ibF: 0, ibR: 0 });

function lawOf({ model, T, vbe, vce }: Row, moveBe = 0, moveBc = 0) {
  const law = none();
  bipolarLaw(bipolarAt(model, T), vbe + moveBe, vbe - vce + moveBc, vce + moveBe - moveBc, law);
  return law;
}

describe("the bounds on a transistor", () => {
  test.each(["ic", "ib"] as const)(
    "hold the rounding of its %s, leakage and high injection included",
    (name) => {
      for (const row of reference.bipolar) {
        const bounds = none();
        bipolarDoubt(bipolarAt(row.model, row.T), row.vbe, row.vbe - row.vce, bounds);
        const error = Math.abs(lawOf(row)[name] - Number(row[name]));
        expect(error, JSON.stringify(row)).toBeLessThanOrEqual(bounds[name]);
        // A bound that is much wider than rounding proves nothing.
        const size =
          Math.abs(lawOf(row)[name]) + row.model.Is + 0.1 * (lawOf(row).icF + Math.abs(lawOf(row).icR));
        expect(bounds[name], JSON.stringify(row)).toBeLessThanOrEqual(1e-11 * size);
      }
    },
  );

  test.each(["icF", "icR", "ibF", "ibR"] as const)("hold how its %s changes near by", (name) => {
    for (const row of reference.bipolar) {
      const at = bipolarAt(row.model, row.T);
      const slope = lawOf(row)[name];
      for (const delta of [1e-9, 1e-5, 3e-3]) {
        const bounds = none();
        bipolarSpread(at, row.vbe, row.vbe - row.vce, delta, bounds);
        expect(Math.abs(slope - Number(row[name])), JSON.stringify(row)).toBeLessThanOrEqual(
          bounds[name] + VANISHED,
        );
        for (const [be, bc] of [
          [1, 1],
          [1, -1],
          [-1, 1],
          [-0.4, -1],
        ] as const) {
          const moved = lawOf(row, be * delta, bc * delta)[name];
          expect(Math.abs(moved - slope), `${delta} ${JSON.stringify(row)}`).toBeLessThanOrEqual(
            bounds[name],
          );
        }
        const all = Math.abs(lawOf(row).icF) + Math.abs(lawOf(row).icR) + Math.abs(lawOf(row).ibF);
        if (delta < 1e-8) expect(bounds[name]).toBeLessThanOrEqual(1e-5 * all + 1e-30);
      }
    }
  });
});
