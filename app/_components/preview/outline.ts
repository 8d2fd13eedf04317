import type { Job } from "@/lib/analyses/compile";
import type { Design, Element, ElementKind, Knob } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import { unitOf } from "@/lib/units/quantity";
import type { KnobOutline, Outline } from "./messages";

/** Junctions that an element of a kind has. */
const JUNCTIONS: Partial<Record<ElementKind, number>> = { diode: 1, npn: 2, pnp: 2 };

/** What the page must know of a text besides its curves. */
export function outlineOf({ design, plan }: Job): Outline {
  const [first] = plan.axes;
  const swept = new Set(plan.axes.map(({ knob }) => knob));
  return {
    title: plan.title,
    axes: plan.axes,
    traces: plan.traces,
    knobs: knobsOf(design).map(
      ({ name, value, range }): KnobOutline => ({
        name,
        unit: unitOf(value.dimension),
        value: value.op === "constant" ? value.value : Number.NaN,
        range,
        sweep: first?.knob === name ? "first" : swept.has(name) ? "outer" : null,
      }),
    ),
    nets: design.nets,
    elements: design.elements.map((element) => ({
      name: element.name,
      model: element.model,
      figures: figuresOf(element),
    })),
    lets: design.lets.map(({ name, value }) => ({ name, unit: unitOf(value.dimension) })),
    unknowns: plan.unknowns.length,
    junctions: design.elements.reduce((sum, { kind }) => sum + (JUNCTIONS[kind] ?? 0), 0),
    seek: design.seek,
  };
}

/** The knobs in the order of the text; a temperature that it does not set comes last, as it would be written. */
export function knobsOf({ knobs }: Pick<Design, "knobs">): readonly Knob[] {
  return knobs.toSorted((a, b) => Number(a.to === 0) - Number(b.to === 0));
}

/** Voltage, current and power of an element with two pins, the currents into the pins of any other. */
export function figuresOf({ kind }: Pick<Element, "kind">): readonly string[] {
  const { pins } = KINDS[kind];
  return pins.length === 2 ? ["v", "i", "p"] : pins.map((pin) => `${pin}.i`);
}
