import { AMPERE, type Dimension, divide, KELVIN, OHM, PER_KELVIN, PURE, VOLT } from "@/lib/units/dimension";
import type { ElementKind, ModelKind } from "./ast";

/** A parameter of a model: its unit, what leaving it out means, and one line for the reference and the hover. */
export interface ParameterKind {
  readonly dimension: Dimension;
  readonly unit: string;
  /** null: the parameter must be given. A string says in words what its absence means; the term is dropped exactly. */
  readonly absent: string | null;
  /** Bounds on the value in SI units; exclusive where `open` names them. */
  readonly low?: number;
  readonly high?: number;
  readonly open?: boolean;
  /** A parameter without which this one means nothing. */
  readonly needs?: string;
  readonly about: string;
}

export interface DeviceKind {
  readonly pins: readonly string[];
  /** What sets its behaviour: one value, a model, the expression of a law, or its own parameters. */
  readonly follows: "value" | "model" | "law" | "parameters";
  /** The unit of the value on a path, for kinds that take one. */
  readonly value: { readonly dimension: Dimension; readonly unit: string } | null;
  readonly parameters: Readonly<Record<string, ParameterKind>>;
  readonly about: string;
}

const ideality: ParameterKind = {
  dimension: PURE,
  unit: "1",
  absent: "1",
  low: 0,
  open: true,
  about: "ideality factor n of the junction",
};

const junctionTemperature: Readonly<Record<string, ParameterKind>> = {
  T0: {
    dimension: KELVIN,
    unit: "°C",
    absent: "25 °C",
    low: 0,
    open: true,
    about: "temperature at which the parameters hold",
  },
  Eg: {
    dimension: VOLT,
    unit: "V",
    absent: "Is does not change with temperature unless x is given",
    low: 0,
    about: "band gap in volts, for the rise of Is with temperature",
  },
  x: {
    dimension: PURE,
    unit: "1",
    absent: "no power of T/T0 in Is",
    about: "exponent of T/T0 in Is",
  },
};

const saturation: ParameterKind = {
  dimension: AMPERE,
  unit: "A",
  absent: null,
  low: 0,
  open: true,
  about: "saturation current Is at T0",
};

function resistance(about: string): ParameterKind {
  return { dimension: OHM, unit: "Ω", absent: `no ${about}`, low: 0, about };
}

function positiveCurrent(absent: string, about: string): ParameterKind {
  return { dimension: AMPERE, unit: "A", absent, low: 0, open: true, about };
}

const transistor: Readonly<Record<string, ParameterKind>> = {
  Is: saturation,
  beta_f: {
    dimension: PURE,
    unit: "1",
    absent: "no base current of the forward junction",
    low: 0,
    open: true,
    about: "forward current gain",
  },
  beta_r: {
    dimension: PURE,
    unit: "1",
    absent: "no base current of the reverse junction",
    low: 0,
    open: true,
    about: "reverse current gain",
  },
  Va_f: {
    dimension: VOLT,
    unit: "V",
    absent: "no Early effect",
    low: 0,
    open: true,
    about: "forward Early voltage",
  },
  Va_r: {
    dimension: VOLT,
    unit: "V",
    absent: "no reverse Early effect",
    low: 0,
    open: true,
    about: "reverse Early voltage",
  },
  n: ideality,
  beta_power: {
    dimension: PURE,
    unit: "1",
    absent: "gains do not change with temperature",
    about: "exponent of T/T0 in beta_f and beta_r",
  },
  I_leak_e: positiveCurrent(
    "no leakage of the emitter junction",
    "saturation current of the base's leakage to the emitter, at T0",
  ),
  n_leak_e: {
    ...ideality,
    needs: "I_leak_e",
    absent: "2",
    about: "ideality factor of the leakage to the emitter",
  },
  I_leak_c: positiveCurrent(
    "no leakage of the collector junction",
    "saturation current of the base's leakage to the collector, at T0",
  ),
  n_leak_c: {
    ...ideality,
    needs: "I_leak_c",
    absent: "2",
    about: "ideality factor of the leakage to the collector",
  },
  I_knee_f: positiveCurrent(
    "no forward high injection",
    "collector current at which forward high injection sets in",
  ),
  I_knee_r: positiveCurrent(
    "no reverse high injection",
    "emitter current at which reverse high injection sets in",
  ),
  R_base: resistance("resistance in the base"),
  R_emitter: resistance("resistance in the emitter"),
  R_collector: resistance("resistance in the collector"),
  ...junctionTemperature,
};

