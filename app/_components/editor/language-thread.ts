import type { Answer, Kind, Question, Questions } from "./questions";

/** The side of the thread that is needed here; a `Worker` has it, and so has a stand-in of a test. */
export interface QuestionThread {
  postMessage(question: Question): void;
  onmessage: ((event: { readonly data: Answer }) => void) | null;
  onerror: ((event: unknown) => void) | null;
  terminate(): void;
}

interface Waiting {
  readonly question: Question;
  readonly resolve: (gives: never) => void;
}

/**
 * Asks about texts in a thread of the browser. The thread starts with the first question and ends when the last of those who
 * opened it have closed it. Where the browser starts none, the page answers itself.
 */
export class Language {
  private thread: QuestionThread | null = null;
  private users = 0;
  private number = 0;
  private readonly waiting = new Map<number, Waiting>();

  /** `start` begins a thread and may throw; `local` answers without one. */
  constructor(
    private readonly start: () => QuestionThread,
    private readonly local: () => QuestionThread,
  ) {}

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
    const question = { ask, number: this.number, text, ...more } as Question;
    const { thread } = this;
    return new Promise((resolve) => {
      this.waiting.set(question.number, { question, resolve });
      thread.postMessage(question);
    });
  }

  private begin(): QuestionThread {
    try {
      const thread = this.hear(this.start());
      thread.onerror = () => {
        if (thread !== this.thread) return;
        thread.terminate();
        this.thread = this.hear(this.local());
        for (const { question } of this.waiting.values()) this.thread.postMessage(question);
      };
      return thread;
    } catch {
      return this.hear(this.local());
    }
  }

  private hear(thread: QuestionThread): QuestionThread {
    thread.onmessage = ({ data }) => {
      const asked = this.waiting.get(data.number);
      this.waiting.delete(data.number);
      asked?.resolve(data.gives as never);
    };
    return thread;
  }
}

/** Answers in the page itself, whose language is fetched then and only then. */
function answerHere(): QuestionThread {
  const answering = import("./answering").then(({ Answering }) => new Answering());
  const here: QuestionThread = {
    postMessage: (question) => {
      void answering.then((one) => here.onmessage?.({ data: one.answer(question) }));
    },
    onmessage: null,
    onerror: null,
    terminate: () => {},
  };
  return here;
}

/** The one of the page. */
export const language = new Language(
  () => new Worker(new URL("./text.worker.ts", import.meta.url), { type: "module" }) as QuestionThread,
  answerHere,
);
