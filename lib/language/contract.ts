import type { Agreement } from "./agreement";
import type { Design, Knob, NamedValue, Show, Sweep } from "./ast";
import { ContractCheck } from "./contract-check";
import { ContractTerms } from "./contract-terms";
import type { Flat } from "./expand";
import type { Names } from "./names";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import { Ranks } from "./rank";
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
  const reads = contract.reads(statements);
  const requirements = contract.requirements(statements);
  return { shows: [...traces.values()], reads, requirements };
}
