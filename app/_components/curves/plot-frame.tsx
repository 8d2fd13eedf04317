"use client";

import { type PointerEvent, useEffect, useRef } from "react";
import type { Ruler } from "./axes";
import { ChosenMark } from "./chosen-mark";
import { type Cursor, CursorLayer } from "./cursor-layer";
import type { CurveSet } from "./curve-set";
import type { FailedSpan } from "./failed-spans";
import { FailedStrip } from "./failed-strip";
import { FEW_STYLES } from "./line-style";
import { STOREY_GAP } from "./nearest-line";
import type { Gutters } from "./plot-gutters";
import type { Range } from "./range";
import { RulerAxis } from "./ruler-axis";
import { StoreyPlot } from "./storey-plot";
import type { StoreyView } from "./storey-views";
import type { Zoom } from "./use-zoom";

interface Props {
  readonly set: CurveSet;
  readonly storeys: readonly StoreyView[];
  readonly horizontal: Ruler;
  readonly x: Float64Array;
  readonly width: number;
  readonly gutters: Gutters;
  readonly failed: readonly FailedSpan[];
  readonly cursor: Cursor | null;
  readonly chosen: Cursor | null;
  /** The setting that the reader follows in the table of lines or at a label; null for none. */
  readonly followed: number | null;
  readonly describedBy: string;
  /** What stands in a storey while no value does. */
  readonly empty: string;
  readonly zoom: Zoom;
  readonly onCursor: (cursor: Cursor | null) => void;
  readonly onFollow: (family: number | null) => void;
  readonly onChoose: (cursor: Cursor) => void;
  readonly onZoom: (range: Range) => void;
}

/** The storeys one under another on their shared ruler, under the cursor. */
export function PlotFrame(props: Props) {
  const { set, storeys, horizontal, x, width, gutters, failed, chosen, cursor } = props;
  const area = useRef<HTMLDivElement>(null);
  useWheel(area, horizontal, width, props.zoom);
  const isCrowded = (storeys[0]?.lines.length ?? 0) > FEW_STYLES;
  const followed = props.followed ?? (isCrowded ? (cursor?.family ?? null) : null);
  const follow = (event: PointerEvent<HTMLElement>) => {
    const label = event.target instanceof Element ? event.target.closest("[data-family]") : null;
    const family = label === null ? null : Number(label.getAttribute("data-family"));
    if (family !== props.followed) props.onFollow(family);
  };
  return (
    <div style={{ paddingLeft: gutters.left, paddingTop: 8 }} onPointerOver={follow}>
      <div ref={area} className="relative" style={{ width }}>
        <div className="grid" style={{ gap: STOREY_GAP }}>
          {storeys.map((storey) => (
            <StoreyPlot
              key={storey.key}
              storey={storey}
              horizontal={horizontal}
              x={x}
              width={width}
              labelled={gutters.labelled}
              followed={followed}
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
      <RulerAxis axis={horizontal} knob={set.axis.knob} width={width} onPan={props.zoom.pan} />
    </div>
  );
}

/** Turning sideways, or with Shift, moves the view along the ruler; with Ctrl it brings what is under the pointer closer. */
function useWheel(
  area: React.RefObject<HTMLElement | null>,
  { range }: Ruler,
  width: number,
  { pan, stretch }: Zoom,
): void {
  const now = useRef({ range, width });
  now.current = { range, width };
  useEffect(() => {
    const { current } = area;
    if (current === null) return;
    const turn = (event: WheelEvent) => {
      const along = event.shiftKey && event.deltaX === 0 ? event.deltaY : event.deltaX;
      const { range: seen, width: room } = now.current;
      if (event.ctrlKey) {
        const share = (event.clientX - current.getBoundingClientRect().left) / room;
        stretch(1.002 ** event.deltaY, seen.from + share * (seen.to - seen.from));
      } else if (along !== 0) pan(along / room);
      else return;
      event.preventDefault();
    };
    current.addEventListener("wheel", turn, { passive: false });
    return () => current.removeEventListener("wheel", turn);
  }, [area, pan, stretch]);
}
