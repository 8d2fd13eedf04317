"use client";

import { memo, useLayoutEffect, useRef } from "react";
import type { Axis, StoreyView } from "./curve-view";
import { DirectLabels } from "./direct-labels";
import { placeOf } from "./scale";
import { drawStorey } from "./storey-canvas";
import { useColours } from "./theme-colours";
import { VerticalAxis } from "./vertical-axis";

interface Props {
  readonly storey: StoreyView;
  readonly horizontal: Axis;
  /** Places of the swept values. */
  readonly x: readonly number[];
  /** Width of the plotting area, px. */
  readonly width: number;
  readonly labelled: boolean;
  /** What stands there while no value does. */
  readonly empty: string;
}

/** One storey: its lines on a canvas, every word over it as text. The table beside the plot says the same in numbers. */
export const StoreyPlot = memo(function StoreyPlot({ storey, horizontal, x, width, labelled, empty }: Props) {
  const host = useRef<HTMLDivElement>(null);
  const colours = useColours();
  const { axis, height, lines } = storey;

  useLayoutEffect(() => {
    if (host.current === null || colours === null || width <= 0) return;
    return drawStorey(host.current, {
      x,
      lines: lines.map(({ values, style }) => ({
        style,
        ys: values.map((value) => (value === null ? null : placeOf(axis.mapping, value))),
      })),
      horizontal: horizontal.range,
      vertical: axis.range,
      horizontalTicks: horizontal.ticks,
      verticalTicks: axis.ticks,
      width,
      height,
      colours,
    });
  }, [x, lines, axis, horizontal, width, height, colours]);

  const only = storey.traces.length === 1 ? storey.traces[0] : null;
  return (
    <div className="relative" style={{ height, width }}>
      <div ref={host} aria-hidden="true" className="absolute inset-0" data-storey={storey.key} />
      <VerticalAxis axis={axis} height={height} />
      <p
        className="absolute top-1 left-2 z-10 max-w-full truncate bg-paper/80 pr-1 text-xs"
        aria-hidden="true"
      >
        {only ?? storey.traces.join(", ")}
        <span className="figures ml-2 text-quiet text-xs">
          {axis.labels.unit === "1" ? "" : axis.labels.unit}
        </span>
      </p>
      {axis.ticks.length === 0 && (
        <p
          className="absolute inset-0 flex items-center justify-center text-quiet text-sm"
          aria-hidden="true"
        >
          {empty}
        </p>
      )}
      {labelled && <DirectLabels storey={storey} horizontal={horizontal} x={x} />}
    </div>
  );
});
