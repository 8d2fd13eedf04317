import type { StoreyView } from "./storey-views";

/** Room beside the plotting area, px, and whether lines are labelled at their ends. */
export interface Gutters {
  readonly left: number;
  readonly right: number;
  readonly labelled: boolean;
}

/** Room for the word "failed" before its strip, px. */
const FAILED = 52;

/** Advance of a figure at 12 px, px. */
const FIGURE = 7.3;

/** Below this width labels at the line ends would take too much of it; the table of lines under the plot names them. */
export const NARROW = 560;

/** Room for the widest figures on the left and, where the frame is wide enough, the widest line label on the right. */
export function guttersFor(frame: number, storeys: readonly StoreyView[]): Gutters {
  const widest = (texts: Iterable<string>) => Math.max(0, ...[...texts].map((text) => text.length)) * FIGURE;
  const figures = widest(storeys.flatMap(({ axis }) => [...axis.labels.texts.values()]));
  const left = Math.ceil(Math.max(FAILED, figures + 20));
  const labels = widest(storeys.flatMap(({ lines }) => lines.map(({ label }) => label)));
  const labelled = frame >= NARROW && labels > 0 && labels + 34 < 0.3 * frame;
  return { left, right: labelled ? Math.ceil(labels + 34) : 28, labelled };
}
