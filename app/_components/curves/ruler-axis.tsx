"use client";

import { memo, type PointerEvent, useRef } from "react";
import type { Axis } from "./axes";

const LENGTHS = [13, 9, 5] as const;

/**
 * The ruler under all storeys: decades (or steps) numbered, the ticks between engraved, drawn to the plot's own scale. Dragged, it
 * slides under the storeys; the buttons and keys beside do the same.
 */
export const RulerAxis = memo(function RulerAxis({
  axis,
  knob,
  width,
  onPan,
}: {
  readonly axis: Axis;
  readonly knob: string;
  readonly width: number;
  /** By a share of the view. */
  readonly onPan: (share: number) => void;
}) {
  const held = useRef<number | null>(null);
  const { from, to } = axis.range;
  const across = (place: number) => (width * (place - from)) / (to - from);
  const engraved = axis.ticks
    .map(({ place, rank }) => `M${across(place).toFixed(2)} 0V${LENGTHS[rank]}`)
    .join("");
  const slide = (event: PointerEvent<HTMLElement>) => {
    if (held.current === null) return;
    const by = held.current - event.clientX;
    held.current = event.clientX;
    if (by !== 0) onPan(by / width);
  };
  return (
    <div
      className="relative h-13 cursor-ew-resize touch-pan-y select-none"
      style={{ width }}
      aria-hidden="true"
      data-ruler
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        held.current = event.clientX;
        event.currentTarget.setPointerCapture(event.pointerId);
      }}
      onPointerMove={slide}
      onPointerUp={() => {
        held.current = null;
      }}
      onPointerCancel={() => {
        held.current = null;
      }}
    >
      <svg
        aria-hidden="true"
        width={width}
        height="14"
        className="absolute top-0 overflow-visible"
        fill="none"
      >
        <path d={`M0 0.5H${width}`} stroke="var(--ink)" />
        <path d={engraved} stroke="var(--ink)" />
      </svg>
      {axis.ticks.map((tick) => {
        const text = axis.labels.texts.get(tick);
        if (text === undefined) return null;
        return (
          <span
            key={tick.place}
            className="figures absolute top-4 -translate-x-1/2 whitespace-nowrap text-quiet text-xs leading-none"
            style={{ left: across(tick.place) }}
          >
            {text}
          </span>
        );
      })}
      <span className="absolute top-8.5 left-1/2 -translate-x-1/2 text-xs leading-none">{knob}</span>
    </div>
  );
});
