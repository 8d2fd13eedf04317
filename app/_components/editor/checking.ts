import type { Examination } from "./examine";

/** What is asked of the checking thread: one text, with a number that the answer carries back. */
export interface CheckQuestion {
  readonly number: number;
  readonly text: string;
}

export interface CheckAnswer {
  readonly number: number;
  readonly examination: Examination;
}

/** The side of the checking thread that a caller needs; a `Worker` has it, and so has a stand-in of a test. */
export interface CheckThread {
  postMessage(question: CheckQuestion): void;
  onmessage: ((event: { readonly data: CheckAnswer }) => void) | null;
}

/**
 * Asks a thread to examine texts, one at a time: while it works, only the newest waiting text is kept, and an answer to a text
 * that has been overtaken is dropped. So a fast typist never sees a problem of a text that is gone.
 */
export class Checking {
  private number = 0;
  private working = false;
  private waiting: string | null = null;
  /** The text that was asked about last; null before the first. */
  private asked: string | null = null;

  /** `answer` gets each examination that is still wanted, with the text it is of. */
  constructor(
    private readonly thread: CheckThread,
    private readonly answer: (examination: Examination, text: string) => void,
  ) {
    thread.onmessage = ({ data }) => this.receive(data);
  }

  ask(text: string): void {
    if (this.working) this.waiting = text;
    else if (text !== this.asked) this.send(text);
  }

  private send(text: string): void {
    this.number += 1;
    this.working = true;
    this.asked = text;
    this.thread.postMessage({ number: this.number, text });
  }

  private receive({ number, examination }: CheckAnswer): void {
    if (number !== this.number) return;
    this.working = false;
    const next = this.waiting;
    this.waiting = null;
    if (next !== null && next !== this.asked) this.send(next);
    else this.answer(examination, this.asked!);
  }
}
