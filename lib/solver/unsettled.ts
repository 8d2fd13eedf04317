import type { Bench } from "./newton";

/** Names kept with a failed point. */
const MOST_NAMED = 5;
const MOST_NETS = 3;

/**
 * The nets and elements that would not settle, the worst first, at most five: nets by how far they miss the acceptance test,
 * elements by how far a junction's linearisation stands from its actual voltage.
 */
export function unsettled({ system, step }: Bench): string[] {
  const { state, circuit, junctions } = system;
  const netNames = [...circuit.nets.keys()].filter((name) => name !== "ground");
  const nets = netNames
    .map((name) => {
      const i = circuit.nets.get(name)!;
      const left = misses(state.residual[i]!, 1e-10 * state.scale[i]! + 1e-18);
      return { name, by: Math.max(left, misses(step[i]!, 1e-9 + 1e-9 * Math.abs(state.x[i]!))) };
    })
    .sort((a, b) => b.by - a.by);
  const missing = nets.filter(({ by }) => by > 1);
  const worst = new Set(
    (missing.length > 0 ? missing : nets.slice(0, 1)).slice(0, MOST_NETS).map(({ name }) => name),
  );
  const elements = junctions
    .map((part) => ({ part, by: finite(part.apart(state)) }))
    .filter(({ part, by }) => by > 0 || Object.values(part.element.pins).some((net) => worst.has(net)))
    .sort((a, b) => b.by - a.by)
    .map(({ part }) => part.element.name);
  return [...worst, ...elements].slice(0, MOST_NAMED);
}

function misses(value: number, allowed: number): number {
  return finite(Math.abs(value) / allowed);
}

function finite(value: number): number {
  return Number.isNaN(value) ? Number.POSITIVE_INFINITY : value;
}
