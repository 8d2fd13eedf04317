import { expect, vi } from "vitest";
import type { EventData } from "@/db/schema/event";

interface Told {
  readonly id: number;
  readonly data: EventData;
}

/** Reads a stream of server-sent events as a browser does. */
export class EventReader {
  readonly events: Told[] = [];
  text = "";
  readonly #reader: ReadableStreamDefaultReader<Uint8Array>;
  /** Settles when the server ends the stream. */
  readonly ended: Promise<void>;

  constructor(readonly response: Response) {
    this.#reader = response.body!.getReader();
    this.ended = this.#read();
  }

  async #read(): Promise<void> {
    const decoder = new TextDecoder();
    for (;;) {
      const { done, value } = await this.#reader.read();
      if (done) return;
      this.text += decoder.decode(value, { stream: true });
      const blocks = this.text.split("\n\n").slice(0, -1);
      const read = blocks.map((block) => /^id: (\d+)\ndata: (.+)$/.exec(block)).filter((one) => one !== null);
      this.events.splice(
        0,
        Infinity,
        ...read.map((one) => ({ id: Number(one[1]), data: JSON.parse(one[2]!) })),
      );
    }
  }

  get ids(): number[] {
    return this.events.map(({ id }) => id);
  }

  async until(count: number): Promise<void> {
    await vi.waitFor(() => expect(this.events.length).toBeGreaterThanOrEqual(count), { timeout: 20_000 });
  }

  leave(): Promise<void> {
    return this.#reader.cancel();
  }
}
