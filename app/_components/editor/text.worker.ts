/// <reference lib="webworker" />

import { Answering } from "./answering";
import type { CheckAnswer, CheckQuestion } from "./checking";
import { examine } from "./examine";
import type { Question } from "./questions";

const answering = new Answering();

/**
 * Checks texts and answers questions about them, which takes tens of milliseconds for a long one; here it holds up no key stroke. A
 * page runs one for each, so that neither waits for the other; it is one program, so that it is fetched once.
 */
self.onmessage = ({ data }: MessageEvent<CheckQuestion | Question>) => {
  if ("ask" in data) return self.postMessage(answering.answer(data));
  const answer: CheckAnswer = { number: data.number, examination: examine(data.text) };
  self.postMessage(answer);
};
