import type { System } from "@/lib/circuit/system";
import type { Element } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import type { Job } from "./compile";
import { placeOnAxes } from "./plan";
import type { AxisDocument } from "./result";
import { stops } from "./walk";

/** The part that turns most power into heat, and at which setting. */
export interface PowerPeak {
  readonly element: string;
  /** W. */
  readonly watts: number;
  readonly at: readonly { readonly knob: string; readonly unit: string; readonly value: number }[];
}

/** Places looked at along the first axis, along each other, and in all: what power depends on is smooth between them. */
const ALONG = 33;
const BESIDE = 5;
const MOST_POINTS = 1000;
/** Points × unknowns. */
const MOST_WORK = 200_000;

/** Parts whose power is heat in themselves. Sources deliver it, and laws, gains and amplifiers stand for supplied circuits. */
const HEATED: ReadonlySet<Element["kind"]> = new Set(["resistor", "diode", "npn", "pnp"]);

/**
 * The greatest power that a part takes in over the sweeps of the nominal design, looked at in places spread evenly over each axis, its
 * ends among them; null where no part takes in any, or nothing is solved there.
 */
export function powerPeak({ design, circuit, plan }: Job): PowerPeak | null {
  const elements = design.elements.filter(({ kind }) => HEATED.has(kind));
  if (elements.length === 0) return null;
  let axes: readonly AxisDocument[] = plan.axes.map((axis, k) => thinned(axis, k === 0 ? ALONG : BESIDE));
  const most = Math.max(1, Math.min(MOST_POINTS, Math.floor(MOST_WORK / circuit.size)));
  while (pointsOf(axes) > most) axes = halved(axes);
  const { seek: _seek, ...rest } = plan;
  const thin = { ...rest, axes, draws: 0, points: pointsOf(axes) };
  let peak: PowerPeak | null = null;
  for (const { point, outcome, system } of stops({ design, circuit, plan: thin }, 0, thin.points, false)) {
    if (outcome.kind !== "converged") continue;
    for (const element of elements) {
      const watts = powerInto(element, system);
      if (!(watts > (peak?.watts ?? 0))) continue;
      const places = placeOnAxes(thin, point);
      const at = axes.map(({ knob, unit, values }, k) => ({ knob, unit, value: values[places[k]!]! }));
      peak = { element: element.name, watts, at };
    }
  }
  return peak;
}

/** Σ v·i over the pins, W: all that goes in, to whichever potential the voltages are counted. */
function powerInto({ name, kind, pins }: Element, system: System): number {
  if (KINDS[kind].pins.length === 2) return system.signal({ of: "element", element: name, quantity: "p" });
  return KINDS[kind].pins.reduce((sum, pin) => {
    const volts = pins[pin] === "ground" ? 0 : system.signal({ of: "net", net: pins[pin]! });
    return sum + volts * system.signal({ of: "pin", element: name, pin });
  }, 0);
}

function pointsOf(axes: readonly AxisDocument[]): number {
  return axes.reduce((product, { values }) => product * values.length, 1);
}

function thinned(axis: AxisDocument, most: number): AxisDocument {
  const { values } = axis;
  if (values.length <= most) return axis;
  if (most === 1) return { ...axis, values: [values[0]!] };
  const last = values.length - 1;
  return {
    ...axis,
    values: Array.from({ length: most }, (_, i) => values[Math.round((i * last) / (most - 1))]!),
  };
}

/** The longest axis at half as many values. */
function halved(axes: readonly AxisDocument[]): AxisDocument[] {
  const longest = Math.max(...axes.map(({ values }) => values.length));
  const which = axes.findIndex(({ values }) => values.length === longest);
  return axes.map((axis, k) => (k === which ? thinned(axis, longest >> 1) : axis));
}
