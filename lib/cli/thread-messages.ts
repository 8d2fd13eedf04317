import type { BranchesDocument } from "@/lib/analyses/branches-document";
import type { ShardResult } from "@/lib/analyses/result";
import type { Shelf } from "./sources";

/** Flat points [from, to) of a netlist's plan. */
export interface Piece {
  readonly from: number;
  readonly to: number;
}

export interface Netlist {
  readonly text: string;
  readonly shelf: Shelf;
}

/** A sweep of the first knob in which all operating points are looked for, counted over the settings of the outer knobs. */
export interface Row {
  readonly row: number;
}

/** What a thread is asked for. */
export type Task = Netlist & (Piece | Row);

export type Reply =
  /** Said once, when it listens: a loader of TypeScript swallows what comes before. */
  | { readonly kind: "ready" }
  /** Points of the piece that are done. */
  | { readonly kind: "progress"; readonly pointsDone: number }
  | { readonly kind: "solved"; readonly result: ShardResult }
  | { readonly kind: "sought"; readonly branches: BranchesDocument }
  | { readonly kind: "broken"; readonly reason: string };
