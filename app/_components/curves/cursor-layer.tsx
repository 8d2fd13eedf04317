"use client";

import { type KeyboardEvent, type PointerEvent, useRef, useState } from "react";
import type { Axis } from "./axes";
import { nearest } from "./columns";
import { CursorMarks } from "./cursor-marks";
import type { CurveSet } from "./curve-set";
import { formatKnob } from "./figures-in-words";
import { moved } from "./move-cursor";
import { nearestLine } from "./nearest-line";
import type { Range } from "./range";
import type { StoreyView } from "./storey-views";
import type { Zoom } from "./use-zoom";
import { zoomByKey } from "./zoom-keys";

/** Where the cursor stands: a place along the sweep, and the setting it follows. */
export interface Cursor {
  readonly place: number;
  readonly family: number;
}

interface Props {
  readonly set: CurveSet;
  readonly storeys: readonly StoreyView[];
  readonly horizontal: Axis;
  readonly x: Float64Array;
  readonly width: number;
  readonly cursor: Cursor | null;
  readonly describedBy: string;
  readonly onCursor: (cursor: Cursor | null) => void;
  readonly onChoose: (cursor: Cursor) => void;
  /** The part dragged over, in places of the horizontal axis. */
  readonly onZoom: (range: Range) => void;
  readonly zoom: Zoom;
}

/** Px a press may wander before it is a drag. */
const DRAG = 6;

/** Lies over all storeys: takes pointer and keys, and shows the cursor. To assistive technology it is a slider along the sweep. */
export function CursorLayer(props: Props) {
  const { set, storeys, horizontal, x, width, cursor, onCursor, onChoose, onZoom } = props;
  const pressed = useRef<number | null>(null);
  const [drag, setDrag] = useState<Range | null>(null);
  const [edge, setEdge] = useState<number | null>(null);
  const { from, to } = horizontal.range;
  const families = [...new Set(storeys.flatMap(({ lines }) => lines.map(({ family }) => family)))];

  const locate = (event: PointerEvent<HTMLElement>): { at: number; cursor: Cursor | null } => {
    const box = event.currentTarget.getBoundingClientRect();
    const at = Math.min(width, Math.max(0, event.clientX - box.left));
    const place = nearest(x, from + (at / width) * (to - from));
    if (place < 0 || families.length === 0) return { at, cursor: null };
    const family = nearestLine(storeys, place, event.clientY - box.top) ?? cursor?.family ?? families[0]!;
    return { at, cursor: { place, family } };
  };

  const move = (event: PointerEvent<HTMLElement>) => {
    const found = locate(event);
    const start = pressed.current;
    if (start !== null && (drag !== null || Math.abs(found.at - start) > DRAG)) {
      setDrag({ from: Math.min(start, found.at), to: Math.max(start, found.at) });
      return;
    }
    onCursor(found.cursor);
  };

  const release = (event: PointerEvent<HTMLElement>) => {
    if (pressed.current === null) return;
    const found = locate(event);
    pressed.current = null;
    setDrag(null);
    if (drag === null) {
      if (found.cursor !== null) onChoose(found.cursor);
      return;
    }
    const place = (at: number) => from + (at / width) * (to - from);
    onZoom({ from: place(drag.from), to: place(drag.to) });
  };

  const press = (event: KeyboardEvent<HTMLElement>) => {
    if (event.key === "Enter" || event.key === " ") {
      event.preventDefault();
      if (cursor !== null) onChoose(cursor);
      return;
    }
    if (event.key === "Escape") {
      setEdge(null);
      return onCursor(null);
    }
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const at = cursor === null ? undefined : x[cursor.place];
    if (event.key.toLowerCase() === "z") {
      if (at === undefined) return;
      if (edge !== null && edge !== at) onZoom({ from: Math.min(edge, at), to: Math.max(edge, at) });
      return setEdge(edge === null ? at : null);
    }
    if (zoomByKey(event.key, at, props.zoom)) return event.preventDefault();
    const next = moved(event.key, event.shiftKey, cursor, { x, families, view: horizontal.range });
    if (next === null) return;
    event.preventDefault();
    onCursor(next);
  };

  const here = cursor === null ? null : set.x[cursor.place];
  const value = here === null || here === undefined ? "no cursor yet" : formatKnob(set.axis, here);
  const setting = cursor === null ? "" : set.families[cursor.family]?.label;
  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label={`Cursor along ${set.axis.knob}`}
      aria-describedby={props.describedBy}
      aria-valuemin={0}
      aria-valuemax={Math.max(0, x.length - 1)}
      aria-valuenow={cursor?.place ?? 0}
      aria-valuetext={setting ? `${value}, ${setting}` : value}
      className="absolute top-0 left-0 z-20 h-full cursor-crosshair touch-pan-y select-none"
      style={{ width }}
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        pressed.current = locate(event).at;
        event.currentTarget.setPointerCapture(event.pointerId);
      }}
      onPointerMove={move}
      onPointerUp={release}
      onPointerCancel={() => {
        pressed.current = null;
        setDrag(null);
      }}
      onPointerLeave={() => pressed.current === null && onCursor(null)}
      onBlur={() => {
        setEdge(null);
        onCursor(null);
      }}
      onKeyDown={press}
    >
      {drag !== null && (
        <div
          className="absolute top-0 h-full border-accent border-x bg-accent/10"
          style={{ left: drag.from, width: drag.to - drag.from }}
        />
      )}
      {edge !== null && edge >= from && edge <= to && (
        <div
          className="absolute top-0 h-full border-accent border-l-2 border-double"
          style={{ left: (width * (edge - from)) / (to - from) }}
          data-edge
        />
      )}
      {cursor !== null && drag === null && <CursorMarks {...props} cursor={cursor} />}
    </div>
  );
}
