import type { ElementKind, Model, NamedValue } from "../ast";
import { KINDS } from "../kinds";
import type { Change, Deed } from "./change";
import { type Said, twoValues, type Writers } from "./two-values";

/** Models by their names, and their parameters. */
export function modelChanges(before: readonly Model[], after: readonly Model[], writers: Writers): Change[] {
  const changes: Change[] = [];
  const add = (deed: Deed, name: string, says: string, brief: string) =>
    changes.push({ sort: "model", deed, subjects: [name], says, brief });
  const old = new Map(before.map((one) => [one.name, one]));
  for (const model of after) {
    const was = old.get(model.name);
    if (was === undefined) {
      const params = [...model.params.values()].map((one) => `${one.name} ${writers.after.value(one)}`);
      const list = params.length === 0 ? "" : ` with ${params.join(", ")}`;
      add("added", model.name, `added, ${model.kind}${list}`, "added");
      continue;
    }
    const { says, brief } = paramChanges(was.params, model.params, model.kind, writers);
    if (was.kind !== model.kind) {
      says.unshift(`${was.kind} became ${model.kind}`);
      brief.unshift(`${model.kind} instead of ${was.kind}`);
    }
    if (says.length > 0) add("changed", model.name, says.join("; "), brief.join(", "));
  }
  const left = new Set(after.map(({ name }) => name));
  for (const { name, kind } of before) {
    if (!left.has(name)) add("removed", name, `removed, it was ${kind}`, "removed");
  }
  return changes;
}

type Params = ReadonlyMap<string, NamedValue>;

/** Parameters of a model or an element; what leaving one out means is said where the kind knows it. */
export function paramChanges(before: Params, after: Params, kind: ElementKind, writers: Writers): Said {
  const says: string[] = [];
  const brief: string[] = [];
  const without = (name: string) => {
    const absent = KINDS[kind].parameters[name]?.absent;
    return absent === null || absent === undefined ? "" : ` (${absent})`;
  };
  for (const [name, now] of after) {
    const was = before.get(name);
    if (was === undefined) {
      says.push(`${name} was left out${without(name)}, is ${writers.after.value(now)} now`);
      brief.push(`${name} ${writers.after.value(now)}`);
      continue;
    }
    const said = twoValues(was, now, writers);
    says.push(...said.says.map((one) => `${name} ${one}`));
    brief.push(...said.brief.map((one) => `${name} ${one}`));
  }
  for (const [name, was] of before) {
    if (after.has(name)) continue;
    says.push(`${name} was ${writers.before.value(was)}, is left out now${without(name)}`);
    brief.push(`without ${name}`);
  }
  return { says, brief };
}
