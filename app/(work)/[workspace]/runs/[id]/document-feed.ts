import type { ColumnsDocument } from "@/lib/analyses/columns-document";
import { fetchColumns } from "./fetch-run";

interface Listener {
  readonly onDocument: (document: ColumnsDocument) => void;
  readonly onProblem: (problem: string | null) => void;
}

/** Ms between two fetches at least, and how many times as long as a fetch took the next one waits: large documents come seldom. */
const REST = 120;
const PATIENCE = 3;

/** Keeps the run document current while results come in: one fetch at a time, none that nobody asked for, and never a queue of them. */
export class DocumentFeed {
  #busy = false;
  #wanted = false;
  #rest = REST;
  #timer: ReturnType<typeof setTimeout> | undefined;
  #closed = false;
  #started = false;
  #resting = false;
  #finishing = false;
  #after: (() => void) | null = null;

  /** `etag` is the version at hand already; null for none. */
  constructor(
    private readonly id: string,
    private etag: string | null,
    private readonly listener: Listener,
  ) {}

  /** Fetches now, or as soon as the present fetch and the rest after it are over. */
  want(): void {
    if (this.#closed) return;
    if (this.#busy) this.#wanted = true;
    else void this.#fetch();
  }

  /** Fetches what a finished run has, at once: nothing follows that it could be gathered with. Then calls `after`, once. */
  finish(after: () => void): void {
    this.#after = after;
    this.#finishing = true;
    if (this.#resting) {
      clearTimeout(this.#timer);
      this.#busy = false;
      this.#resting = false;
    }
    this.want();
  }

  close(): void {
    this.#closed = true;
    clearTimeout(this.#timer);
  }

  async #fetch(): Promise<void> {
    this.#busy = true;
    this.#wanted = false;
    const began = performance.now();
    try {
      const answer = await fetchColumns(this.id, this.etag);
      if (this.#closed) return;
      if (answer !== null) {
        this.etag = answer.etag;
        this.#started ||= answer.document.points.outcome.some((outcome) => outcome !== null);
        this.listener.onDocument(answer.document);
      }
      this.listener.onProblem(null);
      // Nothing may hold back the first points; what follows them can wait its turn.
      const unhurried = this.#started && !this.#finishing;
      this.#rest = unhurried ? Math.max(REST, PATIENCE * (performance.now() - began)) : 0;
    } catch (error) {
      if (this.#closed) return;
      this.listener.onProblem(error instanceof Error ? error.message : String(error));
      this.#wanted = true;
      this.#rest = 3000;
    }
    if (this.#finishing && !this.#wanted) {
      this.#after?.();
      this.#after = null;
    }
    this.#resting = true;
    this.#timer = setTimeout(() => {
      this.#resting = false;
      this.#busy = false;
      if (this.#wanted) this.want();
    }, this.#rest);
  }
}
