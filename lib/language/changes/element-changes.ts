import type { Element } from "../ast";
import type { Change, Deed } from "./change";
import { paramChanges } from "./model-changes";
import { sameMeaning } from "./same";
import { type Said, twoValues, type Writers } from "./two-values";
import type { Writing } from "./written";

/** Elements by their names: added, removed, rewired, with another value, model, parameter or law. */
export function elementChanges(
  before: readonly Element[],
  after: readonly Element[],
  writers: Writers,
): Change[] {
  const changes: Change[] = [];
  const add = (deed: Deed, name: string, says: string, brief: string) =>
    changes.push({ sort: "element", deed, subjects: [name], says, brief });
  const old = new Map(before.map((one) => [one.name, one]));
  for (const element of after) {
    const was = old.get(element.name);
    if (was === undefined) {
      add("added", element.name, `added, ${whole(element, writers.after)}`, "added");
      continue;
    }
    const { says, brief } = what(was, element, writers);
    if (says.length > 0) add("changed", element.name, says.join("; "), brief.join(", "));
  }
  const left = new Set(after.map(({ name }) => name));
  for (const element of before) {
    if (!left.has(element.name))
      add("removed", element.name, `removed, it was ${whole(element, writers.before)}`, "removed");
  }
  return changes;
}

function what(was: Element, now: Element, writers: Writers): Said {
  if (was.kind !== now.kind) {
    const says = `${behaviour(was, writers.before)} became ${behaviour(now, writers.after)}`;
    return { says: [says], brief: [`${now.kind} instead of ${was.kind}`] };
  }
  const says: string[] = [];
  const brief: string[] = [];
  if (was.model !== now.model) {
    says.push(`follows ${now.model} instead of ${was.model}`);
    brief.push(`follows ${now.model}`);
  }
  if (was.value !== null && now.value !== null) {
    const said = twoValues(was.value, now.value, writers);
    says.push(...said.says);
    brief.push(...said.brief);
  }
  if (!sameMeaning(was.law, now.law)) {
    says.push(`${lawText(was, writers.before)} became ${lawText(now, writers.after)}`);
    brief.push(lawText(now, writers.after));
  }
  const params = paramChanges(was.params, now.params, now.kind, writers);
  says.push(...params.says);
  brief.push(...params.brief);
  const pins = Object.entries(now.pins).filter(([pin, net]) => was.pins[pin] !== net);
  if (pins.length > 0) {
    const moved = pins.map(([pin, net]) => `${pin} was on ${was.pins[pin]}, is on ${net} now`);
    says.push(`rewired, ${moved.join(", ")}`);
    brief.push("rewired");
  }
  return { says, brief };
}

/** `resistor 10 kΩ from a to b`; `npn array with c = s, b = ground, e = out`. */
function whole(element: Element, writing: Writing): string {
  const nets = Object.entries(element.pins);
  const [left, right] = nets.map(([, net]) => net);
  const where =
    nets.length === 2
      ? `from ${left} to ${right}`
      : `with ${nets.map(([pin, net]) => `${pin} = ${net}`).join(", ")}`;
  return `${behaviour(element, writing)} ${where}`;
}

function behaviour(element: Element, writing: Writing): string {
  const { kind, model, value, law } = element;
  if (law !== null) return `law ${lawText(element, writing)}`;
  if (value !== null) return `${kind} ${writing.value(value)}`;
  return model === null ? kind : `${kind} ${model}`;
}

function lawText({ law }: Element, writing: Writing): string {
  return law === null ? "no law" : `${law.quantity} = ${writing.typed(law.value)}`;
}
