import { encodeColumn, encodeMark, encodeRest } from "@/lib/analyses/columns-document";
import type { Actor } from "@/lib/permissions/actor";
import { askedFor, type Found, matterOf } from "./get-run-document";

/** Bytes of a binary form as they come to be known; reading goes on at its own pace, whether or not anybody takes them. */
class Pieces implements AsyncIterable<Uint8Array> {
  private readonly known: Uint8Array[] = [];
  private ended = false;
  private failure: unknown;
  private wake: () => void = () => undefined;

  add(...pieces: readonly Uint8Array[]): void {
    this.known.push(...pieces);
    this.wake();
  }

  end(): void {
    this.ended = true;
    this.wake();
  }

  fail(failure: unknown): void {
    this.failure = failure;
    this.end();
  }

  async *[Symbol.asyncIterator](): AsyncGenerator<Uint8Array> {
    for (;;) {
      const piece = this.known.shift();
      if (piece !== undefined) yield piece;
      else if (this.failure !== undefined) throw this.failure;
      else if (this.ended) return;
      else {
        await new Promise<void>((resolve) => {
          this.wake = resolve;
        });
      }
    }
  }
}

/**
 * Calls `then` once as many have ended as there are: each by the function it is given, which may be called more than once.
 */
function allEnded(count: number, then: () => void): (() => void)[] {
  const going = new Set(Array.from({ length: count }, (_, one) => one));
  return [...going].map((one) => () => {
    if (going.delete(one) && going.size === 0) then();
  });
}

/**
 * The run document in its binary form, of the same version and limits as `getRunDocument`: pieces of bytes, to be sent one after
 * another. They begin to come before everything is read; where reading fails in the middle, taking the next piece throws. A reader who
 * leaves keeps the room until the reading has ended, which it does with all its memory.
 */
export async function getRunColumns(
  actor: Actor,
  id: string,
): Promise<Found & { readonly pieces: AsyncIterable<Uint8Array> }> {
  const asked = await askedFor(actor, id, "columns");
  const [read, release] = allEnded(2, asked.release) as [() => void, () => void];
  const pieces = new Pieces();
  const sent: string[] = [];
  pieces.add(encodeMark());
  matterOf(asked, ["bound", "outcome"], (name, column) => {
    sent.push(name);
    pieces.add(encodeColumn(column));
  })
    .then((matter) => {
      pieces.add(...encodeRest(matter, sent));
      pieces.end();
    })
    .catch((failure) => pieces.fail(failure))
    .finally(read);
  const { etag, large } = asked;
  return { etag, large, release, pieces };
}
