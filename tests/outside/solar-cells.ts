import reference from "@/tests/reference/solar-cells.json";
import { CLOSED_FORM, type Expected, figure, lines, listed, type OutsideCase, type Traces } from "./case";

type Parameters = Readonly<Record<string, string>>;

const { results, forward, merit } = reference;

/** The published root mean squares have five digits; a sum over 26 squares of differences keeps ten digits of the exact ones. */
const PUBLISHED = 1e-4;
const EXACT = 1e-10;

/** The records: each parameter set by its tag, the currents and the figures of merit of the first one. */
export const SOLAR_TABLE: readonly string[] = [...results.map(({ tag }) => tag), "forward", "merit"];

/** The cell of a record from junction `j` to ground; `VT_V` is the thermal voltage of the record's own k and q. */
function cell(parameters: Parameters, volts: string): readonly string[] {
  const light = `photocurrent = ${figure(parameters, "Iph")} A`;
  const model = (name: string, n: number, is: string, more: string) => [
    `model d${n} : diode { Is = ${figure(parameters, is)} A, n = ${figure(parameters, name)} * (${volts} V / V_T)${more} }`,
    `j -- D${n} : diode d${n} -- ground`,
  ];
  const diodes =
    parameters.Is === undefined
      ? [...model("n1", 1, "Is1", `, ${light}`), ...model("n2", 2, "Is2", "")]
      : model("n", 1, "Is", `, ${light}`);
  return [...diodes, `j -- RSH : resistor ${figure(parameters, "Rsh")} Ω -- ground`];
}

function dataOf(tag: string) {
  return tag.startsWith("PWP201") ? reference.PWP201_45C : reference.RTC_France_33C;
}

/** The measured current put into the equation: the junction stands at V + I·Rs, and the cell answers with its current there. */
function implicit(tag: string, parameters: Parameters, volts: string): string {
  const { points, T_K } = dataOf(tag);
  const rs = Number(figure(parameters, "Rs"));
  const junctions = points.map(({ V, I }) => String(Number(V) + Number(I) * rs));
  return lines(
    `title "${tag}: implicit"`,
    "knob V_junction = 0 V",
    `knob temperature = ${T_K} K`,
    ...cell(parameters, volts),
    "j -- VJ : voltage -V_junction -- ground",
    `sweep V_junction over ${listed(junctions, "V")}`,
    "show current = VJ.i",
  );
}

/** The current at the measured voltages. */
function explicit(tag: string, parameters: Parameters, volts: string, at: readonly string[]): string {
  return lines(
    `title "${tag}: current"`,
    "knob V_cell = 0 V",
    `knob temperature = ${dataOf(tag).T_K} K`,
    ...cell(parameters, volts),
    `j -- RS : resistor ${figure(parameters, "Rs")} Ω -- t`,
    "t -- VT : voltage -V_cell -- ground",
    `sweep V_cell over ${listed(at, "V")}`,
    "show current = RS.i, power = RS.i * t.v",
  );
}

function rootMeanSquare(tag: string): (traces: Traces) => Traces {
  const { points } = dataOf(tag);
  return (traces) => {
    const found = traces.get("current")!;
    const squares = points.map(({ I }, k) => (found[k]! - Number(I)) ** 2);
    const mean = squares.reduce((sum, square) => sum + square, 0) / squares.length;
    return new Map([["rms", Float64Array.of(Math.sqrt(mean))]]);
  };
}

const sets: readonly OutsideCase[] = results.flatMap((result) => {
  const { tag, VT_V } = result;
  const parameters = result.parameters as unknown as Parameters;
  const source =
    "source" in result
      ? result.source
      : `optimum recomputed with 50 digits, residual: ${"residual" in result ? result.residual : tag}`;
  const one = (text: string, expected: readonly Expected[]): OutsideCase => ({
    id: tag,
    source: source!,
    text,
    derive: rootMeanSquare(tag),
    expected,
  });
  const volts = dataOf(tag).points.map(({ V }) => V);
  const found: OutsideCase[] = [];
  const ofImplicit =
    "rmse_implicit_residual_at_measured_I" in result ? result.rmse_implicit_residual_at_measured_I : null;
  const ofExact = "rmse_exact_current" in result ? result.rmse_exact_current : null;
  const optimum = "rmse_at_optimum" in result ? result.rmse_at_optimum : null;
  const isExact = tag.includes("optimum-exact");
  const impliedBy = ofImplicit ?? (isExact ? null : optimum);
  const exactBy = ofExact ?? (isExact ? optimum : null);
  if (impliedBy != null) {
    const published = /^RMSE ([\d.e-]+)/.exec("published" in result ? (result.published ?? "") : "")?.[1];
    found.push(
      one(implicit(tag, parameters, VT_V), [
        { trace: "rms", value: impliedBy, relative: EXACT },
        ...(published === undefined ? [] : [{ trace: "rms", value: published, relative: PUBLISHED }]),
      ]),
    );
  }
  if (exactBy != null) {
    found.push(
      one(explicit(tag, parameters, VT_V, volts), [{ trace: "rms", value: exactBy, relative: EXACT }]),
    );
  }
  return found;
});

const published = results[0]!;
const parameters = published.parameters as unknown as Parameters;

/** Source: as the first parameter set; the currents solved with 50 digits. */
const table: OutsideCase = {
  id: "forward",
  source: published.source!,
  text: explicit(
    "RTC-SD-published",
    parameters,
    published.VT_V,
    forward.map(({ V }) => V),
  ),
  expected: forward.map(({ I_exact_model }, point) => ({
    trace: "current",
    point,
    value: I_exact_model,
    relative: CLOSED_FORM,
  })),
};

/** Short circuit, open circuit and the point of most power, which has less power a millivolt to either side. */
const figures: readonly OutsideCase[] = [
  {
    id: "merit",
    source: published.source!,
    text: explicit("RTC-SD-published", parameters, published.VT_V, [
      "0",
      merit.Vmp,
      String(Number(merit.Vmp) - 1e-3),
      String(Number(merit.Vmp) + 1e-3),
    ]),
    derive(traces) {
      const [, most, below, above] = traces.get("power")!;
      return new Map([...traces, ["gain", Float64Array.of(Math.sign(most! - Math.max(below!, above!)))]]);
    },
    expected: [
      { trace: "current", point: 0, value: merit.Isc, relative: CLOSED_FORM },
      { trace: "current", point: 1, value: merit.Imp, relative: 1e-11 },
      { trace: "power", point: 1, value: merit.Pmp, relative: CLOSED_FORM },
      { trace: "gain", value: 1 },
    ],
  },
  {
    id: "merit",
    source: published.source!,
    text: lines(
      'title "Open circuit"',
      `knob temperature = ${reference.RTC_France_33C.T_K} K`,
      ...cell(parameters, published.VT_V),
      `j -- RS : resistor ${parameters.Rs} Ω -- t -- IT : current 0 A -- ground`,
      `show t.v, filling = ${merit.Pmp} W / (t.v * ${merit.Isc} A)`,
    ),
    expected: [
      { trace: "t.v", value: merit.Voc, relative: CLOSED_FORM },
      { trace: "filling", value: merit.FF, relative: CLOSED_FORM },
    ],
  },
];

/** Published cells and parameter sets; sources beside each record. */
export const SOLAR_CELLS: readonly OutsideCase[] = [...sets, table, ...figures];
