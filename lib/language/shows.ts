import type { Show } from "./ast";
import type { Flat } from "./expand";
import { formatExpression } from "./format";
import type { Report } from "./report";
import type { Word } from "./syntax";
import { quote } from "./token";
import type { Typing } from "./typing";

/** Checks the traces to keep; each has a name of its own, given or spelled by its expression. */
export function checkShows(
  statements: readonly Flat[],
  source: string,
  typing: Typing,
  report: Report,
): Show[] {
  const shows: Show[] = [];
  const taken = new Set<string>();
  for (const statement of statements) {
    if (statement.kind !== "show") continue;
    for (const { name, value, from, to } of statement.items) {
      const judged = typing.judge(value, { signals: true, wanted: null });
      const label = name?.text ?? formatExpression(source.slice(value.from, value.to));
      if (taken.has(label)) report.error("NAM1", name ?? value, twice(label, name));
      taken.add(label);
      if (judged !== null) shows.push({ name: label, value: judged.typed, from, to });
    }
  }
  return shows;
}

function twice(label: string, name: Word | null): string {
  const mend = name === null ? "give one of them a name" : "choose another name";
  return `The trace ${quote(label)} is shown twice; ${mend}.`;
}
