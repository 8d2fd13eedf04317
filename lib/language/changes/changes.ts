import type { Design, Knob, NamedValue } from "../ast";
import { CHANGE_SORTS, type Change, type Deed } from "./change";
import { readingChanges, requirementChanges, traceChanges } from "./contract-changes";
import { elementChanges } from "./element-changes";
import { modelChanges } from "./model-changes";
import { findRenames, renamed } from "./renames";
import { sameMeaning } from "./same";
import { twoValues, type Writers } from "./two-values";
import { Writing } from "./written";

/**
 * What one design means that another did not, in words: values, models, wiring, plan and contract, in that order. Layout, comments and
 * spellings of one value (`0.1 MΩ`, `100 kΩ`) are no change. Empty where both mean the same.
 */
export function changesBetween(earlier: Design, after: Design): Change[] {
  const renames = findRenames(earlier, after);
  const before = renamed(earlier, renames);
  const writers: Writers = { before: new Writing(earlier), after: new Writing(after) };
  const found = [
    ...titleChange(before, after),
    ...valueChanges(before, after, writers),
    ...modelChanges(before.models, after.models, writers),
    ...elementChanges(before.elements, after.elements, writers),
    ...nameChanges("element", renames.elements),
    ...nameChanges("net", renames.nets),
    ...sweepChanges(before, after, writers),
    ...drawsChange(before, after),
    ...traceChanges(before.shows, after.shows, writers),
    ...readingChanges(before.reads, after.reads, writers),
    ...requirementChanges(before, after, writers),
  ];
  return gathered(found).sort((a, b) => CHANGE_SORTS.indexOf(a.sort) - CHANGE_SORTS.indexOf(b.sort));
}

function titleChange(before: Design, after: Design): Change[] {
  if (before.title === after.title) return [];
  const says =
    before.title === ""
      ? `It is called “${after.title}” now`
      : after.title === ""
        ? `It has no title any more; it was “${before.title}”`
        : `“${before.title}” is called “${after.title}” now`;
  return [{ sort: "title", deed: "renamed", subjects: ["title"], says, brief: `Title “${after.title}”` }];
}

function valueChanges(before: Design, after: Design, writers: Writers): Change[] {
  const old = new Map(valuesOf(before).map((one) => [one.name, one]));
  const now = new Map(valuesOf(after).map((one) => [one.name, one]));
  const changes: Change[] = [];
  const add = (deed: Deed, name: string, says: string, brief: string) =>
    changes.push({ sort: "value", deed, subjects: [name], says, brief });
  for (const [name, one] of now) {
    const was = old.get(name);
    const value = writers.after.value(one);
    const kind = isKnob(one) ? "knob" : "value";
    if (was === undefined) {
      // The temperature is a knob of every file, with or without a line of its own.
      add("added", name, `added, a ${kind} of ${value}`, "added");
      continue;
    }
    const parts = twoValues(was, one, writers);
    if (isKnob(was) !== isKnob(one)) {
      parts.says.unshift(isKnob(one) ? "is a knob now" : "is no knob any more");
      parts.brief.unshift(isKnob(one) ? "is a knob now" : "is no knob any more");
    } else if (isKnob(was) && isKnob(one) && !sameMeaning(was.range, one.range)) {
      const says = `its range ${rangeText(was, writers.before)} became ${rangeText(one, writers.after)}`;
      parts.says.push(says);
      parts.brief.push(`range ${rangeText(one, writers.after)}`);
    }
    if (parts.says.length > 0) add("changed", name, parts.says.join("; "), parts.brief.join(", "));
  }
  for (const [name, one] of old) {
    if (!now.has(name)) add("removed", name, `removed, it was ${writers.before.value(one)}`, "removed");
  }
  return changes;
}

function valuesOf({ knobs, lets }: Design): (NamedValue | Knob)[] {
  return [...knobs, ...lets];
}

function isKnob(one: NamedValue | Knob): one is Knob {
  return "range" in one;
}

function rangeText({ name, range }: Knob, writing: Writing): string {
  return range === null
    ? "without ends"
    : `${writing.ofKnob(name, range.low)} .. ${writing.ofKnob(name, range.high)}`;
}

function nameChanges(sort: "element" | "net", names: ReadonlyMap<string, string>): Change[] {
  return [...names].map(([old, now]) => ({
    sort,
    deed: "renamed",
    subjects: [old],
    says: `is called ${now} now`,
    brief: `is called ${now} now`,
  }));
}

function sweepChanges(before: Design, after: Design, writers: Writers): Change[] {
  const changes: Change[] = [];
  const add = (deed: Deed, name: string, says: string, brief: string) =>
    changes.push({ sort: "sweep", deed, subjects: [name], says, brief });
  const old = new Map(before.sweeps.map((one) => [one.knob, one]));
  for (const one of after.sweeps) {
    const was = old.get(one.knob);
    const text = writers.after.sweep(one);
    if (was === undefined) add("added", one.knob, `added, ${text}`, "added");
    else if (was.scale !== one.scale || !sameMeaning(was.values, one.values)) {
      const earlier = writers.before.sweep(was);
      add("changed", one.knob, `${earlier} became ${text}`, text);
    }
  }
  const left = new Set(after.sweeps.map(({ knob }) => knob));
  for (const one of before.sweeps) {
    if (!left.has(one.knob))
      add("removed", one.knob, `removed, it went ${writers.before.sweep(one)}`, "removed");
  }
  const [first, was] = [after.sweeps[0]?.knob, before.sweeps[0]?.knob];
  if (first !== undefined && was !== undefined && first !== was && left.has(was) && old.has(first)) {
    add("changed", first, `is the horizontal axis now, in place of ${was}`, "is the horizontal axis now");
  }
  return changes;
}

function drawsChange(before: Design, after: Design): Change[] {
  const changes: Change[] = [];
  const add = (says: string, brief: string) =>
    changes.push({ sort: "draws", deed: "changed", subjects: ["draws"], says, brief });
  const text = ({ draws }: Design) =>
    draws === null ? "No draws" : `${draws.count} draws with seed ${draws.seed}`;
  if (!sameMeaning(before.draws, after.draws)) {
    add(`${text(before)} became ${lower(text(after))}`, `${text(after)} instead of ${lower(text(before))}`);
  }
  const points = ({ seek }: Design) =>
    seek === null ? "one operating point" : `up to ${seek} operating points`;
  if (before.seek !== after.seek) {
    const says = `Seeks ${points(after)} at each setting instead of ${points(before)}`;
    add(says, `Seeks ${points(after)}`);
  }
  return changes;
}

function lower(text: string): string {
  return text.startsWith("No") ? `no${text.slice(2)}` : text;
}

/** One change for what is said of several parts that a block made under one name: `S.Q`, `R.Q`. */
function gathered(changes: readonly Change[]): Change[] {
  const found = new Map<string, Change>();
  for (const change of changes) {
    const [subject] = change.subjects;
    const dot = subject?.lastIndexOf(".") ?? -1;
    const own = dot === -1 ? subject : subject?.slice(dot);
    const key = JSON.stringify([change.sort, change.deed, own, change.says, change.brief]);
    const same = found.get(key);
    found.set(
      key,
      same === undefined ? change : { ...same, subjects: [...same.subjects, ...change.subjects] },
    );
  }
  return [...found.values()];
}
