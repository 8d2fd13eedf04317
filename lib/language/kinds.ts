import { AMPERE, type Dimension, KELVIN, OHM, PER_KELVIN, PURE, VOLT } from "@/lib/units/dimension";
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
  readonly about: string;
}

export interface DeviceKind {
  readonly pins: readonly string[];
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
  ...junctionTemperature,
};

/** Every kind the language knows: its pins in the order of its path, its value, its parameters. */
export const KINDS: Readonly<Record<ElementKind, DeviceKind>> = {
  resistor: {
    pins: ["left", "right"],
    value: { dimension: OHM, unit: "Ω" },
    parameters: {
      drift: {
        dimension: PER_KELVIN,
        unit: "ppm/K",
        absent: "0 ppm/K",
        about: "change with temperature from 25 °C",
      },
    },
    about: "resistor; current flows from left to right",
  },
  voltage: {
    pins: ["left", "right"],
    value: { dimension: VOLT, unit: "V" },
    parameters: {},
    about: "raises the potential from left to right by its value",
  },
  current: {
    pins: ["left", "right"],
    value: { dimension: AMPERE, unit: "A" },
    parameters: {},
    about: "drives its value from left to right",
  },
  diode: {
    pins: ["anode", "cathode"],
    value: null,
    parameters: {
      Is: saturation,
      n: ideality,
      Rs: { dimension: OHM, unit: "Ω", absent: "no series resistance", low: 0, about: "series resistance" },
      ...junctionTemperature,
    },
    about: "junction diode (Shockley)",
  },
  npn: { pins: ["c", "b", "e"], value: null, parameters: transistor, about: "NPN transistor (Ebers–Moll)" },
  pnp: { pins: ["c", "b", "e"], value: null, parameters: transistor, about: "PNP transistor (Ebers–Moll)" },
  opamp: {
    pins: ["plus", "minus", "out"],
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
      offset: { dimension: VOLT, unit: "V", absent: "0 V", about: "input offset voltage, added to plus" },
      bias: { dimension: AMPERE, unit: "A", absent: "0 A", about: "current into each input" },
    },
    about: "operational amplifier; without a gain it is ideal",
  },
};

/** Parameters that the language has but this server does not speak yet. */
export const LATER_PARAMETERS: Readonly<Partial<Record<ElementKind, readonly string[]>>> = {
  npn: ["R_emitter"],
  pnp: ["R_emitter"],
  opamp: ["out_low", "out_high"],
};

export const MODEL_KINDS: readonly ModelKind[] = ["diode", "npn", "pnp", "opamp"];
