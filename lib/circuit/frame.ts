import type { CurrentPart } from "./parts/current";
import type { DiodePart } from "./parts/diode";
import { DIODE_FIGURES, DIODE_NUMBERS } from "./parts/diode-table";
import type { GainPart } from "./parts/gain";
import type { OpampPart } from "./parts/opamp";
import type { ResistorPart } from "./parts/resistor";
import type { TerminalPart } from "./parts/terminal";
import type { TransistorPart } from "./parts/transistor";
import { TRANSISTOR_FIGURES, TRANSISTOR_NUMBERS } from "./parts/transistor-table";
import type { VoltagePart } from "./parts/voltage";
import { newState, type State } from "./state";
import { Table } from "./table";

/** Tables of the parts that loops and generated code add up, and of the junctions whose laws have further terms. */
export class Tables {
  readonly resistors = new Table<ResistorPart>(2, 1);
  readonly voltages = new Table<VoltagePart>(3, 1);
  readonly currents = new Table<CurrentPart>(2, 1);
  readonly opamps = new Table<OpampPart>(4, 5);
  readonly gains = new Table<GainPart>(4, 1);
  readonly terminals = new Table<TerminalPart>(3, 1);
  readonly diodes = new Table<DiodePart>(DIODE_NUMBERS, DIODE_FIGURES);
  readonly transistors = new Table<TransistorPart>(TRANSISTOR_NUMBERS, TRANSISTOR_FIGURES);
  readonly furtherDiodes = new Table<DiodePart>(DIODE_NUMBERS, DIODE_FIGURES);
  readonly furtherTransistors = new Table<TransistorPart>(TRANSISTOR_NUMBERS, TRANSISTOR_FIGURES);

  get all(): readonly Table[] {
    return Object.values(this);
  }
}

/** Where each array begins in the frame. */
export interface FrameStarts {
  readonly x: number;
  readonly low: number;
  readonly residual: number;
  readonly scale: number;
  readonly jacobian: number;
  readonly constantSlopes: number;
  readonly exponents: number;
  readonly less: number;
  readonly whole: number;
}

/**
 * All numbers of a system in one array, `all`, so that generated code has one to reach; what others work on are parts of it. The
 * exponents of all plain junctions stand together, one a diode, then two a transistor: v/η, e^y − 1 and e^y.
 */
export class Frame {
  readonly state: State;
  all: Float64Array;
  /** Of the Jacobian: the slopes that do not depend on the unknowns. */
  constantSlopes: Float64Array;
  exponents: Float64Array;
  less: Float64Array;
  whole: Float64Array;
  readonly starts: FrameStarts;
  private readonly lengths: readonly number[];

  /** `size` unknowns, `places` of the Jacobian. Lays out the tables, which must be complete. */
  constructor(
    readonly size: number,
    places: number,
    readonly tables: Tables,
  ) {
    const junctions = tables.diodes.count + 2 * tables.transistors.count;
    const vectors = [size + 1, size + 1, size + 1, size + 1, places];
    const others = [places, junctions, junctions, junctions];
    this.lengths = [...vectors, ...others, ...tables.all.map(({ length }) => length)];
    this.all = new Float64Array(this.lengths.reduce((sum, length) => sum + length, 0));
    const parts = this.parts();
    let next = 0;
    this.state = newState(size, places, () => parts[next++]!);
    const [x, low, residual, scale, jacobian, constantSlopes, exponents, less, whole] = parts;
    const start = (part: Float64Array | undefined) => part!.byteOffset / part!.BYTES_PER_ELEMENT;
    this.starts = {
      x: start(x),
      low: start(low),
      residual: start(residual),
      scale: start(scale),
      jacobian: start(jacobian),
      constantSlopes: start(constantSlopes),
      exponents: start(exponents),
      less: start(less),
      whole: start(whole),
    };
    this.constantSlopes = constantSlopes!;
    this.exponents = exponents!;
    this.less = less!;
    this.whole = whole!;
    this.layOutTables();
  }

  /** Goes on in another array, from its beginning, with the same numbers. */
  moveTo(all: Float64Array): void {
    const { state } = this;
    all.set(this.all);
    this.all = all.subarray(0, this.all.length);
    const [x, low, residual, scale, jacobian, constantSlopes, exponents, less, whole] = this.parts();
    Object.assign(state, { x, low, residual, scale, jacobian });
    Object.assign(this, { constantSlopes, exponents, less, whole });
    this.layOutTables();
  }

  private layOutTables(): void {
    const parts = this.parts().slice(-this.tables.all.length);
    let start = this.all.length - parts.reduce((sum, { length }) => sum + length, 0);
    for (const [k, table] of this.tables.all.entries()) {
      table.layOut(parts[k]!, start);
      start += table.length;
    }
  }

  private parts(): Float64Array[] {
    let next = 0;
    return this.lengths.map((length) => {
      next += length;
      return this.all.subarray(next - length, next);
    });
  }
}
