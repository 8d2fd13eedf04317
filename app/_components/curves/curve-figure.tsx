"use client";

import { useDeferredValue, useId, useMemo, useRef, useState } from "react";
import { AxisSwitch } from "./axis-switch";
import type { Cursor } from "./cursor-layer";
import { type CurveSet, placeOfPoint, pointAt } from "./curve-set";
import { type CurveView, choiceOf, horizontalAxis, placesOf, storeyViews } from "./curve-view";
import { accountOf } from "./failed-spans";
import { coherentValue } from "./figures-in-words";
import { useWidth } from "./frame-width";
import { LineTable } from "./line-table";
import { PlotFrame } from "./plot-frame";
import { guttersFor, NARROW } from "./plot-gutters";
import type { Range } from "./range";
import { valueAt } from "./scale";
import { SpokenCursor } from "./spoken-cursor";
import { summarise } from "./summary-sentence";
import { ZoomFields } from "./zoom-fields";

interface Props {
  readonly set: CurveSet;
  /** Accessible name of the figure. */
  readonly name: string;
  readonly view: CurveView;
  readonly onView: (change: Partial<CurveView>) => void;
  /** Flat number of the chosen point. */
  readonly point: number | null;
  readonly onPoint: (point: number) => void;
  /** Why there are no values at all yet; null once there may be some. */
  readonly waiting: string | null;
}

/** A plot with all that belongs to it: axis switches, storeys on their ruler, the view as fields, a summary, the lines. */
export function CurveFigure({ set, name, view, onView, point, onPoint, waiting }: Props) {
  const id = useId();
  const frame = useRef<HTMLDivElement>(null);
  const frameWidth = useWidth(frame);
  const [cursor, setCursor] = useState<Cursor | null>(null);
  const spoken = useDeferredValue(cursor);
  const narrow = frameWidth < NARROW;

  const plot = useMemo(() => {
    const rough = horizontalAxis(set, view, frameWidth);
    const gutters = guttersFor(frameWidth, storeyViews(set, view, rough, narrow));
    const width = Math.max(0, frameWidth - gutters.left - gutters.right);
    const horizontal = horizontalAxis(set, view, width);
    const storeys = storeyViews(set, view, horizontal, narrow);
    return { gutters, width, horizontal, storeys, x: placesOf(set, horizontal.mapping) };
  }, [set, view, frameWidth, narrow]);
  const choice = useMemo(() => choiceOf(set, view), [set, view]);
  const account = useMemo(() => accountOf(set, choice.families), [set, choice]);
  const summary = useMemo(() => summarise(set, plot.storeys, account), [set, plot.storeys, account]);

  const zoom = ({ from, to }: Range) => {
    const value = (place: number) =>
      Number(coherentValue(set.axis, valueAt(plot.horizontal.mapping, place)).toPrecision(5));
    onView({ zoom: { from: value(from), to: value(to) } });
  };
  return (
    <figure aria-label={name} aria-describedby={`${id}-summary`} className="grid min-w-0 gap-4">
      <div className="flex flex-wrap items-center gap-x-5 gap-y-2" data-print="never">
        <AxisSwitch
          name={set.axis.knob}
          scale={plot.horizontal.mapping.scale}
          fit={plot.horizontal.fit}
          onChange={(x) => onView({ x })}
        />
        {plot.storeys.map(({ key, traces, axis }) => (
          <AxisSwitch
            key={key}
            name={traces.length === 1 ? traces[0]! : key}
            scale={axis.mapping.scale}
            fit={axis.fit}
            onChange={(scale) => onView({ y: { ...view.y, [key]: scale } })}
          />
        ))}
      </div>
      <div
        ref={frame}
        className="min-w-0 overflow-hidden"
        style={{ minHeight: plot.storeys.length === 0 ? 0 : narrow ? 340 : 430 }}
      >
        {frameWidth > 0 && plot.storeys.length > 0 && (
          <PlotFrame
            {...plot}
            set={set}
            failed={account.spans}
            cursor={cursor}
            chosen={point === null ? null : placeOfPoint(set, point)}
            describedBy={`${id}-keys`}
            empty={waiting ?? "No point is solved here"}
            onCursor={setCursor}
            onChoose={({ family, place }) => onPoint(pointAt(set, family, place))}
            onZoom={zoom}
          />
        )}
        {plot.storeys.length === 0 && (
          <p className="border-y py-6 text-quiet text-sm">
            {set.source.traces.length === 0
              ? "The netlist shows nothing, so no trace was kept. Add a line such as show out.v and run it again; the nets of a single point stand beside."
              : "No trace is chosen. Choose one in the table of lines below."}
          </p>
        )}
      </div>
      <ZoomFields set={set} zoom={view.zoom} onZoom={(next) => onView({ zoom: next })} />
      <figcaption id={`${id}-summary`} className="max-w-prose text-sm">
        {waiting ?? summary}
      </figcaption>
      <p id={`${id}-keys`} className="max-w-prose text-quiet text-xs" data-print="never">
        Point at the plot, or focus it and use the arrow keys: left and right along the sweep, up and down
        between settings, Shift for ten points. A click or Enter chooses a point; dragging shows a part of the
        sweep.
      </p>
      <SpokenCursor set={set} storeys={plot.storeys} cursor={spoken} />
      <LineTable
        set={set}
        storeys={plot.storeys}
        choice={choice}
        cursor={cursor}
        onTraces={(traces) => onView({ traces })}
        onFamilies={(families) => onView({ families })}
      />
    </figure>
  );
}
