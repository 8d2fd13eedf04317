import {
  COPY,
  EMPTY,
  FILL,
  type FunctionBody,
  get,
  INTEGER,
  integer,
  type Kind,
  load,
  loadInteger,
  NUMBER,
  number,
  OPCODE,
  set,
  store,
} from "@/lib/circuit/code/module";
import type { Elimination, SparseShape } from "../elimination";
import { EliminationList, type EliminationStarts } from "./elimination-list";
import { MOST_GROWTH } from "./kernel";

/** Bytes of a record of a step with one row below and one entry right of its pivot. */
const SINGLE = 32;

/** An elimination as loops over its list of addresses: the operations of `ListedKernel` in their order, without a test of a place. */
export class LoopedElimination {
  readonly list: EliminationList;

  constructor(
    private readonly shape: SparseShape,
    private readonly plan: Elimination,
    private readonly starts: EliminationStarts,
  ) {
    this.list = new EliminationList(shape, plan, starts);
  }

  /** Factorises, solves and judges: 1, or 0. */
  whole(name: string): FunctionBody {
    const [steps, back, forward, judged] = this.list.ends;
    const bytes = [
      this.begin(),
      this.negate(),
      this.eliminate(steps),
      this.substitute(steps, back),
      this.judge(forward, judged),
    ];
    return { name, bytes: bytes.flat(), variables: VARIABLES };
  }

  /** Solves with the factors at hand. */
  again(name: string): FunctionBody {
    const [steps, back, forward] = this.list.ends;
    const bytes = [this.negate(), this.carry(back, forward), this.substitute(steps, back), integer(1)];
    return { name, bytes: bytes.flat(), variables: VARIABLES };
  }

  /** The matrix into the array of factors, the rest of which is 0. */
  private begin(): number[] {
    const { places } = this.plan;
    const { jacobian } = this.starts;
    const own = this.shape.rows.length;
    return [
      ...[...integer(this.list.factor(0)), ...integer(8 * jacobian), ...integer(8 * own), ...COPY],
      ...[...integer(this.list.factor(own)), ...integer(0), ...integer(8 * (places - own)), ...FILL],
      ...[...integer(this.list.grown(0)), ...integer(0), ...integer(8 * this.shape.size), ...FILL],
    ];
  }

  /** The right side with its sign turned into the rows worked on. */
  private negate(): number[] {
    const { residual } = this.starts;
    const body = [
      ...[...get(AT), ...get(AT), ...load(8 * residual), OPCODE.negate, ...store(this.list.right(0))],
      ...forth(AT, 8),
    ];
    return [...integer(0), ...set(AT), ...until(AT, 8 * this.shape.size, body)];
  }

  private eliminate(end: number): number[] {
    const single = [
      ...[...number(1), ...at(AT, 0), OPCODE.divide, ...set(INVERSE)],
      ...[...at(AT, 16), ...get(INVERSE), OPCODE.multiply, ...set(MULTIPLIER)],
      ...[...get(MULTIPLIER), ...at(AT, 12), OPCODE.multiply, ...set(PRODUCT)],
      ...put(AT, 28, [...at(AT, 28), ...get(PRODUCT), OPCODE.subtract]),
      ...put(AT, 4, get(INVERSE)),
      ...put(AT, 16, get(MULTIPLIER)),
      ...put(AT, 20, [...at(AT, 20), ...get(MULTIPLIER), ...at(AT, 8), OPCODE.multiply, OPCODE.subtract]),
      ...put(AT, 24, [...at(AT, 24), ...get(PRODUCT), OPCODE.abs, OPCODE.add]),
      ...forth(AT, SINGLE),
    ];
    const entry = [
      ...[...get(MULTIPLIER), ...at(RIGHTS, 0), OPCODE.multiply, ...set(PRODUCT)],
      ...put(AT, 0, [...at(AT, 0), ...get(PRODUCT), OPCODE.subtract]),
      ...[...get(GROWN), ...get(PRODUCT), OPCODE.abs, OPCODE.add, ...set(GROWN)],
      ...forth(AT, 4),
      ...forth(RIGHTS, 4),
    ];
    const below = [
      ...[...at(AT, 0), ...get(INVERSE), OPCODE.multiply, ...set(MULTIPLIER)],
      ...put(AT, 0, get(MULTIPLIER)),
      ...put(AT, 4, [...at(AT, 4), ...get(MULTIPLIER), ...get(KNOWN), OPCODE.multiply, OPCODE.subtract]),
      ...[...at(AT, 8), ...set(GROWN), ...get(AT), ...loadInteger(8), ...set(ROW)],
      ...forth(AT, 12),
      ...[...get(FIRST_RIGHT), ...set(RIGHTS), ...get(COUNT), ...set(LEFT)],
      ...times(LEFT, entry),
      ...[...get(ROW), ...get(GROWN), ...store(0)],
    ];
    const other = [
      ...[...number(1), ...at(AT, 0), OPCODE.divide, ...set(INVERSE)],
      ...put(AT, 4, get(INVERSE)),
      ...[...at(AT, 8), ...set(KNOWN)],
      ...[...get(AT), ...loadInteger(12), ...set(ROWS), ...get(AT), ...loadInteger(16), ...set(COUNT)],
      ...[...forth(AT, 20), ...get(AT), ...set(FIRST_RIGHT)],
      ...[...get(AT), ...get(COUNT), ...integer(2), OPCODE.shiftLeft, OPCODE.integerAdd, ...set(AT)],
      ...times(ROWS, below),
    ];
    const stretch = [
      ...[...get(AT), ...loadInteger(0), ...set(KIND), ...get(AT), ...loadInteger(4), ...set(STEPS)],
      ...forth(AT, 8),
      ...[...get(KIND), OPCODE.if, EMPTY, ...times(STEPS, single)],
      ...[OPCODE.else, ...times(STEPS, other), OPCODE.end],
    ];
    return [...integer(this.starts.lists), ...set(AT), ...until(AT, end, stretch)];
  }

