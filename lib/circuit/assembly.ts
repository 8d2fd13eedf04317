import { exponentials } from "@/lib/units/exponential";
import type { LoopWriter } from "./code/loops";
import { type Compiled, EXPONENTIALS } from "./code/machine";
import type { StraightCode } from "./code/straight";
import type { Frame } from "./frame";
import type { Part } from "./part";
import { addCurrents, writeCurrent } from "./parts/current";
import { addDiodes, askDiode, askDiodes, settleDiodes, writeDiode } from "./parts/diode-table";
import { addGains, writeGain } from "./parts/gain";
import { addOpamps, writeOpamp } from "./parts/opamp";
import { addResistors, writeResistor } from "./parts/resistor";
import { addTerminals, writeTerminal } from "./parts/terminal";
import { askTransistor, writeTransistor } from "./parts/transistor-code";
import { addTransistors, askTransistors, riseTransistors, settleTransistors } from "./parts/transistor-table";
import { addVoltages, writeVoltage } from "./parts/voltage";
import type { RowWriter } from "./row-writer";
import { StraightWriter } from "./straight-writer";
import type { Table } from "./table";

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
    const writer = new StraightWriter(code, this.frame);
    const { kinds } = this;
    for (const { table, exponent, each, ask } of kinds) {
      for (let row = 0; ask !== null && row < table.count; row++) {
        writer.turnTo(table, row, exponent + each * row);
        ask(writer);
      }
    }
    code.call(EXPONENTIALS);
    for (const { table, exponent, each, write } of kinds) {
      for (let row = 0; row < table.count; row++) {
        writer.turnTo(table, row, exponent + each * row);
        write(writer, row);
        if (code.length > MOST_STRAIGHT) return false;
      }
    }
    writer.end();
    return true;
  }

  /** Writes the same as loops. `integers`: the bytes at which the numbers of each kind's table begin. */
  writeLoops(writer: LoopWriter, integers: readonly number[]): void {
    for (const [k, { table, exponent, each, ask }] of this.kinds.entries()) {
      if (ask !== null) writer.over(table, exponent, each, integers[k]!, ask);
    }
    writer.call(EXPONENTIALS);
    writer.clear();
    for (const [k, { table, exponent, each, write }] of this.kinds.entries()) {
      writer.over(table, exponent, each, integers[k]!, (row) => write(row, null));
    }
  }

  /** The kinds of plain parts in the order in which they are added. */
  get kinds(): readonly Kind[] {
    const { resistors, voltages, currents, opamps, gains, terminals, diodes, transistors } =
      this.frame.tables;
    const kind = (table: Table, write: Kind["write"]): Kind => ({
      table,
      exponent: 0,
      each: 0,
      ask: null,
      write,
    });
    const opamp = (row: RowWriter, k: number | null): void => {
      const owner = k === null ? null : opamps.owners[k]!;
      writeOpamp(row, owner?.hasBias ?? true, owner?.hasOhms ?? true);
    };
    return [
      kind(resistors, writeResistor),
      kind(voltages, writeVoltage),
      kind(currents, writeCurrent),
      kind(opamps, opamp),
      kind(gains, writeGain),
      kind(terminals, writeTerminal),
      { table: diodes, exponent: 0, each: 1, ask: askDiode, write: writeDiode },
      { table: transistors, exponent: diodes.count, each: 2, ask: askTransistor, write: writeTransistor },
    ];
  }
}

/** A kind of plain parts: its table, its exponents, and what is written for a row; row null for all rows in a loop. */
interface Kind {
  readonly table: Table;
  readonly exponent: number;
  readonly each: number;
  readonly ask: ((code: RowWriter) => void) | null;
  readonly write: (code: RowWriter, row: number | null) => void;
}
