import type { Answer, Kind, Question, Questions } from "./questions";

/** The side of the thread that is needed here; a `Worker` has it, and so has a stand-in of a test. */
export interface QuestionThread {
  postMessage(question: Question): void;
  onmessage: ((event: { readonly data: Answer }) => void) | null;
  terminate(): void;
}

/**
 * Asks about texts in a thread of the browser. The thread starts with the first question and ends when the last of those who
 * opened it have closed it.
 */
export class Language {
  private thread: QuestionThread | null = null;
  private users = 0;
  private number = 0;
  private readonly waiting = new Map<number, (gives: never) => void>();

  constructor(private readonly start: () => QuestionThread) {}

  /** Says that the thread will be needed; gives the way to close it again. */
  open(): () => void {
    this.users += 1;
    let isOpen = true;
    return () => {
      if (!isOpen) return;
      isOpen = false;
      this.users -= 1;
      if (this.users > 0) return;
      this.thread?.terminate();
      this.thread = null;
      this.waiting.clear();
    };
  }

  /** Never answered once the thread is closed. */
  ask<K extends Kind>(ask: K, text: string, more: Questions[K]["asks"]): Promise<Questions[K]["gives"]> {
    this.thread ??= this.begin();
    this.number += 1;
    const { number, thread } = this;
    return new Promise((resolve) => {
      this.waiting.set(number, resolve);
      thread.postMessage({ ask, number, text, ...more } as Question);
    });
  }

  private begin(): QuestionThread {
    const thread = this.start();
    thread.onmessage = ({ data }) => {
      const resolve = this.waiting.get(data.number);
      this.waiting.delete(data.number);
      resolve?.(data.gives as never);
    };
    return thread;
  }
}

/** The one of the page. */
export const language = new Language(
  () => new Worker(new URL("./language.worker.ts", import.meta.url), { type: "module" }) as QuestionThread,
);
