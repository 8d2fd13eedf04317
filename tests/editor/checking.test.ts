import { expect, test } from "vitest";
import {
  type CheckAnswer,
  Checking,
  type CheckQuestion,
  type CheckThread,
} from "@/app/_components/editor/checking";
import { examine } from "@/app/_components/editor/examine";

/** A thread that answers when the test says so. */
function slowThread() {
  const questions: CheckQuestion[] = [];
  const thread: CheckThread = { postMessage: (question) => questions.push(question), onmessage: null };
  const answer = (index: number) => {
    const { number, text } = questions[index]!;
    const data: CheckAnswer = { number, examination: examine(text) };
    thread.onmessage?.({ data });
  };
  return { questions, thread, answer };
}

test("while a check is on, only the newest text waits, and overtaken answers are dropped", () => {
  const { questions, thread, answer } = slowThread();
  const heard: string[] = [];
  const checking = new Checking(thread, (_, text) => heard.push(text));
  for (const text of ["let a = 1 V", "let a = 1 V\nlet b", "let a = 1 V\nlet b = 2 V"]) checking.ask(text);
  expect(questions.map(({ text }) => text)).toEqual(["let a = 1 V"]);
  answer(0);
  expect(heard).toEqual([]);
  expect(questions.map(({ text }) => text)).toEqual(["let a = 1 V", "let a = 1 V\nlet b = 2 V"]);
  answer(1);
  expect(heard).toEqual(["let a = 1 V\nlet b = 2 V"]);
});

test("an answer to an older question that comes late is not taken for the newer one's", () => {
  const { thread, answer } = slowThread();
  const heard: string[] = [];
  const checking = new Checking(thread, (_, text) => heard.push(text));
  checking.ask("one");
  checking.ask("two");
  answer(0);
  answer(0);
  expect(heard).toEqual([]);
  answer(1);
  expect(heard).toEqual(["two"]);
});

test("a text that is asked for again while it is checked is checked once", () => {
  const { questions, thread, answer } = slowThread();
  const heard: string[] = [];
  const checking = new Checking(thread, (_, text) => heard.push(text));
  checking.ask("one");
  checking.ask("two");
  checking.ask("one");
  answer(0);
  expect(heard).toEqual(["one"]);
  expect(questions).toHaveLength(1);
});

test("a text that was answered already is not asked about again", () => {
  const { questions, thread, answer } = slowThread();
  const checking = new Checking(thread, () => {});
  checking.ask("");
  answer(0);
  checking.ask("show a.v");
  answer(1);
  checking.ask("show a.v");
  expect(questions.map(({ text }) => text)).toEqual(["", "show a.v"]);
});
