import type { RandomCircuit } from "./circuit";
import { fullCircuit } from "./full";
import { randomCircuit } from "./generate";

/** A set of random circuits: seeds from 1 on, the circuit of each, and the file of their answers at 50 digits. */
export interface RandomSet {
  readonly howMany: number;
  readonly circuitOf: (seed: number) => RandomCircuit;
  readonly answers: string;
}

export const SETS = {
  /** Resistors, sources, diodes, transistors and amplifiers with the first of their terms. */
  plain: { howMany: 1000, circuitOf: randomCircuit, answers: "random-circuits.txt" },
  /** Devices with most of their terms, gains and laws. */
  full: { howMany: 1000, circuitOf: fullCircuit, answers: "full-circuits.txt" },
} as const satisfies Readonly<Record<string, RandomSet>>;

export type SetName = keyof typeof SETS;
