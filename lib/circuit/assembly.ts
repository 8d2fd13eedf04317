import { exponentials } from "@/lib/devices/exponential";
import { AssemblyCode } from "./assembly-code";
import { type Compiled, EXPONENTIALS } from "./code/machine";
import type { StraightCode } from "./code/straight";
import type { Frame } from "./frame";
import type { Part } from "./part";
import { addCurrents } from "./parts/current";
import { addDiodes, askDiodes, settleDiodes } from "./parts/diode-table";
import { addGains } from "./parts/gain";
import { addOpamps } from "./parts/opamp";
import { addResistors } from "./parts/resistor";
import { addTerminals } from "./parts/terminal";
import { addTransistors, askTransistors, riseTransistors, settleTransistors } from "./parts/transistor-table";
import { addVoltages } from "./parts/voltage";

/** Statements of generated code at most; beyond, loops over tables are as fast, and ready at once. */
const MOST_STRAIGHT = 8000;

/**
 * Adds the parts of a system up: first the plain ones by loops over the tables of their kinds, then the others, one by one. For
 * assemblies at rest the loops may be replaced by generated code with the same bytes.
 */
export class Assembly {
  private readonly others: readonly Part[];
  private written: Compiled | null = null;

  constructor(
    parts: readonly Part[],
    private readonly frame: Frame,
  ) {
    this.others = parts.filter((part) => part.isPlain !== true);
  }

  /** Whether there are parts that are not plain, which generated code cannot add. */
  get hasOthers(): boolean {
    return this.others.length > 0;
  }

  /** Residual, scale and Jacobian at the present unknowns and linearisation. */
  run(): void {
    this.addTables(false);
    this.addOthers();
  }

  /** Linearises every plain junction at its actual voltage, as all others are already, and then as `run`. */
  runAtRest(): void {
    const { state, tables, constantSlopes } = this.frame;
    if (this.written === null) {
      settleDiodes(tables.diodes, state);
      settleTransistors(tables.transistors, state);
      this.addTables(true);
    } else {
      if (this.hasOthers) state.jacobian.set(constantSlopes);
      this.written(state.share);
    }
    this.addOthers();
  }

  /** From now on plain parts at rest are added by code that `write` wrote. */
  use(written: Compiled): void {
    this.written = written;
  }

  private addOthers(): void {
    const { others, frame } = this;
    for (let k = 0; k < others.length; k++) others[k]!.addTo(frame.state);
  }

  /** The exponentials of plain junctions. */
  private work(): void {
    const { tables, exponents, less, whole } = this.frame;
    const { diodes, transistors } = tables;
    askDiodes(diodes, exponents);
    askTransistors(transistors, exponents, diodes.count);
    exponentials(exponents, less, whole, exponents.length);
    riseTransistors(transistors, whole, diodes.count);
  }

  private addTables(isSettled: boolean): void {
    const { state, tables, less, whole, constantSlopes } = this.frame;
    this.work();
    state.residual.fill(0);
    state.scale.fill(0);
    state.jacobian.set(constantSlopes);
    const { resistors, voltages, currents, opamps, gains, terminals, diodes, transistors } = tables;
    addResistors(resistors, 0, resistors.count, state);
    addVoltages(voltages, 0, voltages.count, state);
    addCurrents(currents, 0, currents.count, state);
    addOpamps(opamps, 0, opamps.count, state);
    addGains(gains, 0, gains.count, state);
    addTerminals(terminals, 0, terminals.count, state);
    addDiodes(diodes, 0, diodes.count, state, less, whole, isSettled);
    addTransistors(transistors, 0, transistors.count, state, less, whole, diodes.count, isSettled);
  }

  /** Writes what `runAtRest` does with plain parts as straight code; false where it is too long. */
  write(code: StraightCode): boolean {
    const { tables } = this.frame;
    const { resistors, voltages, currents, opamps, gains, terminals, diodes, transistors } = tables;
    const writer = new AssemblyCode(code, this.frame);
    for (const { owners } of [diodes, transistors]) for (const part of owners) part.writeAsk(writer);
    code.call(EXPONENTIALS);
    for (const { owners } of [resistors, voltages, currents, opamps, gains, terminals, diodes, transistors]) {
      for (const part of owners) {
        part.write(writer);
        if (code.length > MOST_STRAIGHT) return false;
      }
    }
    writer.end();
    return true;
  }
}
