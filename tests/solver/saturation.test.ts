import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { thermalVoltage } from "@/lib/units/constants";

const BASE = 1e-3;
const BETA_F = 99;

/**
 * Voltages of base and collector of an npn whose base and collector are fed by currents (Ebers and Moll, Proc. IRE 42, 1954, from
 * memory; solved for the two exponentials, which enter linearly).
 */
function closedForm(Is: number, betaR: number, collector: number, eta: number): readonly [number, number] {
  const reverse = (BASE - collector / BETA_F) / Is / ((1 + 1 / betaR) / BETA_F + 1 / betaR);
  const forward = collector / Is + reverse * (1 + 1 / betaR);
  const base = eta * Math.log1p(forward);
  return [base, base - eta * Math.log1p(reverse)];
}

describe.each([77.35, 290.1, 400])("at %d K", (kelvin) => {
  test.each([1e-60, 1e-30, 1e-24, 1e-18, 1e-15, 1e-12])("a saturated transistor of %d A", (Is) => {
    for (const betaR of [0.1, 1, 99]) {
      for (const collector of [0, 1e-12, 1e-6, -1e-9]) {
        const { job } = compile(`
          knob temperature = ${kelvin} K
          model array : npn { Is = ${Is} A, beta_f = ${BETA_F}, beta_r = ${betaR} }
          ground -- IB : current ${BASE} A -- b
          ground -- IC : current ${collector} A -- c
          Q1 : array { c = c, b = b, e = ground }
          show b.v, c.v`);
        const { traces, outcome } = solveRange(job!, 0, 1);
        expect(outcome[0]).toBe(0);
        const [base, end] = closedForm(Is, betaR, collector, thermalVoltage(kelvin));
        expect(Math.abs(traces[0]![0]! - base)).toBeLessThan(1e-12);
        expect(Math.abs(traces[1]![0]! - end)).toBeLessThan(1e-12);
      }
    }
  });
});
