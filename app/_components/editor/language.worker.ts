/// <reference lib="webworker" />

import { Answering } from "./answering";
import type { Question } from "./questions";

const answering = new Answering();

// Reading a long text takes tens of milliseconds; here it holds up neither a key stroke nor the checking.
self.onmessage = ({ data }: MessageEvent<Question>) => self.postMessage(answering.answer(data));
