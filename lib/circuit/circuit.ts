import type { Design } from "@/lib/language/ast";

/** An unknown of the modified nodal system, named as the language reads it. */
export interface Unknown {
  /** `out.v` of a net, `V1.i` from left to right of a voltage element, `A1.out.i` into the output of an amplifier. */
  readonly name: string;
  readonly unit: "V" | "A";
}

/**
 * The unknowns of a design in order: the voltage of every net but ground, then the current of every element whose law does not
 * give it. Ground has the number `size`, one past the last unknown, where vectors of the solver keep a slot that is not solved.
 */
export interface Circuit {
  readonly unknowns: readonly Unknown[];
  readonly size: number;
  /** Number of each net, `ground` included. */
  readonly nets: ReadonlyMap<string, number>;
  /** Number of the current of each voltage element and amplifier. */
  readonly branches: ReadonlyMap<string, number>;
  /** Numbers of the two nets between which each branch current flows, the first branch first. */
  readonly branchNets: readonly (readonly [number, number])[];
}

export function numberUnknowns(design: Design): Circuit {
  const unknowns: Unknown[] = design.nets.map((net) => ({ name: `${net}.v`, unit: "V" }));
  const nets = new Map(design.nets.map((net, i) => [net, i]));
  const drivers = design.elements.filter(({ kind }) => kind === "voltage" || kind === "opamp");
  const size = unknowns.length + drivers.length;
  nets.set("ground", size);
  const branches = new Map<string, number>();
  const branchNets: [number, number][] = [];
  for (const { name, kind, pins } of drivers) {
    branches.set(name, unknowns.length);
    unknowns.push({ name: kind === "voltage" ? `${name}.i` : `${name}.out.i`, unit: "A" });
    const [from, to] = kind === "voltage" ? [pins.left!, pins.right!] : [pins.out!, "ground"];
    branchNets.push([nets.get(from)!, nets.get(to)!]);
  }
  return { unknowns, size, nets, branches, branchNets };
}
