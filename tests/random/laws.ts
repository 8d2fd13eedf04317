/**
 * A law of a random circuit: what it holds, and its two figures. `size` is in the unit of the law, `width` in V. Laws of amperes rise with
 * their own voltage u; laws of volts follow nets that stand before them, `a` and `b`; a law of amperes may repeat the current of an element.
 */
export type RandomLaw = { readonly size: number; readonly width: number } & (
  | { readonly shape: OwnShape }
  | { readonly shape: OtherShape; readonly a: string; readonly b: string }
  | { readonly shape: "copy" | "heat"; readonly of: string }
);

type OwnShape = keyof typeof OWN;
type OtherShape = keyof typeof OTHER;

/** Of u, the law's own voltage over its width. */
const OWN = {
  "hyperbolic tangent": (u: string) => `tanh(${u})`,
  "arc tangent": (u: string) => `atan(${u})`,
  cube: (u: string) => `(${u})^3`,
  "square on one side": (u: string) => `if(${u} > 0, (${u})^2, 0)`,
  "square on both sides": (u: string) => `${u} * abs(${u})`,
  "root on both sides": (u: string) => `${u} / sqrt(1 + (${u})^2)`,
  "clipped line": (u: string) => `max(-1, min(1, ${u}))`,
  exponential: (u: string) => `(exp(min(${u}, 300)) - 1)`,
} as const;

/** Of a and b, the voltages of two nets over the law's width. */
const OTHER = {
  sum: (a: string, b: string) => `(0.5 * ${a} - 2 * ${b})`,
  product: (a: string, b: string) => `${a} * ${b}`,
  ratio: (a: string, b: string) => `${a} / (1 + abs(${b}))`,
  logarithm: (a: string, b: string) => `(ln(1 + (${a})^2) - log10(max(${b}, 1e-6)))`,
  root: (a: string, b: string) => `sqrt(1 + abs(${a} + ${b}))`,
  larger: (a: string, b: string) => `max(${a}, ${b})`,
  bell: (a: string, b: string) => `${b} * exp(-(${a})^2)`,
  "thermal logarithm": (a: string, b: string) => `V_T / 1 V * ln(1 + abs(${a} - ${b}))`,
} as const;

export const OWN_SHAPES = Object.keys(OWN) as readonly OwnShape[];
export const OTHER_SHAPES = Object.keys(OTHER) as readonly OtherShape[];

/** As the netlist has it; `name` is the element's own. */
export function expressionOf(law: RandomLaw, name: string): string {
  const { size, width } = law;
  if ("a" in law) {
    const [a, b] = [`${law.a}.v / ${width} V`, `${law.b}.v / ${width} V`];
    return `volts = ${size} V * ${OTHER[law.shape](`(${a})`, `(${b})`)}`;
  }
  if ("of" in law) {
    return law.shape === "copy"
      ? `amps = ${size} * ${law.of}.i`
      : `amps = ${size} * ${law.of}.p / ${width} V`;
  }
  return `amps = ${size} A * ${OWN[law.shape](`(${name}.v / ${width} V)`)}`;
}
