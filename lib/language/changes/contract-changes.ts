import type { Design, Reading, Requirement, Show } from "../ast";
import type { Change, ChangeSort, Deed } from "./change";
import { Demand } from "./demand";
import { sameMeaning } from "./same";
import type { Writers } from "./two-values";
import { type Writing, writeShare } from "./written";

type Adder = (deed: Deed, name: string, says: string, brief: string) => void;

function listOf(sort: ChangeSort): { changes: Change[]; add: Adder } {
  const changes: Change[] = [];
  const add: Adder = (deed, name, says, brief) => {
    changes.push({ sort, deed, subjects: [name], says, brief });
  };
  return { changes, add };
}

/** Traces by their names. */
export function traceChanges(before: readonly Show[], after: readonly Show[], writers: Writers): Change[] {
  const { changes, add } = listOf("trace");
  const text = ({ name, value }: Show, writing: Writing) => {
    const written = writing.typed(value);
    return written === name ? "" : `, ${written}`;
  };
  const old = new Map(before.map((one) => [one.name, one]));
  for (const show of after) {
    const was = old.get(show.name);
    const subject = show.name;
    if (was === undefined) add("added", subject, `added${text(show, writers.after)}`, "added");
    else if (!sameMeaning(was.value, show.value)) {
      const now = writers.after.typed(show.value);
      add("changed", subject, `${writers.before.typed(was.value)} became ${now}`, `is ${now} now`);
    }
  }
  const left = new Set(after.map(({ name }) => name));
  for (const { name } of before) if (!left.has(name)) add("removed", name, "removed", "removed");
  return changes;
}

/** Readings by their names. */
export function readingChanges(
  before: readonly Reading[],
  after: readonly Reading[],
  writers: Writers,
): Change[] {
  const { changes, add } = listOf("reading");
  const text = ({ value, windows }: Reading, writing: Writing) =>
    writing.typed(value) + writing.windows(windows);
  const old = new Map(before.map((one) => [one.name, one]));
  for (const reading of after) {
    const was = old.get(reading.name);
    const now = text(reading, writers.after);
    const subject = reading.name;
    if (was === undefined) add("added", subject, `added, ${now}`, "added");
    else if (!sameMeaning(was.value, reading.value) || !sameMeaning(was.windows, reading.windows)) {
      add("changed", subject, `${text(was, writers.before)} became ${now}`, `is ${now} now`);
    }
  }
  const left = new Set(after.map(({ name }) => name));
  for (const one of before) {
    if (!left.has(one.name))
      add("removed", one.name, `removed, it was ${text(one, writers.before)}`, "removed");
  }
  return changes;
}

/** Requirements by their labels, then by what they are about; each says whether it is harder to hold now. */
export function requirementChanges(before: Design, after: Design, writers: Writers): Change[] {
  const { changes, add } = listOf("requirement");
  const { pairs, gone, come } = paired(before.requirements, after.requirements);
  const earlier = new Demand(before);
  const later = new Demand(after);
  for (const [was, now] of pairs) {
    const isSame =
      sameMeaning(was.value, now.value) &&
      sameMeaning(was.relation, now.relation) &&
      sameMeaning(was.windows, now.windows) &&
      was.share === now.share;
    const deed = later.against(now, earlier, was);
    // Its bound may be a let that changed elsewhere in the text.
    if (isSame && deed === "same" && was.label === now.label) continue;
    if (isSame && deed === "same") {
      add("renamed", was.label, `is called “${now.label}” now`, "has another name");
      continue;
    }
    const [old, next] = texts(was, now, writers);
    const tail = deed === "same" || deed === "other" ? "" : `, ${deed}`;
    const says = old === next ? `${next}, by values it names${tail}` : `${old} became ${next}${tail}`;
    add(deed === "same" || deed === "other" ? "changed" : deed, now.label, says, next);
  }
  for (const one of come) add("added", one.label, `added, ${whole(one, writers.after)}`, "added");
  for (const one of gone)
    add("removed", one.label, `removed, it was ${whole(one, writers.before)}`, "removed");
  return changes;
}

function paired(before: readonly Requirement[], after: readonly Requirement[]) {
  const pairs: [Requirement, Requirement][] = [];
  let gone = [...before];
  let come = [...after];
  const alike: ((a: Requirement, b: Requirement) => boolean)[] = [
    (a, b) => a.label === b.label,
    (a, b) => sameMeaning(a.value, b.value) && sameMeaning(a.windows, b.windows),
    (a, b) => sameMeaning(a.value, b.value),
  ];
  for (const isAlike of alike) {
    for (const one of gone) {
      const other = come.find((candidate) => isAlike(one, candidate));
      if (other === undefined) continue;
      pairs.push([one, other]);
      come = come.filter((candidate) => candidate !== other);
    }
    gone = gone.filter((one) => !pairs.some(([was]) => was === one));
  }
  const place = new Map(after.map((one, index) => [one, index]));
  pairs.sort(([, a], [, b]) => place.get(a)! - place.get(b)!);
  return { pairs, gone, come };
}

/** Both requirements as far as they differ. */
function texts(was: Requirement, now: Requirement, { before, after }: Writers): [string, string] {
  if (!sameMeaning(was.value, now.value)) return [whole(was, before), whole(now, after)];
  const parts: [string, string][] = [];
  const place = (a: string, b: string) => parts.push([a.trim() || "everywhere", b.trim() || "everywhere"]);
  const isSameRelation = sameMeaning(was.relation, now.relation);
  const [old, next] = [before.windows(was.windows), after.windows(now.windows)];
  const isOnly = isSameRelation && was.share === now.share;
  if (!isSameRelation || (isOnly && old === next))
    parts.push([before.relation(was.relation), after.relation(now.relation)]);
  if (old !== next) place(old, next);
  if (was.share !== now.share)
    parts.push([shareText(was) || "in every draw", shareText(now) || "in every draw"]);
  return [parts.map(([a]) => a).join(" "), parts.map(([, b]) => b).join(" ")];
}

function whole(requirement: Requirement, writing: Writing): string {
  const { value, relation, windows } = requirement;
  const share = shareText(requirement);
  const text = `${writing.typed(value)} ${writing.relation(relation)}${writing.windows(windows)}`;
  return share === "" ? text : `${text} ${share}`;
}

function shareText({ share }: Requirement): string {
  return share === null ? "" : `in ${writeShare(share)} of draws`;
}
