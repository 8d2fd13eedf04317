import type { Proof } from "@/lib/circuit/part";
import type { System } from "@/lib/circuit/system";
import { UNIT } from "@/lib/devices/rounding";

/** By how much the residual as computed may differ from 0 and from the true one, row by row: A of a net, V of a branch law. */
export class Doubts {
  readonly values: Float64Array;
  /** Roundings in the sum of each row. */
  readonly roundings: Float64Array;

  constructor(
    private readonly system: System,
    private readonly parts: readonly Proof[],
  ) {
    const { size, nets } = system.circuit;
    this.values = new Float64Array(size + 1);
    this.roundings = new Float64Array(size + 1).fill(16);
    for (const { element } of system.parts) {
      for (const net of Object.values(element.pins)) this.roundings[nets.get(net)!]! += 2;
    }
  }

  /** |F|·`residualShare` + δF: what is left over, the roundings of the sums, and those within the laws. */
  gather(residualShare: 0 | 1): void {
    const { values, roundings, parts, system } = this;
    const { residual, scale } = system.state;
    for (let i = 0; i < values.length; i++) {
      values[i] = Math.abs(residual[i]!) * residualShare + roundings[i]! * UNIT * scale[i]!;
    }
    for (let k = 0; k < parts.length; k++) parts[k]!.addDoubt(system.state, values);
  }
}
