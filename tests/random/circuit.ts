/** An element of a random circuit, figures in SI units. The same record is solved by the engine, as text, and by the script at 50 digits. */
export type RandomElement =
  | { readonly kind: "resistor"; readonly left: string; readonly right: string; readonly ohms: number }
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
    };

export type RandomModel =
  | ({ readonly kind: "diode"; readonly Rs: number } & Junction)
  | ({
      readonly kind: "npn" | "pnp";
      readonly beta_f: number;
      readonly beta_r: number;
      readonly Va_f: number;
    } & Junction)
  | { readonly kind: "opamp"; readonly gain: number; readonly offset: number; readonly bias: number };

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
      return `${one.left} -- R${i} : resistor ${one.ohms} Ω -- ${one.right}`;
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
  }
}
