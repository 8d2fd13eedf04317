/** Bytes of WebAssembly (World Wide Web Consortium, WebAssembly Core Specification 2.0, 2022, sections 5.3 to 5.5) as far as they are used here. */
export const OPCODE = {
  if: 0x04,
  else: 0x05,
  loop: 0x03,
  end: 0x0b,
  branchIf: 0x0d,
  call: 0x10,
  drop: 0x1a,
  get: 0x20,
  set: 0x21,
  loadInteger: 0x28,
  load: 0x2b,
  store: 0x39,
  integer: 0x41,
  number: 0x44,
  less: 0x63,
  greater: 0x64,
  lessOrEqual: 0x65,
  greaterOrEqual: 0x66,
  equal: 0x61,
  integerEqual: 0x46,
  integerNotEqual: 0x47,
  integerLess: 0x49,
  integerLessSigned: 0x48,
  integerAdd: 0x6a,
  integerSubtract: 0x6b,
  and: 0x71,
  shiftLeft: 0x74,
  shiftRight: 0x75,
  abs: 0x99,
  negate: 0x9a,
  add: 0xa0,
  subtract: 0xa1,
  multiply: 0xa2,
  divide: 0xa3,
} as const;

/** A block that leaves nothing. */
export const EMPTY = 0x40;
/** From a number to the integer below, saturating. */
export const TRUNCATE = [0xfc, 0x02] as const;
/** Copies, and fills, a stretch of the memory: where to, from where or with which byte, how many bytes. */
export const COPY = [0xfc, 0x0a, 0, 0] as const;
export const FILL = [0xfc, 0x0b, 0] as const;

/** Kinds of values, and of blocks that leave one. */
export const NUMBER = 0x7c;
export const INTEGER = 0x7f;
export type Kind = typeof NUMBER | typeof INTEGER;
const BYTES_PER_PAGE = 65_536;

/**
 * A function of one number that gives an integer, or a number: what it does, without its end, and the kinds of the variables that it
 * needs. Variable 0 is the parameter.
 */
export interface FunctionBody {
  readonly name: string;
  readonly bytes: readonly number[];
  readonly variables: readonly Kind[];
  readonly givesNumber?: boolean;
}

export function unsigned(value: number): number[] {
  const bytes: number[] = [];
  let rest = value;
  do {
    bytes.push((rest & 0x7f) | (rest > 0x7f ? 0x80 : 0));
    rest >>>= 7;
  } while (rest !== 0);
  return bytes;
}

export function integer(value: number): number[] {
  const bytes: number[] = [OPCODE.integer];
  let rest = value;
  for (;;) {
    const byte = rest & 0x7f;
    rest >>= 7;
    const isLast = (rest === 0 && (byte & 0x40) === 0) || (rest === -1 && (byte & 0x40) !== 0);
    bytes.push(isLast ? byte : byte | 0x80);
    if (isLast) return bytes;
  }
}

export function number(value: number): number[] {
  return [OPCODE.number, ...new Uint8Array(Float64Array.of(value).buffer)];
}

/** Eight bytes on from the address on the stack. */
export function load(byte: number): number[] {
  return [OPCODE.load, 3, ...unsigned(byte)];
}

/** The integer, four bytes, on from the address on the stack. */
export function loadInteger(byte: number): number[] {
  return [OPCODE.loadInteger, 2, ...unsigned(byte)];
}

export function store(byte: number): number[] {
  return [OPCODE.store, 3, ...unsigned(byte)];
}

export function get(variable: number): number[] {
  return [OPCODE.get, ...unsigned(variable)];
}

export function set(variable: number): number[] {
  return [OPCODE.set, ...unsigned(variable)];
}

type Bytes = ArrayLike<number>;

/** A module of functions over one memory of at least so many bytes, which it imports as `memory.memory`. */
export function moduleOf(functions: readonly FunctionBody[], bytes: number): Uint8Array<ArrayBuffer> {
  const types = [
    [0x60, 1, NUMBER, 1, INTEGER],
    [0x60, 1, NUMBER, 1, NUMBER],
  ];
  const imports = [[...word("memory"), ...word("memory"), 2, 0, ...unsigned(pagesFor(bytes))]];
  const kinds = functions.map(({ givesNumber }) => [givesNumber === true ? 1 : 0]);
  const exports = functions.map(({ name }, k) => [...word(name), 0, ...unsigned(k)]);
  return joined([
    [0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0],
    section(1, types),
    section(2, imports),
    section(3, kinds),
    section(7, exports),
    section(10, functions.map(sized)),
  ]);
}

export function pagesFor(bytes: number): number {
  return Math.ceil(bytes / BYTES_PER_PAGE);
}

function sized({ bytes, variables }: FunctionBody): Bytes {
  const groups: [number, Kind][] = [];
  for (const kind of variables) {
    const last = groups.at(-1);
    if (last?.[1] === kind) last[0] += 1;
    else groups.push([1, kind]);
  }
  const locals = [
    ...unsigned(groups.length),
    ...groups.flatMap(([count, kind]) => [...unsigned(count), kind]),
  ];
  return joined([unsigned(locals.length + bytes.length + 1), locals, bytes, [OPCODE.end]]);
}

function section(id: number, entries: readonly Bytes[]): Bytes {
  const content = joined([unsigned(entries.length), ...entries]);
  return joined([[id], unsigned(content.length), content]);
}

function joined(parts: readonly Bytes[]): Uint8Array<ArrayBuffer> {
  const whole = new Uint8Array(parts.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}

function word(text: string): number[] {
  return [...unsigned(text.length), ...new TextEncoder().encode(text)];
}
