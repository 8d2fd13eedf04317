/** Bytes that are sent at once. */
const ENOUGH = 1_048_576;

/**
 * `pieces` one after another as the reader takes them, cut so that no one else waits long. `onEnd` is called once they are read or
 * given up, or where taking them fails.
 */
export function byteStream(pieces: AsyncIterable<Uint8Array>, onEnd: () => void): ReadableStream<Uint8Array> {
  const source = pieces[Symbol.asyncIterator]();
  let piece: Uint8Array = new Uint8Array();
  return new ReadableStream<Uint8Array>({
    async pull(controller) {
      await new Promise((resolve) => setImmediate(resolve));
      try {
        while (piece.byteLength === 0) {
          const { value, done } = await source.next();
          if (done) {
            controller.close();
            onEnd();
            return;
          }
          piece = value;
        }
      } catch (error) {
        controller.error(error);
        onEnd();
        return;
      }
      controller.enqueue(piece.subarray(0, ENOUGH));
      piece = piece.subarray(ENOUGH);
    },
    async cancel() {
      onEnd();
      await source.return?.();
    },
  });
}
