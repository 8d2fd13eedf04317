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

/** What a thread is asked for. */
export type Task = Netlist & Piece;

export type Reply =
  /** Said once, when it listens: a loader of TypeScript swallows what comes before. */
  | { readonly kind: "ready" }
  /** Points of the piece that are done. */
  | { readonly kind: "progress"; readonly pointsDone: number }
  | { readonly kind: "solved"; readonly result: ShardResult }
  | { readonly kind: "broken"; readonly reason: string };
