import type { Flat } from "./expand";
import type { Names } from "./names";
import type { Report } from "./report";
import type { Expression } from "./syntax";
import { quote } from "./token";

/** A statement that names a value. */
export type ValueStatement = Extract<Flat, { kind: "let" | "knob" | "parameter" }>;

/** Orders by use (Kahn 1962); what uses itself, directly or round a ring, is reported and left out, as is what uses that. */
export function inOrder(
  owners: ReadonlyMap<string, ValueStatement>,
  names: Names,
  report: Report,
): ValueStatement[] {
  const waiting = new Map<string, number>();
  const usedBy = new Map<string, string[]>();
  const uses = new Map<string, Set<string>>();
  for (const [name, statement] of owners) {
    const used = new Set<string>();
    const amounts = [
      statement.kind === "parameter" ? statement.standard : null,
      statement.tolerance?.amount,
      statement.tolerance?.track?.within,
      statement.range?.low,
      statement.range?.high,
    ];
    for (const expression of [statement.value, ...amounts])
      if (expression) collectNames(expression, owners, names, used);
    uses.set(name, used);
    waiting.set(name, used.size);
    for (const one of used) usersOf(usedBy, one).push(name);
  }
  const ready = [...owners.keys()].filter((name) => waiting.get(name) === 0);
  const ordered: ValueStatement[] = [];
  for (let i = 0; i < ready.length; i++) {
    ordered.push(owners.get(ready[i]!)!);
    for (const user of usedBy.get(ready[i]!) ?? []) {
      const left = waiting.get(user)! - 1;
      waiting.set(user, left);
      if (left === 0) ready.push(user);
    }
  }
  if (ordered.length < owners.size) reportRings(owners, uses, new Set(ready), report);
  return ordered;
}

/** Strips what only hangs on a ring, then names each member that is left with the one it uses. */
function reportRings(
  owners: ReadonlyMap<string, ValueStatement>,
  uses: ReadonlyMap<string, ReadonlySet<string>>,
  done: ReadonlySet<string>,
  report: Report,
): void {
  const rest = new Set([...owners.keys()].filter((name) => !done.has(name)));
  const usersLeft = new Map<string, number>();
  for (const name of rest)
    for (const used of uses.get(name)!) usersLeft.set(used, (usersLeft.get(used) ?? 0) + 1);
  const loose = [...rest].filter((name) => !usersLeft.get(name));
  for (let i = 0; i < loose.length; i++) {
    rest.delete(loose[i]!);
    for (const used of uses.get(loose[i]!)!) {
      const left = usersLeft.get(used)! - 1;
      usersLeft.set(used, left);
      if (left === 0 && rest.has(used)) loose.push(used);
    }
  }
  for (const name of rest) {
    const through = [...uses.get(name)!].find((used) => rest.has(used))!;
    const way = through === name ? "" : ` through ${quote(through)}`;
    const message = `${quote(name)} is defined by itself${way}; give one of them a value of its own.`;
    report.error("NAM9", owners.get(name)!.name, message);
  }
}

function collectNames(
  expression: Expression,
  owners: ReadonlyMap<string, unknown>,
  names: Names,
  into: Set<string>,
): void {
  switch (expression.kind) {
    case "name": {
      const path = names.settle(expression.path);
      const head = path[0]!.text === "V_T" ? "temperature" : path[0]!.text;
      if (path.length === 1 && owners.has(head)) into.add(head);
      break;
    }
    case "unary":
      collectNames(expression.operand, owners, names, into);
      break;
    case "binary":
      collectNames(expression.left, owners, names, into);
      collectNames(expression.right, owners, names, into);
      break;
    case "call":
      for (const arg of expression.args) collectNames(arg, owners, names, into);
      break;
  }
}

function usersOf(usedBy: Map<string, string[]>, name: string): string[] {
  const users = usedBy.get(name) ?? [];
  usedBy.set(name, users);
  return users;
}
