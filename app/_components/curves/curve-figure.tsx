"use client";

import { useCallback, useDeferredValue, useId, useMemo, useRef, useState } from "react";
import type { AllowedBand } from "@/lib/analyses/allowed-bands";
import { horizontalAxis, placesOf } from "./axes";
import type { Cursor } from "./cursor-layer";
import { type CurveSet, placeOfPoint, pointAt } from "./curve-set";
import { type CurveView, choiceOf, drawnChoice } from "./curve-view";
import { accountOf } from "./failed-spans";
import { FigureControls } from "./figure-controls";
import { useWidth } from "./frame-width";
import { LineTable } from "./line-table";
import { PlotFrame } from "./plot-frame";
import { guttersFor, NARROW } from "./plot-gutters";
import type { Range } from "./range";
import { SpokenCursor } from "./spoken-cursor";
import { type Beside, storeyViews } from "./storey-views";
import { storeysOf } from "./storeys";
import { summarise } from "./summary-sentence";
import { useBands } from "./use-bands";
import { useCurveDeeds } from "./use-curve-deeds";
import { useZoom } from "./use-zoom";
import { valuesOf } from "./view-range";
import { shownWorst } from "./worst-draw";
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
  /** Flat number of the point under the cursor, each time it moves; null where it leaves the plot. */
  readonly onCursor?: (point: number | null) => void;
  /** Why there are no values at all yet; null once there may be some. */
  readonly waiting: string | null;
  /** What requirements allow, to be shaded. */
  readonly allowed?: readonly AllowedBand[];
  /** A lower plot with all that belongs to it folded away below, where curves are one thing among several. */
  readonly brief?: boolean;
}

const NO_BANDS: readonly AllowedBand[] = [];

/** A plot with all that belongs to it: switches, storeys on their ruler, the view as fields, a summary, the lines. */
export function CurveFigure(props: Props) {
  const {
    set,
    name,
    view,
    onView,
    point,
    onPoint,
    onCursor,
    waiting,
    allowed = NO_BANDS,
    brief = false,
  } = props;
  const id = useId();
  const frame = useRef<HTMLDivElement>(null);
  const frameWidth = useWidth(frame);
  const [cursor, setCursor] = useState<Cursor | null>(null);
  const [followed, setFollowed] = useState<number | null>(null);
  const spoken = useDeferredValue(cursor);
  const narrow = brief ? "brief" : frameWidth < NARROW;

  useCurveDeeds(set, view, onView);
  const choice = useMemo(() => choiceOf(set, view), [set, view]);
  const drawn = useMemo(() => drawnChoice(set, view), [set, view]);
  const lines = useMemo(() => storeysOf(set, drawn), [set, drawn]);
  const account = useMemo(() => accountOf(set, drawn.families), [set, drawn]);
  const summary = useMemo(() => summarise(set, lines, account), [set, lines, account]);
  const bands = useBands(set, drawn.traces, view.band !== false);
  const worst = shownWorst(set, view)?.draw ?? null;
  const beside: Beside = useMemo(() => ({ allowed, bands, worst }), [allowed, bands, worst]);

  const rulerFor = useCallback(
    (zoom: Range | null) => horizontalAxis(set, { ...view, zoom }, frameWidth),
    [set, view, frameWidth],
  );
  const { zoom, act } = useZoom(
    set,
    view.zoom,
    rulerFor,
    useCallback((next) => onView({ zoom: next }), [onView]),
  );
  const { scale, sign } = rulerFor(null).mapping;
  const x = useMemo(() => placesOf(set, { scale, sign }), [set, scale, sign]);
  const plot = useMemo(() => {
    const seen = { ...view, zoom };
    const rough = horizontalAxis(set, seen, frameWidth);
    const gutters = guttersFor(frameWidth, storeyViews(set, seen, rough, narrow, beside, x));
    const width = Math.max(0, frameWidth - gutters.left - gutters.right);
    const horizontal = horizontalAxis(set, seen, width);
    return { gutters, width, horizontal, storeys: storeyViews(set, seen, horizontal, narrow, beside, x), x };
  }, [set, view, zoom, frameWidth, narrow, beside, x]);

  const moveCursor = useCallback(
    (next: Cursor | null) => {
      setCursor(next);
      onCursor?.(next === null ? null : pointAt(set, next.family, next.place));
    },
    [set, onCursor],
  );
  const controls = <FigureControls set={set} plot={plot} view={view} onView={onView} />;
  const below = (
    <>
      <ZoomFields set={set} zoom={view.zoom} act={act} />
      <figcaption id={`${id}-summary`} className="max-w-prose text-sm">
        {waiting ?? summary}
        {set.source.note !== undefined && ` ${set.source.note}`}
      </figcaption>
      <p id={`${id}-keys`} className="max-w-prose text-quiet text-xs" data-print="never">
        Point at the plot, or focus it and use the arrow keys: left and right along the sweep, up and down
        between settings, Shift for ten points. A click or Enter chooses a point. Dragging shows a part of the
        sweep, and so does Z at both its ends; plus and minus, comma and full stop, or the ruler dragged along
        move the view; 0 shows the whole sweep, Backspace the view before.
      </p>
      <LineTable
        set={set}
        storeys={lines}
        choice={choice}
        only={view.only ?? null}
        cursor={cursor}
        onView={onView}
        onFollow={setFollowed}
      />
    </>
  );
  return (
    <figure
      aria-label={name}
      aria-describedby={`${id}-summary`}
      className={brief ? "grid min-w-0 gap-1" : "grid min-w-0 gap-4"}
    >
      {!brief && controls}
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
            followed={followed}
            chosen={point === null || waiting !== null ? null : placeOfPoint(set, point)}
            describedBy={`${id}-keys`}
            empty={waiting ?? "No point is solved here"}
            onCursor={moveCursor}
            onFollow={setFollowed}
            onChoose={({ family, place }) => onPoint(pointAt(set, family, place))}
            onZoom={(range) => act.show(valuesOf(set, plot.horizontal, range))}
            zoom={act}
          />
        )}
        {plot.storeys.length === 0 && (
          <p className="border-y py-6 text-quiet text-sm">
            {set.traces.length === 0
              ? "The netlist shows nothing, so no trace was kept. Add a line such as show out.v and run it again; the nets of a single point stand beside."
              : "No trace is chosen. Choose one in the table of lines below."}
          </p>
        )}
      </div>
      <SpokenCursor set={set} storeys={plot.storeys} cursor={spoken} />
      {!brief && below}
      {brief && (
        <details data-print="never">
          <summary className="w-fit text-quiet text-xs leading-6">
            Axes, zoom and numbers of these curves
          </summary>
          <div className="mt-2 grid gap-4">
            {controls}
            {below}
          </div>
        </details>
      )}
    </figure>
  );
}
