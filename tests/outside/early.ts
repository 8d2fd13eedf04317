import { CLOSED_FORM, figure, lines, listed, type OutsideCase, type Reference } from "./case";
import { record } from "./textbook";

function outputs(one: Reference, Is: string, Va_f: string): string {
  const { VBE, beta_r, T } = one.params;
  return lines(
    `title "${one.id}: output lines"`,
    `knob temperature = ${T} K`,
    "knob V_ce = 5 V",
    `model early : npn { Is = ${Is}, beta_r = ${beta_r}, Va_f = ${Va_f} }`,
    `ground -- VB : voltage ${VBE} V -- b`,
    "ground -- VC : voltage V_ce -- c",
    "ground -- VD : voltage V_ce + 1 V -- d",
    "Q1 : early { c = c, b = b, e = ground }",
    "Q2 : early { c = d, b = b, e = ground }",
    `sweep V_ce over ${listed(
      one.rows!.map((row) => figure(row, "VCE")),
      "V",
    )}`,
    "show IC = Q1.c.i, slope = (Q2.c.i - Q1.c.i) / 1 V",
  );
}

function transport(one: Reference): OutsideCase {
  return {
    id: one.id,
    source: one.source,
    text: outputs(one, `${one.params.Is} A`, `${one.params.VA} V`),
    expected: one.rows!.map((row, point) => {
      return {
        trace: "IC",
        point,
        value: figure(row, "IC_transport_1_minus_VBC_over_VAF"),
        relative: CLOSED_FORM,
      };
    }),
  };
}

/**
 * The textbook's factor 1 + Vce/VA is that of the transport form with Va_f = VA + Vbe and Is·(1 + Vbe/VA). It leaves the collector
 * junction out, whose current is below Is there: hence the absolute part.
 */
function textbook(one: Reference): OutsideCase {
  const { VBE, VA, Is } = one.params;
  return {
    id: one.id,
    source: one.source,
    text: outputs(one, `${Is} A * (1 + ${VBE} / ${VA})`, `${VA} V + ${VBE} V`),
    expected: one.rows!.flatMap((row, point) => [
      {
        trace: "IC",
        point,
        value: figure(row, "IC_textbook_1_plus_VCE_over_VA"),
        relative: CLOSED_FORM,
        absolute: 2.1e-15,
      },
    ]),
  };
}

/** The slope of both forms is exactly Is·exp(Vbe/V_T)/VA; a difference over 1 V of two currents of 6e-4 A has 1e-10 of it. */
function slope(one: Reference): OutsideCase {
  const value = (one as unknown as { readonly slope_A_per_V: string }).slope_A_per_V;
  return {
    id: one.id,
    source: one.source,
    text: outputs(one, `${one.params.Is} A`, `${one.params.VA} V`),
    expected: one.rows!.flatMap((row, point) =>
      Number(row.VCE) >= 2 ? [{ trace: "slope", point, value, relative: 1e-10 }] : [],
    ),
  };
}

/** Early 1952. */
export const EARLY: readonly OutsideCase[] = [record("TB12")].flatMap((one) => [
  transport(one),
  textbook(one),
  slope(one),
]);
