import {
  count,
  MOST_BLOCK_DEPTH,
  MOST_BRANCHES,
  MOST_CONTRACT,
  MOST_DEPTH,
  MOST_POINTS,
  MOST_SOUGHT_POINTS,
  MOST_SOUGHT_SWEEPS,
  MOST_SOUGHT_UNKNOWNS,
  MOST_VALUES,
  MOST_WORD,
  OWN,
  SHARED,
} from "@/lib/language/limits";
import { ReferenceTable } from "../_parts/reference-table";

/** What a netlist may ask for; the figures are those that the checker goes by. */
export function LimitTable() {
  const limits: readonly (readonly [id: string, what: string, most: string])[] = [
    ["limit.text", "characters of a text", `${count(SHARED.text)}; on the command line ${count(OWN.text)}`],
    ["limit.elements", "elements", `${count(SHARED.elements)}; on the command line ${count(OWN.elements)}`],
    ["limit.points", "points of all sweeps and draws together", count(MOST_POINTS)],
    ["limit.values", "points times traces and unknowns", count(MOST_VALUES)],
    ["limit.contract", "readings and requirements", count(MOST_CONTRACT)],
    ["limit.branches", "operating points sought at a setting", String(MOST_BRANCHES)],
    [
      "limit.sought",
      "with `seek`: points, sweeps of the first knob, unknowns",
      [MOST_SOUGHT_POINTS, MOST_SOUGHT_SWEEPS, MOST_SOUGHT_UNKNOWNS].map(count).join(", "),
    ],
    ["limit.depth", "brackets within brackets", String(MOST_DEPTH)],
    ["limit.blocks", "blocks within blocks", String(MOST_BLOCK_DEPTH)],
    ["limit.word", "characters of a name", String(MOST_WORD)],
  ];
  return (
    <ReferenceTable
      caption="Limits"
      heads={["What is counted", "At most"]}
      rows={limits.map(([id, what, most]) => ({ id, cells: [what.replaceAll("`", ""), most] }))}
    />
  );
}
