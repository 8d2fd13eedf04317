/// <reference lib="webworker" />

import type { CheckAnswer, CheckQuestion } from "./checking";
import { examine } from "./examine";

// Checking a long text takes a while; here it holds up no key stroke.
self.onmessage = ({ data }: MessageEvent<CheckQuestion>) => {
  const answer: CheckAnswer = { number: data.number, examination: examine(data.text) };
  self.postMessage(answer);
};
