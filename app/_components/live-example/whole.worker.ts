/// <reference lib="webworker" />

import { solveWhole, type WholeAnswer } from "./whole-plan";

const tell = (answer: WholeAnswer) => self.postMessage(answer);

self.onmessage = ({ data }: MessageEvent<string>) => tell(solveWhole(data, tell, () => performance.now()));
