import type { Agreement } from "./agreement";
import type { Design, Knob, NamedValue, Reading, Requirement, Show, Sweep } from "./ast";
import { ContractCheck } from "./contract-check";
import { ContractTerms } from "./contract-terms";
import type { Flat } from "./expand";
import { count, MOST_CONTRACT, MOST_VALUES } from "./limits";
import type { Names } from "./names";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import { Ranks, within } from "./rank";
import type { Report } from "./report";
import type { Known, Typing } from "./typing";
import { WindowCheck } from "./window-check";

/** What the contract of a file is checked with: everything that the rest of the file means. */
export interface Understood {
  readonly source: string;
  readonly names: Names;
  readonly nominal: Nominal;
  readonly agreement: Agreement;
  readonly typing: Typing;
  readonly quantities: Quantities;
  readonly known: ReadonlyMap<string, Known>;
  readonly knobs: readonly Knob[];
  readonly lets: readonly NamedValue[];
  readonly sweeps: readonly Sweep[];
  readonly shows: readonly Show[];
  readonly draws: Design["draws"];
  readonly report: Report;
}

/**
 * Checks readings and requirements. `shows` are the traces to keep: what the text shows, and after it the signals that the contract
 * alone asks for.
 */
export function checkContract(
  statements: readonly Flat[],
  understood: Understood,
): Pick<Design, "shows" | "reads" | "requirements"> {
  const { names, nominal, agreement, typing, quantities, known, knobs, lets, sweeps, shows, draws, report } =
    understood;
  const asked = (kind: Flat["kind"]) => statements.filter((statement) => statement.kind === kind).length;
  const isPlanKnown = asked("sweep") === sweeps.length;
  const traces = new Map(shows.map((show) => [show.name, show]));
  const ranks = new Ranks(sweeps, lets);
  const plan = { sweeps, knobs, known, isPlanKnown };
  const windows = new WindowCheck(plan, names, quantities, agreement, report);
  const terms = new ContractTerms(traces, typing, agreement, names, ranks, windows, report);
  for (const statement of statements) {
    if (statement.kind !== "show") continue;
    // A trace that was not understood is known by its name, so that its uses stay quiet.
    for (const { name } of statement.items)
      if (name !== null && !traces.has(name.text)) terms.readings.set(name.text, null);
  }
  const random = draws === null && asked("draws") > 0 ? null : (draws?.count ?? 0);
  const bench = {
    source: understood.source,
    terms,
    windows,
    ranks,
    agreement,
    quantities,
    nominal,
    names,
    random,
    report,
  };
  const contract = new ContractCheck(bench);
  const beyond = statements.filter(({ kind }) => kind === "read" || kind === "require")[MOST_CONTRACT];
  if (beyond !== undefined) {
    const message = `A netlist can have ${count(MOST_CONTRACT)} readings and requirements at most; split it.`;
    report.error("CAP7", beyond, message);
    return { shows, reads: [], requirements: [] };
  }
  const reads = contract.reads(statements);
  const requirements = contract.requirements(statements);
  checkWork(reads, requirements, sweeps, draws, report);
  return { shows: [...traces.values()], reads, requirements };
}

/** What is worked out for every point, so that a run is judged within seconds. */
function checkWork(
  reads: readonly Reading[],
  requirements: readonly Requirement[],
  sweeps: readonly Sweep[],
  draws: Design["draws"],
  report: Report,
): void {
  const points = sweeps.reduce((product, { values }) => product * values.length, (draws?.count ?? 0) + 1);
  let nodes = 0;
  for (const { value, from, to } of [...reads, ...requirements]) {
    nodes += within(value).length;
    if (points * nodes <= MOST_VALUES) continue;
    const message = `To judge the contract up to here ${count(points * nodes)} values would be worked out (points times what stands in it), and ${count(MOST_VALUES)} is the most; sweep fewer points.`;
    report.error("CAP8", { from, to }, message);
    return;
  }
}
