/** A value that a trace must have. It holds within relative · |value| + absolute; what is left out is 0. */
export interface Expected {
  readonly trace: string;
  /** Flat point of the sweep, the first sweep fastest. */
  readonly point?: number;
  /** A decimal of up to 40 digits, in coherent SI units. */
  readonly value: string | number;
  readonly relative?: number;
  readonly absolute?: number;
}

/** Traces by name, one value a point. */
export type Traces = ReadonlyMap<string, Float64Array>;

/** A record of a reference table, written as a netlist. A record may take several. */
export interface OutsideCase {
  /** The id of the record. */
  readonly id: string;
  readonly source: string;
  readonly text: string;
  /** What the test makes of the traces, where a record asks for something that no trace of one point can be. */
  readonly derive?: (traces: Traces) => Traces;
  readonly expected: readonly Expected[];
}

/** A record as tests/reference holds it. */
export interface Reference {
  readonly id: string;
  readonly source: string;
  readonly params: Readonly<Record<string, string>>;
  readonly solutions?: readonly {
    readonly values: Readonly<Record<string, string>>;
    readonly outputs?: Readonly<Record<string, string>>;
  }[];
  readonly rows?: readonly Readonly<Record<string, string>>[];
}

/** Where the reference is a closed form or a root of 50 digits: the double nearest to it, and a few roundings more. */
export const CLOSED_FORM = 1e-12;

/** A figure of a record that must be there. */
export function figure(of: Readonly<Record<string, string>> | undefined, name: string): string {
  const found = of?.[name];
  if (found === undefined) throw new Error(`The record has no ${name}.`);
  return found;
}

export function recordOf(table: readonly Reference[], id: string): Reference {
  const found = table.find((one) => one.id === id);
  if (found === undefined) throw new Error(`No record is called ${id}.`);
  return found;
}

export function lines(...all: readonly string[]): string {
  return `${all.join("\n")}\n`;
}

/** "1e-9 V, 1e-8 V": the values of a sweep. */
export function listed(values: readonly string[], unit: string): string {
  return values.map((value) => `${value} ${unit}`).join(", ");
}
