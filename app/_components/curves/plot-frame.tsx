"use client";

import { ChosenMark } from "./chosen-mark";
import { type Cursor, CursorLayer } from "./cursor-layer";
import type { CurveSet } from "./curve-set";
import type { Axis, StoreyView } from "./curve-view";
import type { FailedSpan } from "./failed-spans";
import { FailedStrip } from "./failed-strip";
import { STOREY_GAP } from "./nearest-line";
import type { Gutters } from "./plot-gutters";
import type { Range } from "./range";
import { RulerAxis } from "./ruler-axis";
import { StoreyPlot } from "./storey-plot";

interface Props {
  readonly set: CurveSet;
  readonly storeys: readonly StoreyView[];
  readonly horizontal: Axis;
  readonly x: readonly number[];
  readonly width: number;
  readonly gutters: Gutters;
  readonly failed: readonly FailedSpan[];
  readonly cursor: Cursor | null;
  readonly chosen: Cursor | null;
  readonly describedBy: string;
  /** What stands in a storey while no value does. */
  readonly empty: string;
  readonly onCursor: (cursor: Cursor | null) => void;
  readonly onChoose: (cursor: Cursor) => void;
  readonly onZoom: (range: Range) => void;
}

/** The storeys one under another on their shared ruler, under the cursor. */
export function PlotFrame(props: Props) {
  const { set, storeys, horizontal, x, width, gutters, failed, chosen } = props;
  return (
    <div style={{ paddingLeft: gutters.left, paddingTop: 8 }}>
      <div className="relative" style={{ width }}>
        <div className="grid" style={{ gap: STOREY_GAP }}>
          {storeys.map((storey) => (
            <StoreyPlot
              key={storey.key}
              storey={storey}
              horizontal={horizontal}
              x={x}
              width={width}
              labelled={gutters.labelled}
              empty={props.empty}
            />
          ))}
        </div>
        <div style={{ paddingTop: failed.length > 0 ? 4 : STOREY_GAP / 2 }}>
          {failed.length > 0 && <FailedStrip spans={failed} x={x} horizontal={horizontal} width={width} />}
        </div>
        {chosen !== null && (
          <ChosenMark storeys={storeys} horizontal={horizontal} x={x} width={width} chosen={chosen} />
        )}
        <CursorLayer {...props} />
      </div>
      <RulerAxis axis={horizontal} knob={set.axis.knob} width={width} />
    </div>
  );
}
