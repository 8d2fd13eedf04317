import { describe, expect, test } from "vitest";
import { Language, type QuestionThread } from "@/app/_components/editor/language-thread";
import type { Question } from "@/app/_components/editor/questions";

/** Threads that answer when they are told to. */
function threads() {
  const begun: { asked: Question[]; ended: boolean; thread: QuestionThread }[] = [];
  const start = (): QuestionThread => {
    const one = { asked: [] as Question[], ended: false, thread: null as never as QuestionThread };
    one.thread = {
      postMessage: (question) => one.asked.push(question),
      onmessage: null,
      onerror: null,
      terminate: () => {
        one.ended = true;
      },
    };
    begun.push(one);
    return one.thread;
  };
  return { begun, start };
}

describe("the thread of the language", () => {
  test("begins with the first question and answers each by its number, in whatever order", async () => {
    const { begun, start } = threads();
    const language = new Language(start, start);
    language.open();
    expect(begun).toHaveLength(0);
    const first = language.ask("format", "a", {});
    const second = language.ask("format", "b", {});
    const { asked, thread } = begun[0]!;
    expect(asked.map(({ ask, text }) => [ask, text])).toEqual([
      ["format", "a"],
      ["format", "b"],
    ]);
    thread.onmessage!({ data: { number: asked[1]!.number, gives: "B" } });
    thread.onmessage!({ data: { number: asked[0]!.number, gives: "A" } });
    expect(await second).toBe("B");
    expect(await first).toBe("A");
    expect(begun).toHaveLength(1);
  });

  test("ends when the last of those who opened it has closed it, and begins anew when it is asked again", () => {
    const { begun, start } = threads();
    const language = new Language(start, start);
    const [one, other] = [language.open(), language.open()];
    void language.ask("folds", "", {});
    one();
    one();
    expect(begun[0]!.ended).toBe(false);
    other();
    expect(begun[0]!.ended).toBe(true);
    language.open();
    void language.ask("folds", "", {});
    expect(begun).toHaveLength(2);
  });

  test("where no thread can be started, or one is lost, what waits is answered otherwise", async () => {
    const { begun, start } = threads();
    const refused = new Language(() => {
      throw new Error("No threads here.");
    }, start);
    const first = refused.ask("format", "a", {});
    begun[0]!.thread.onmessage!({ data: { number: 1, gives: "A" } });
    expect(await first).toBe("A");

    const lost = new Language(start, start);
    const second = lost.ask("format", "b", {});
    begun[1]!.thread.onerror!("gone");
    expect(begun[1]!.ended).toBe(true);
    expect(begun[2]!.asked).toEqual(begun[1]!.asked);
    begun[2]!.thread.onmessage!({ data: { number: 1, gives: "B" } });
    expect(await second).toBe("B");
  });
});
