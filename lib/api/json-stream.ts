/** Elements of a list that are written at once. */
const ELEMENTS = 4_096;
/** Characters gathered before they are sent. */
const ENOUGH = 65_536;

/**
 * `value` as the bytes of JSON, written piece by piece as the reader takes them, so that no one waits for a long document to be
 * written out and no string of its length is ever needed. `onEnd` is called once it has been read or given up.
 */
export function jsonStream(value: unknown, onEnd: () => void): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  const pieces = piecesOf(value);
  return new ReadableStream<Uint8Array>({
    async pull(controller) {
      // Whoever else is waiting for this process comes between two pieces.
      await new Promise((resolve) => setImmediate(resolve));
      let text = "";
      while (text.length < ENOUGH) {
        const { value: piece, done } = pieces.next();
        if (done) {
          if (text !== "") controller.enqueue(encoder.encode(text));
          controller.close();
          onEnd();
          return;
        }
        text += piece;
      }
      controller.enqueue(encoder.encode(text));
    },
    cancel() {
      pieces.return();
      onEnd();
    },
  });
}

/** What JSON.stringify gives for plain data, in pieces. */
export function* piecesOf(value: unknown): Generator<string, void> {
  if (typeof value !== "object" || value === null) yield JSON.stringify(value) ?? "null";
  else if (Array.isArray(value)) yield* listPieces(value);
  else {
    let before = "{";
    for (const [key, one] of Object.entries(value)) {
      if (one === undefined) continue;
      yield `${before}${JSON.stringify(key)}:`;
      yield* piecesOf(one);
      before = ",";
    }
    yield before === "{" ? "{}" : "}";
  }
}

function* listPieces(list: readonly unknown[]): Generator<string, void> {
  if (list.length <= ELEMENTS && list.some((one) => typeof one === "object" && one !== null)) {
    // A short list may hold long ones.
    let before = "[";
    for (const one of list) {
      yield before;
      yield* piecesOf(one);
      before = ",";
    }
    yield "]";
    return;
  }
  yield "[";
  for (let from = 0; from < list.length; from += ELEMENTS) {
    const part = JSON.stringify(list.slice(from, from + ELEMENTS)).slice(1, -1);
    yield from === 0 ? part : `,${part}`;
  }
  yield "]";
}
