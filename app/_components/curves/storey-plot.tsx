"use client";

import { memo, useEffect, useLayoutEffect, useRef } from "react";
import type { Axis } from "./axes";
import { DirectLabels } from "./direct-labels";
import { StoreyCanvas, type StoreyDrawing } from "./storey-canvas";
import { StoreyNames } from "./storey-names";
import type { StoreyView } from "./storey-views";
import { type Colours, useColours } from "./theme-colours";
import { VerticalAxis } from "./vertical-axis";

interface Props {
  readonly storey: StoreyView;
  readonly horizontal: Axis;
  /** Places of the swept values. */
  readonly x: Float64Array;
  /** Width of the plotting area, px. */
  readonly width: number;
  readonly labelled: boolean;
  /** The setting that the reader follows; the lines of others step back. Null for none. */
  readonly followed: number | null;
  /** What stands there while no value does. */
  readonly empty: string;
}

/** How much is left of a line while another is followed. */
const FAINT = 0.25;
/** Px. */
const STROKE = { nominal: 1.75, worst: 1.25 };
const WORST_DASH = [1.5, 2.5] as const;
const UNSTABLE_DASH = [5, 4] as const;

/** One storey: its lines on a canvas, every word over it as text. The table beside the plot says the same in numbers. */
export const StoreyPlot = memo(function StoreyPlot(props: Props) {
  const { storey, horizontal, x, width, labelled, followed, empty } = props;
  const host = useRef<HTMLDivElement>(null);
  const canvas = useRef<StoreyCanvas | null>(null);
  const colours = useColours();
  const { axis, height } = storey;

  useLayoutEffect(() => {
    if (host.current === null || colours === null || width <= 0) return;
    canvas.current ??= new StoreyCanvas(host.current);
    canvas.current.show(drawingOf(storey, { horizontal, x, width, colours, followed }));
  }, [x, storey, horizontal, width, colours, followed]);
  useEffect(
    () => () => {
      canvas.current?.destroy();
      canvas.current = null;
    },
    [],
  );

  return (
    <div
      className="relative"
      style={{ height, width }}
      data-bands={storey.bands.length}
      data-worst={storey.worst.length}
      data-allowed={storey.allowed.length}
    >
      <div ref={host} aria-hidden="true" className="absolute inset-0" data-storey={storey.key} />
      <VerticalAxis axis={axis} height={height} />
      <StoreyNames storey={storey} horizontal={horizontal} width={width} />
      {axis.ticks.length === 0 && (
        <p
          className="absolute inset-0 flex items-center justify-center text-quiet text-sm"
          aria-hidden="true"
        >
          {empty}
        </p>
      )}
      {labelled && <DirectLabels storey={storey} horizontal={horizontal} x={x} followed={followed} />}
    </div>
  );
});

interface Frame {
  readonly horizontal: Axis;
  readonly x: Float64Array;
  readonly width: number;
  readonly colours: Colours;
  readonly followed: number | null;
}

function drawingOf(storey: StoreyView, { horizontal, x, width, colours, followed }: Frame): StoreyDrawing {
  const { axis, height, swept, worst, bands, branches, allowed } = storey;
  const { mapping } = axis;
  const alpha = (family: number) => (followed === null || followed === family ? 1 : FAINT);
  return {
    lines: [
      ...branches.map(({ x: own, values, isStable, style, family }) => ({
        ...{ x: own, values, mapping, absent: null, alpha: alpha(family), marked: false },
        stroke: isStable ? STROKE.nominal : STROKE.worst,
        style: { ...style, dash: isStable ? [] : UNSTABLE_DASH },
      })),
      ...worst.map(({ values, absent, style, family }) => ({
        ...{ x, values, mapping, absent, alpha: alpha(family), marked: false, stroke: STROKE.worst },
        style: { ...style, dash: WORST_DASH },
      })),
      ...swept.map(({ values, absent, style, family }) => ({
        ...{ x, values, mapping, absent, style, alpha: alpha(family), marked: true, stroke: STROKE.nominal },
      })),
    ],
    bands: bands.map(({ low, high, style }) => ({
      style,
      low: { x, values: low, mapping, absent: null },
      high: { x, values: high, mapping, absent: null },
    })),
    allowed,
    horizontal: horizontal.range,
    vertical: axis.range,
    horizontalTicks: horizontal.ticks,
    verticalTicks: axis.ticks,
    width,
    height,
    colours,
  };
}
