/** The column of ground, which no row needs to hold. */
export const GROUND = -1;

/**
 * What the laws of plain parts are written with, for one row of their table: nets, unknowns and places are columns of the row's numbers.
 * A row becomes straight code of its own, or all rows a loop. Expressions are those of `code/expression`; `share` is the sources'.
 */
export interface RowWriter {
  /** A figure by its column. */
  figure(column: number): string;
  /** Keeps a figure. */
  give(column: number, expression: string): void;
  /** Asks for e^y of the row's exponent k, whose values of e^y − 1 and e^y are known later. */
  ask(k: number, expression: string): void;
  less(k: number): string;
  whole(k: number): string;
  /** A variable for a value. */
  let(expression: string): string;
  /** A value with the sign that a column holds, +1 or −1. */
  signed(column: number, expression: string): string;
  /** As `across` of a state. */
  across(a: number, b: number): string;
  /** The two parts of an unknown, as for a branch current. */
  unknown(column: number): string;
  /** The first part of it alone. */
  high(column: number): string;
  /** A current, given by a variable, leaves net `a` and enters net `b`; its magnitude adds to both scales. */
  flow(a: number, b: number, amperes: string): void;
  /** A current leaves a net; what adds to the scale is given by a variable. */
  leave(net: number, amperes: string, size: string): void;
  /** The mismatch of a branch law, and the magnitudes that it sums. */
  law(row: number, mismatch: string, size: string): void;
  /** Adds to a place of the Jacobian. */
  slope(place: number, operator: "+" | "-", expression: string): void;
}
