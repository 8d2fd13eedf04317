import { describe, expect, it, vi } from "vitest";
import { byteStream } from "@/lib/api/byte-stream";

async function* given(...pieces: (readonly number[] | Error)[]): AsyncGenerator<Uint8Array> {
  for (const piece of pieces) {
    if (piece instanceof Error) throw piece;
    yield Uint8Array.from(piece);
  }
}

describe("a stream of bytes", () => {
  it("gives the pieces one after another, long ones cut, and says once that it has ended", async () => {
    const ended = vi.fn();
    const long = new Array(2_500_000).fill(7);
    const bytes = await new Response(byteStream(given([1, 2], [], long, [3]), ended)).bytes();
    expect([bytes.length, bytes[1], bytes[2], bytes.at(-1)]).toEqual([2_500_003, 2, 7, 3]);
    expect(ended).toHaveBeenCalledOnce();
  });

  it("breaks where taking a piece fails, so that nobody takes the part for the whole", async () => {
    const ended = vi.fn();
    const stream = byteStream(given([1, 2], new Error("The database is away.")), ended);
    await expect(new Response(stream).arrayBuffer()).rejects.toThrow("The database is away.");
    expect(ended).toHaveBeenCalledOnce();
  });

  it("lets go of the source where the reader leaves", async () => {
    const ended = vi.fn();
    const source = given([1], [2], [3]);
    const reader = byteStream(source, ended).getReader();
    await reader.read();
    await reader.cancel();
    expect(ended).toHaveBeenCalledOnce();
    expect(await source.next()).toEqual({ value: undefined, done: true });
  });
});
