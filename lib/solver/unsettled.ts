import type { Bench } from "./newton";

/** Names kept with a failed point. */
const MOST_NAMED = 5;
const MOST_NETS = 3;

/**
 * The nets and elements that would not settle, the worst first, at most five and at least one: the nets that a singular matrix
 * leaves `free` (numbers of unknowns), then nets by how far they miss the acceptance test, then junctions by how far their
 * linearisation stands from their actual voltage, and those at the nets named.
 */
export function unsettled({ system, step }: Bench, free: readonly number[]): string[] {
  const { state, circuit, junctions } = system;
  const missed = [...circuit.nets]
    .filter(([name]) => name !== "ground")
    .map(([name, i]) => {
      const left = excess(state.residual[i]!, 1e-10 * state.scale[i]! + 1e-18);
      return { name, i, by: Math.max(left, excess(step[i]!, 1e-9 + 1e-9 * Math.abs(state.x[i]!))) };
    })
    .sort((a, b) => b.by - a.by);
  const named = missed
    .filter(({ i }) => free.includes(i))
    .concat(missed.filter(({ by }, k) => by > 1 || k === 0))
    .map(({ name }) => name);
  const nets = new Set([...new Set(named)].slice(0, MOST_NETS));
  const elements = junctions
    .map((part) => ({ part, by: comparable(part.apart(state)) }))
    .filter(({ part, by }) => by > 0 || Object.values(part.element.pins).some((net) => nets.has(net)))
    .sort((a, b) => b.by - a.by)
    .map(({ part }) => part.element.name);
  return [...nets, ...elements].slice(0, MOST_NAMED);
}

function excess(value: number, allowed: number): number {
  return comparable(Math.abs(value) / allowed);
}

function comparable(value: number): number {
  return Number.isNaN(value) ? Number.POSITIVE_INFINITY : value;
}
