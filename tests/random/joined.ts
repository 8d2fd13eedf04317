import type { RandomCircuit, RandomElement } from "./circuit";

/** Circuits that have nothing to do with each other, as one, at the temperature of the first. */
export function joined(circuits: readonly RandomCircuit[]): RandomCircuit {
  const models: Record<string, RandomCircuit["models"][string]> = {};
  const elements: RandomElement[] = [];
  const nets: string[] = [];
  for (const [k, circuit] of circuits.entries()) {
    const before = elements.length;
    const renamed = (name: string) => (name === "ground" ? name : `c${k}_${name}`);
    for (const [name, model] of Object.entries(circuit.models)) models[renamed(name)] = model;
    nets.push(...circuit.nets.map(renamed));
    for (const element of circuit.elements) {
      const entries = Object.entries(element).map(([key, value]) => {
        if (typeof value !== "string" || key === "kind" || key === "shape") return [key, value];
        // An element is named by its letter and its place.
        return [key, key === "of" ? `${value[0]}${before + Number(value.slice(1))}` : renamed(value)];
      });
      elements.push(Object.fromEntries(entries) as RandomElement);
    }
  }
  const { seed, kelvin } = circuits[0]!;
  return { seed, kelvin, nets, models, elements };
}
