/** Bytes that are sent at once. */
const ENOUGH = 1_048_576;

/** `pieces` one after another as the reader takes them, cut so that no one else waits long. `onEnd` is called once they are read or given up. */
export function byteStream(pieces: readonly Uint8Array[], onEnd: () => void): ReadableStream<Uint8Array> {
  let piece = 0;
  let at = 0;
  return new ReadableStream<Uint8Array>({
    async pull(controller) {
      await new Promise((resolve) => setImmediate(resolve));
      while (piece < pieces.length && at >= pieces[piece]!.byteLength) {
        piece++;
        at = 0;
      }
      if (piece === pieces.length) {
        controller.close();
        onEnd();
        return;
      }
      controller.enqueue(pieces[piece]!.subarray(at, at + ENOUGH));
      at += ENOUGH;
    },
    cancel: onEnd,
  });
}
