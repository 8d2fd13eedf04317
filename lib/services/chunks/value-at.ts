const BYTES = 8;

/** The value at position `i` of a chunk encoded by `encode`, without decoding the others. */
export function valueAt(data: Uint8Array, i: number): number {
  const count = data.length / BYTES;
  const view = new DataView(new ArrayBuffer(BYTES));
  for (let byte = 0; byte < BYTES; byte++) view.setUint8(byte, data[byte * count + i]!);
  return view.getFloat64(0, true);
}