  /** Leaves 0 in ALL where pivots and solution are finite. */
  private substitute(from: number, end: number): number[] {
    const term = [
      ...[...get(SUM), ...at(AT, 0), ...at(AT, 4), OPCODE.multiply, OPCODE.subtract, ...set(SUM)],
      ...forth(AT, 8),
    ];
    const step = [
      ...[...at(AT, 0), ...set(SUM), ...at(AT, 4), ...set(INVERSE), ...at(AT, 8), ...set(KNOWN)],
      ...[...get(AT), ...loadInteger(12), ...set(ROW), ...get(AT), ...loadInteger(16), ...set(COUNT)],
      ...forth(AT, 20),
      ...[...get(COUNT), ...integer(1), OPCODE.integerEqual, OPCODE.if, EMPTY, ...term],
      ...[OPCODE.else, ...times(COUNT, term), OPCODE.end],
      ...[...get(SUM), ...get(INVERSE), OPCODE.multiply, ...set(SUM)],
      ...[...get(ROW), ...get(SUM), ...store(0)],
      ...[...get(ALL), ...get(KNOWN), ...get(SUM), OPCODE.add, ...number(0), OPCODE.multiply],
      ...[OPCODE.add, ...set(ALL)],
    ];
    return [...integer(from), ...set(AT), ...number(0), ...set(ALL), ...until(AT, end, step)];
  }

  private carry(from: number, end: number): number[] {
    const row = [
      ...put(AT, 4, [...at(AT, 4), ...at(AT, 0), ...get(KNOWN), OPCODE.multiply, OPCODE.subtract]),
      ...forth(AT, 8),
    ];
    const step = [
      ...[...at(AT, 0), ...set(KNOWN), ...get(AT), ...loadInteger(4), ...set(COUNT)],
      ...[...forth(AT, 8), ...times(COUNT, row)],
    ];
    return [...integer(from), ...set(AT), ...until(AT, end, step)];
  }

  /** 1 where all is finite and no row has grown too much, else 0. */
  private judge(from: number, end: number): number[] {
    const row = [
      ...[...at(AT, 0), ...number(MOST_GROWTH), ...at(AT, 4), OPCODE.abs, OPCODE.multiply],
      ...[OPCODE.lessOrEqual, ...get(MET), OPCODE.and, ...set(MET), ...forth(AT, 8)],
    ];
    return [
      ...[...get(ALL), ...number(0), OPCODE.equal, ...set(MET)],
      ...[...integer(from), ...set(AT), ...until(AT, end, row), ...get(MET)],
    ];
  }
}

const [AT, ROWS, COUNT, FIRST_RIGHT, RIGHTS, LEFT, ROW, KIND, STEPS, MET] = [
  1, 2, 3, 4, 5, 6, 7, 8, 9, 10,
] as const;
const [INVERSE, MULTIPLIER, PRODUCT, GROWN, KNOWN, SUM, ALL] = [11, 12, 13, 14, 15, 16, 17] as const;
const VARIABLES: readonly Kind[] = Array.from({ length: 17 }, (_, k) => (k < 10 ? INTEGER : NUMBER));

/** The number whose address stands some bytes on in the list. */
function at(pointer: number, byte: number): number[] {
  return [...get(pointer), ...loadInteger(byte), ...load(0)];
}

/** Puts a number at such an address. */
function put(pointer: number, byte: number, value: readonly number[]): number[] {
  return [...get(pointer), ...loadInteger(byte), ...value, ...store(0)];
}

function forth(pointer: number, bytes: number): number[] {
  return [...get(pointer), ...integer(bytes), OPCODE.integerAdd, ...set(pointer)];
}

/** Goes on until a pointer that the body moves has come to an end. */
function until(pointer: number, end: number, body: readonly number[]): number[] {
  const test = [...get(pointer), ...integer(end), OPCODE.integerLess];
  return [
    ...test,
    OPCODE.if,
    EMPTY,
    OPCODE.loop,
    EMPTY,
    ...body,
    ...test,
    OPCODE.branchIf,
    0,
    OPCODE.end,
    OPCODE.end,
  ];
}

/** As often as a counter says, which is then 0. */
function times(counter: number, body: readonly number[]): number[] {
  const count = [...get(counter), ...integer(1), OPCODE.integerSubtract, ...set(counter)];
  const loop = [OPCODE.loop, EMPTY, ...body, ...count, ...get(counter), OPCODE.branchIf, 0, OPCODE.end];
  return [...get(counter), OPCODE.if, EMPTY, ...loop, OPCODE.end];
}
