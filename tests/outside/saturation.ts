import { CLOSED_FORM, lines, type OutsideCase, type Reference } from "./case";
import { record, recordsOf, solved, temperature, transistor } from "./textbook";

function saturated(one: Reference): OutsideCase {
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: saturated transistor"`,
      temperature(one),
      transistor("array", one),
      `ground -- IB : current ${one.params.bias} A -- b`,
      `ground -- IC : current ${one.params.IC} A -- c`,
      "Q1 : array { c = c, b = b, e = ground }",
      "show b.v, c.v",
    ),
    expected: [
      { trace: "b.v", value: solved(one, "VBE"), relative: CLOSED_FORM },
      { trace: "c.v", value: solved(one, "VCEsat"), relative: CLOSED_FORM },
    ],
  };
}

/** No current in one of the two outer pins, and an Is so small beside the base current that the −1 terms move nothing. */
function limits(one: Reference): readonly OutsideCase[] {
  const gain = (alpha: number) => `${alpha} / (1 - ${alpha})`;
  const { alphaF, alphaR, VT } = one.params;
  const text = (title: string, wired: string, shown: string) =>
    lines(
      `title "${one.id}: ${title}"`,
      `knob temperature = ${VT} V * q_e / k_B`,
      `model array : npn { Is = 1e-18 A, beta_f = ${gain(Number(alphaF))}, beta_r = ${gain(Number(alphaR))} }`,
      "ground -- IB : current 1 mA -- b",
      `ground -- IX : current 0 A -- ${shown}`,
      wired,
      `show ${shown}.v`,
    );
  const open = text("open collector", "Q1 : array { c = c, b = b, e = ground }", "c");
  const turned = text("open emitter", "Q1 : array { c = ground, b = b, e = e }", "e");
  return [
    {
      id: one.id,
      source: one.source,
      text: open,
      expected: [
        { trace: "c.v", value: solved(one, "VCEsat"), relative: CLOSED_FORM },
        { trace: "c.v", value: "17.3e-3", absolute: 0.05e-3 },
      ],
    },
    {
      id: one.id,
      source: one.source,
      text: turned,
      expected: [
        { trace: "e.v", value: solved(one, "VECsat"), relative: CLOSED_FORM },
        { trace: "e.v", value: "0.251e-3", absolute: 0.5e-6 },
      ],
    },
  ];
}

/** Saturation by the law of Ebers and Moll 1954 (from memory); sources beside each record. */
export const SATURATION: readonly OutsideCase[] = [
  ...["TB10a", "TB10b", "TB10c", "TB10d"].map(record).map(saturated),
  ...recordsOf("TB10e").flatMap(limits),
];
