/** The names of the units that a netlist may use. */
export const UNIT_NAMES: Readonly<Record<string, string>> = {
  V: "volt",
  A: "ampere",
  Ω: "ohm",
  S: "siemens",
  W: "watt",
  K: "kelvin",
  s: "second",
  Hz: "hertz",
  C: "coulomb",
  F: "farad",
  H: "henry",
  J: "joule",
  "%": "per cent",
  ppm: "parts per million",
  "°C": "degree Celsius",
};
