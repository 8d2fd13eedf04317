import { bandOf, type Drawn } from "./draw-bands";

/** A column to be counted; `job` comes back with the answer. */
export interface BandQuestion extends Drawn {
  readonly job: number;
  readonly values: Float64Array;
}

export interface BandAnswer {
  readonly job: number;
  readonly low: Float64Array;
  readonly high: Float64Array;
}

addEventListener("message", ({ data }: MessageEvent<BandQuestion>) => {
  const { low, high } = bandOf(data.values, data);
  const answer: BandAnswer = { job: data.job, low, high };
  postMessage(answer, { transfer: [low.buffer, high.buffer] });
});
