import { expressionOf, type RandomLaw } from "./laws";

/** An element of a random circuit, figures in SI units. The same record is solved by the engine, as text, and by the script at 50 digits. */
export type RandomElement =
  | {
      readonly kind: "resistor";
      readonly left: string;
      readonly right: string;
      readonly ohms: number;
      /** 1/K, counted from 25 °C. */
      readonly drift?: number;
    }
  | { readonly kind: "voltage"; readonly left: string; readonly right: string; readonly volts: number }
  | { readonly kind: "current"; readonly left: string; readonly right: string; readonly amperes: number }
  | { readonly kind: "diode"; readonly anode: string; readonly cathode: string; readonly model: string }
  | {
      readonly kind: "transistor";
      readonly c: string;
      readonly b: string;
      readonly e: string;
      readonly model: string;
    }
  | {
      readonly kind: "opamp";
      readonly plus: string;
      readonly minus: string;
      readonly out: string;
      readonly model: string;
    }
  | {
      readonly kind: "gain";
      readonly plus: string;
      readonly minus: string;
      readonly out: string;
      readonly ratio: number;
    }
  | ({ readonly kind: "law"; readonly plus: string; readonly minus: string } & RandomLaw);

export type RandomModel =
  | ({ readonly kind: "diode"; readonly Rs: number } & Junction & Partial<DiodeFigures>)
  | ({
      readonly kind: "npn" | "pnp";
      readonly beta_f: number;
      readonly beta_r: number;
      readonly Va_f: number;
    } & Junction &
      Partial<TransistorFigures>)
  | ({
      readonly kind: "opamp";
      readonly gain: number;
      readonly offset: number;
      readonly bias: number;
    } & Partial<AmplifierFigures>);

type Figures<Name extends string> = { readonly [name in Name]: number };
type DiodeFigures = Figures<"V_breakdown" | "I_breakdown" | "n_breakdown" | "photocurrent">;
type TransistorFigures = Figures<
  | "Va_r"
  | "beta_power"
  | "I_leak_e"
  | "n_leak_e"
  | "I_leak_c"
  | "n_leak_c"
  | "I_knee_f"
  | "I_knee_r"
  | "R_base"
  | "R_emitter"
  | "R_collector"
>;
type AmplifierFigures = Figures<"offset_drift" | "bias_offset" | "R_out" | "out_low" | "out_high">;

interface Junction {
  readonly Is: number;
  readonly n: number;
  readonly Eg: number;
  readonly x: number;
}

export interface RandomCircuit {
  readonly seed: number;
  readonly kelvin: number;
  /** Without ground, in the order in which the netlist names them. */
  readonly nets: readonly string[];
  readonly models: Readonly<Record<string, RandomModel>>;
  readonly elements: readonly RandomElement[];
}

const UNITS: Readonly<Record<string, string>> = {
  Is: " A",
  Eg: " V",
  Rs: " Ω",
  Va_f: " V",
  offset: " V",
  bias: " A",
  V_breakdown: " V",
  I_breakdown: " A",
  photocurrent: " A",
  Va_r: " V",
  I_leak_e: " A",
  I_leak_c: " A",
  I_knee_f: " A",
  I_knee_r: " A",
  R_base: " Ω",
  R_emitter: " Ω",
  R_collector: " Ω",
  offset_drift: " V/K",
  bias_offset: " A",
  R_out: " Ω",
  out_low: " V",
  out_high: " V",
};

/** The circuit as a netlist; a figure of 0 in a model is left out. */
export function textOf({ seed, kelvin, models, elements }: RandomCircuit): string {
  const lines = [`title "Random circuit ${seed}"`, `knob temperature = ${kelvin} K`];
  for (const [name, { kind, ...figures }] of Object.entries(models)) {
    const given = Object.entries(figures).filter(([, value]) => value !== 0);
    lines.push(
      `model ${name} : ${kind} { ${given.map(([key, value]) => `${key} = ${value}${UNITS[key] ?? ""}`).join(", ")} }`,
    );
  }
  lines.push(...elements.map(lineOf));
  lines.push("show temperature");
  return `${lines.join("\n")}\n`;
}

function lineOf(one: RandomElement, i: number): string {
  switch (one.kind) {
    case "resistor":
      return `${one.left} -- R${i} : resistor ${one.ohms} Ω${one.drift ? ` { drift = ${one.drift} / 1 K }` : ""} -- ${one.right}`;
    case "voltage":
      return `${one.left} -- V${i} : voltage ${one.volts} V -- ${one.right}`;
    case "current":
      return `${one.left} -- I${i} : current ${one.amperes} A -- ${one.right}`;
    case "diode":
      return `${one.anode} -- D${i} : ${one.model} -- ${one.cathode}`;
    case "transistor":
      return `Q${i} : ${one.model} { c = ${one.c}, b = ${one.b}, e = ${one.e} }`;
    case "opamp":
      return `A${i} : ${one.model} { plus = ${one.plus}, minus = ${one.minus}, out = ${one.out} }`;
    case "gain":
      return `G${i} : gain { plus = ${one.plus}, minus = ${one.minus}, out = ${one.out}, ratio = ${one.ratio} }`;
    case "law":
      return `L${i} : law { plus = ${one.plus}, minus = ${one.minus}, ${expressionOf(one, `L${i}`)} }`;
  }
}
