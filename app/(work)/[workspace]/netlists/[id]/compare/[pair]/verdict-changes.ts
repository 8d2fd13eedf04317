import type { RequirementDocument, Verdict } from "@/lib/analyses/result";

/** A requirement in two runs; null in the one that does not have it. */
export interface VerdictChange {
  readonly label: string;
  readonly before: RequirementDocument | null;
  readonly after: RequirementDocument | null;
  /** "worse" and "better" by verdict; "new" and "gone" where one run lacks it; else "same". */
  readonly turn: "worse" | "better" | "new" | "gone" | "same";
}

const RANK: Record<Verdict, number> = { holds: 2, "no data": 1, broken: 0 };
const ORDER: readonly VerdictChange["turn"][] = ["worse", "gone", "new", "better", "same"];

/** Requirements of two runs side by side, by their labels in order; what turned for the worse comes first. */
export function verdictChanges(
  before: readonly RequirementDocument[],
  after: readonly RequirementDocument[],
): VerdictChange[] {
  const left = [...before];
  const rows: VerdictChange[] = after.map((now) => {
    // Two requirements may have one label: each is paired once.
    const at = left.findIndex(({ label }) => label === now.label);
    const was = at === -1 ? null : left.splice(at, 1)[0]!;
    return { label: now.label, before: was, after: now, turn: was === null ? "new" : turnOf(was, now) };
  });
  for (const was of left) rows.push({ label: was.label, before: was, after: null, turn: "gone" });
  return rows
    .map((row, place) => ({ row, place }))
    .sort((a, b) => ORDER.indexOf(a.row.turn) - ORDER.indexOf(b.row.turn) || a.place - b.place)
    .map(({ row }) => row);
}

function turnOf(was: RequirementDocument, now: RequirementDocument): VerdictChange["turn"] {
  const step = RANK[now.verdict] - RANK[was.verdict];
  return step === 0 ? "same" : step < 0 ? "worse" : "better";
}

/** The rows in a sentence: "1 turned for the worse, 2 for the better; 3 are as before." */
export function turnsInWords(rows: readonly VerdictChange[]): string {
  const count = (turn: VerdictChange["turn"]) => rows.filter((row) => row.turn === turn).length;
  const parts = [
    [count("worse"), "turned for the worse"],
    [count("better"), "turned for the better"],
    [count("new"), "new"],
    [count("gone"), "gone"],
  ] as const;
  const said = parts.filter(([many]) => many > 0).map(([many, words]) => `${many} ${words}`);
  const same = count("same");
  if (said.length === 0) return same === 0 ? "Neither requires anything." : "Every verdict is as before.";
  return `${said.join(", ")}${same === 0 ? "" : `; ${same} as before`}.`;
}
