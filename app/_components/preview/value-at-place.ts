import { formatKnob, isAmbient } from "@/app/_components/curves/figures-in-words";
import { formatQuantity } from "@/lib/units/quantity";
import type { Figures, Outline } from "./messages";

/** A figure by its full name: `out`, `R1.v`, `S.Q.c.i`, `I_in`. */
interface Figure {
  /** The net, element, knob or let that it is of. */
  readonly owner: string;
  /** What it is of its owner, such as `v` or `c.i`; empty for the value itself. */
  readonly part: string;
  readonly unit: string;
  readonly index: number;
}

/** Owners that one name may stand for, in blocks or through a model, that are told of at most. */
const MOST_OWNERS = 4;

const indexes = new WeakMap<Outline, ReadonlyMap<string, readonly Figure[]>>();

/**
 * What a name of the text is worth where the preview is read: "17.8 mV at I_sample 2 µA, 25 °C". A name inside a block has a value in
 * each instance, and a model one in each element that follows it. Null for what has no value, or is not solved.
 */
export function valueAtPlace(outline: Outline, figures: Figures, name: string): string | null {
  const index = indexOf(outline);
  const owners = ownersOf(outline, index, name);
  const told = owners.slice(0, MOST_OWNERS).flatMap((owner) => {
    const text = valuesIn(index.get(owner)!, figures);
    return text === null ? [] : [owner === name ? text : `${owner}: ${text}`];
  });
  if (told.length === 0) return null;
  const rest = owners.length > MOST_OWNERS ? ` and ${owners.length - MOST_OWNERS} more` : "";
  return `${told.join("; ")}${rest}${placeInWords(figures)}`;
}

function ownersOf(outline: Outline, index: ReadonlyMap<string, unknown>, name: string): string[] {
  if (index.has(name)) return [name];
  const followers = outline.elements.filter(({ model }) => model === name).map((one) => one.name);
  if (followers.length > 0) return followers;
  return [...index.keys()].filter((owner) => owner.endsWith(`.${name}`));
}

function valuesIn(all: readonly Figure[], { values }: Figures): string | null {
  const known = all.filter(({ index }) => Number.isFinite(values[index]));
  if (known.length === 0) return null;
  return known
    .map(({ part, unit, owner, index }) => {
      const value = values[index]!;
      if (isAmbient({ knob: owner, unit })) return formatKnob({ knob: owner, unit }, value);
      return `${part === "" ? "" : `${part} `}${formatQuantity(value, unit)}`;
    })
    .join(", ");
}

function placeInWords({ at }: Figures): string {
  const words = at.map((one) => {
    const value = formatKnob(one, one.value, 4);
    return isAmbient(one) ? value : `${one.knob} ${value}`;
  });
  return words.length === 0 ? "" : ` at ${words.join(", ")}`;
}

/** The figures by their owners, counted in the order in which they are sent. */
function indexOf(outline: Outline): ReadonlyMap<string, readonly Figure[]> {
  const known = indexes.get(outline);
  if (known !== undefined) return known;
  const index = new Map<string, Figure[]>();
  let count = 0;
  const add = (owner: string, part: string, unit: string) => {
    const figure = { owner, part, unit, index: count++ };
    const known = index.get(owner);
    if (known === undefined) index.set(owner, [figure]);
    else known.push(figure);
  };
  for (const net of outline.nets) add(net, "", "V");
  for (const { name, figures } of outline.elements) {
    for (const figure of figures) add(name, figure, figure === "v" ? "V" : figure === "p" ? "W" : "A");
  }
  for (const { name, unit } of [...outline.knobs, ...outline.lets]) add(name, "", unit);
  indexes.set(outline, index);
  return index;
}
