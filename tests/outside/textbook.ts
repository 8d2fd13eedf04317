import reference from "@/tests/reference/textbook-circuits.json";
import { figure, type Reference, recordOf } from "./case";

export const TEXTBOOK_TABLE = reference.cases as unknown as readonly Reference[];

/** The records whose id begins so, in the order of the table. */
export function recordsOf(prefix: string): readonly Reference[] {
  return TEXTBOOK_TABLE.filter(({ id }) => id.startsWith(prefix));
}

export function record(id: string): Reference {
  return recordOf(TEXTBOOK_TABLE, id);
}

/** A solved value or output of a record with one solution. */
export function solved({ solutions }: Reference, name: string): string {
  const { values, outputs } = solutions![0]!;
  return figure({ ...values, ...outputs }, name);
}

/** A transistor model from the parameters of a record. */
export function transistor(name: string, { params }: Reference, area = "1"): string {
  const { Is, beta_f, beta_r } = params;
  return `model ${name} : npn { Is = ${area} * ${Is} A, beta_f = ${beta_f}, beta_r = ${beta_r} }`;
}

/** A transistor of a purely exponential law: no base current, and an Is so small that its −1 is nothing beside any current. */
export const IDEAL = "model ideal : npn { Is = 1e-30 A }";

export function temperature({ params }: Reference): string {
  return `knob temperature = ${params.T} K`;
}
