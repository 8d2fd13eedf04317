/// <reference lib="webworker" />

import type { PreviewQuestion } from "./messages";
import { PreviewSolving } from "./solving";

// A message to oneself comes after those that wait already, and at once; a timer would wait for milliseconds.
const echo = new MessageChannel();
let back = () => {};
echo.port1.onmessage = () => back();

const solving = new PreviewSolving({
  post: (answer, moved) => self.postMessage(answer, moved),
  rest: () =>
    new Promise<void>((resolve) => {
      back = resolve;
      echo.port2.postMessage(null);
    }),
  now: () => performance.now(),
  fail: (fault) => reportError(fault),
});

self.onmessage = ({ data }: MessageEvent<PreviewQuestion>) => solving.ask(data);