const transistorKind = {
  pins: ["c", "b", "e"],
  follows: "model",
  value: null,
  parameters: transistor,
} as const;

/** Every kind the language knows: its pins in the order of its path, its value, its parameters. */
export const KINDS: Readonly<Record<ElementKind, DeviceKind>> = {
  resistor: {
    pins: ["left", "right"],
    follows: "value",
    value: { dimension: OHM, unit: "Ω" },
    parameters: {
      drift: {
        dimension: PER_KELVIN,
        unit: "ppm/K",
        absent: "0 ppm/K",
        about: "change with temperature from 25 °C",
      },
    },
    about: "resistor; its current counts from left to right",
  },
  voltage: {
    pins: ["left", "right"],
    follows: "value",
    value: { dimension: VOLT, unit: "V" },
    parameters: {},
    about: "raises the potential from left to right by its value",
  },
  current: {
    pins: ["left", "right"],
    follows: "value",
    value: { dimension: AMPERE, unit: "A" },
    parameters: {},
    about: "drives its value from left to right",
  },
  diode: {
    pins: ["anode", "cathode"],
    follows: "model",
    value: null,
    parameters: {
      Is: saturation,
      n: ideality,
      Rs: resistance("series resistance"),
      V_breakdown: {
        dimension: VOLT,
        unit: "V",
        absent: "no breakdown",
        low: 0,
        open: true,
        about: "reverse voltage at which I_breakdown flows",
      },
      I_breakdown: {
        ...positiveCurrent("Is", "reverse current at V_breakdown"),
        needs: "V_breakdown",
      },
      n_breakdown: { ...ideality, about: "ideality factor of the breakdown", needs: "V_breakdown" },
      photocurrent: {
        dimension: AMPERE,
        unit: "A",
        absent: "dark",
        low: 0,
        about: "current that light drives from cathode to anode inside the diode",
      },
      ...junctionTemperature,
    },
    about: "junction diode (Shockley)",
  },
  npn: { ...transistorKind, about: "NPN transistor (Ebers–Moll, Gummel–Poon)" },
  pnp: { ...transistorKind, about: "PNP transistor (Ebers–Moll, Gummel–Poon)" },
  opamp: {
    pins: ["plus", "minus", "out"],
    follows: "model",
    value: null,
    parameters: {
      gain: {
        dimension: PURE,
        unit: "1",
        absent: "ideal: no difference at the inputs",
        low: 0,
        open: true,
        about: "open-loop gain",
      },
      offset: {
        dimension: VOLT,
        unit: "V",
        absent: "0 V",
        about: "input offset voltage at T0, added to plus",
      },
      offset_drift: {
        dimension: divide(VOLT, KELVIN),
        unit: "V/K",
        absent: "0 V/K",
        about: "change of the offset with temperature from T0",
      },
      T0: junctionTemperature.T0!,
      bias: { dimension: AMPERE, unit: "A", absent: "0 A", about: "mean current into the two inputs" },
      bias_offset: {
        dimension: AMPERE,
        unit: "A",
        absent: "0 A",
        about: "current into plus less current into minus",
      },
      R_out: resistance("output resistance"),
      out_low: {
        dimension: VOLT,
        needs: "gain",
        unit: "V",
        absent: "no lower limit",
        about: "lowest output voltage",
      },
      out_high: {
        dimension: VOLT,
        needs: "gain",
        unit: "V",
        absent: "no upper limit",
        about: "highest output voltage",
      },
    },
    about: "operational amplifier; without a gain it is ideal",
  },
  gain: {
    pins: ["plus", "minus", "out"],
    follows: "parameters",
    value: null,
    parameters: {
      ratio: {
        dimension: PURE,
        unit: "1",
        absent: null,
        about: "voltage of out over the voltage of plus above minus",
      },
    },
    about: "linear block: drives out to ratio times the difference of its inputs, which take no current",
  },
  law: {
    pins: ["plus", "minus"],
    follows: "law",
    value: null,
    parameters: {},
    about: "element whose voltage (volts) or current from plus to minus (amps) is an expression of signals",
  },
};

export const MODEL_KINDS: readonly ModelKind[] = ["diode", "npn", "pnp", "opamp"];
