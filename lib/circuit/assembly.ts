import { exponentials } from "@/lib/devices/exponential";
import { AssemblyCode, type WrittenAssembly } from "./assembly-code";
import type { Part } from "./part";
import { CurrentPart } from "./parts/current";
import { DiodePart } from "./parts/diode";
import { OpampPart } from "./parts/opamp";
import { ResistorPart } from "./parts/resistor";
import { TransistorPart } from "./parts/transistor";
import { VoltagePart } from "./parts/voltage";
import type { State } from "./state";

/** Assemblies before code is generated: a short sweep does not repay it. */
const FIRST_LISTED = 2000;

/**
 * Adds the parts of a system up, kind by kind: first those that can be written as straight code, then the others. Each kind has a
 * loop of its own, which the compiler makes fit for it. After a while the first become generated code, with the same bytes.
 */
export class Assembly {
  private readonly resistors: ResistorPart[] = [];
  private readonly voltages: VoltagePart[] = [];
  private readonly currents: CurrentPart[] = [];
  private readonly opamps: OpampPart[] = [];
  private readonly diodes: DiodePart[] = [];
  private readonly transistors: TransistorPart[] = [];
  private readonly others: readonly Part[];
  /** Of the diodes: v/η, and what `exponentials` makes of it. */
  private readonly exponents: readonly [Float64Array, Float64Array, Float64Array];
  private code: AssemblyCode | null;
  private written: WrittenAssembly | null = null;
  private count = 0;

  constructor(
    parts: readonly Part[],
    private readonly state: State,
    private readonly constantSlopes: Float64Array,
  ) {
    const kinds: readonly { is: new (...words: never[]) => Part; into: Part[] }[] = [
      { is: ResistorPart, into: this.resistors },
      { is: VoltagePart, into: this.voltages },
      { is: CurrentPart, into: this.currents },
      { is: OpampPart, into: this.opamps },
      { is: DiodePart, into: this.diodes },
      { is: TransistorPart, into: this.transistors },
    ];
    this.code = new AssemblyCode(state.x.length - 1);
    const taken = new Set<Part>();
    for (const { is, into } of kinds) {
      for (const part of parts) {
        if (part.constructor !== is || part.write?.(this.code) !== true) continue;
        into.push(part);
        taken.add(part);
      }
    }
    const array = () => new Float64Array(this.diodes.length);
    this.exponents = [array(), array(), array()];
    this.others = parts.filter((part) => !taken.has(part));
  }

  /** Residual, scale and Jacobian at the present unknowns and linearisation. */
  run(): void {
    const { state, others } = this;
    if (this.written?.warmth.isUsed() !== true) this.add();
    else {
      if (others.length > 0) state.jacobian.set(this.constantSlopes);
      this.written.run();
    }
    for (let k = 0; k < others.length; k++) others[k]!.addTo(state);
    if (++this.count === FIRST_LISTED) this.compile();
  }

  /** Generates the code, where it is not too long and may be generated. */
  private compile(): void {
    this.written = this.code!.compile(this.state, this.constantSlopes);
    this.code = null;
  }

  private add(): void {
    const { state, resistors, voltages, currents, opamps, diodes, transistors } = this;
    state.residual.fill(0);
    state.scale.fill(0);
    state.jacobian.set(this.constantSlopes);
    for (let k = 0; k < resistors.length; k++) resistors[k]!.addTo(state);
    for (let k = 0; k < voltages.length; k++) voltages[k]!.addTo(state);
    for (let k = 0; k < currents.length; k++) currents[k]!.addTo(state);
    for (let k = 0; k < opamps.length; k++) opamps[k]!.addTo(state);
    const [ys, less, whole] = this.exponents;
    for (let k = 0; k < diodes.length; k++) diodes[k]!.ask(ys, k);
    exponentials(ys, less, whole, diodes.length);
    for (let k = 0; k < diodes.length; k++) diodes[k]!.addGiven(state, less, whole, k);
    for (let k = 0; k < transistors.length; k++) transistors[k]!.addTo(state);
  }
}
