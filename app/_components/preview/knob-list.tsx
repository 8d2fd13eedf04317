"use client";

import "./knob.css";
import { memo, useId, useMemo } from "react";
import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { Button } from "@/app/_components/ui/button";
import { KnobControl } from "./knob-control";
import { knobScale } from "./knob-scale";
import type { KnobOutline, Outline } from "./messages";
import type { WrittenKnob } from "./write-knobs";

interface Props {
  readonly outline: Outline;
  readonly turned: ReadonlyMap<string, number>;
  readonly place: number;
  readonly onTurn: (knob: string, value: number | null) => void;
  readonly onReset: () => void;
  /** Absent where the text may not be changed. */
  readonly onWrite?: ((knobs: readonly WrittenKnob[]) => void) | undefined;
}

/** Every knob of the file as a control that moves the preview, and nothing but the preview until it is written into the text. */
export const KnobList = memo(function KnobList(props: Props) {
  const { outline, turned, place, onTurn, onReset, onWrite } = props;
  const heading = useId();
  const scales = useMemo(
    () => new Map(outline.knobs.map((knob) => [knob, knobScale(knob, outline)])),
    [outline],
  );
  const standing = (knob: KnobOutline) => {
    const axis = outline.axes.find((one) => one.knob === knob.name);
    if (knob.sweep === "first") return axis?.values[place] ?? knob.value;
    return turned.get(knob.name) ?? (axis === undefined ? knob.value : nearestTo(axis.values, knob.value));
  };
  const written = (knob: KnobOutline): WrittenKnob => {
    return { knob: knob.name, unit: knob.unit, value: standing(knob) };
  };
  const moved = outline.knobs.filter(({ name }) => turned.has(name));
  return (
    <section aria-labelledby={heading}>
      <h3 id={heading} className="caption">
        Knobs{" "}
        <span className="ml-2 font-normal">move the preview alone until they are written into the text</span>
      </h3>
      <ul className="mt-2 border-t">
        {outline.knobs.map((knob) => (
          <KnobControl
            key={knob.name}
            knob={knob}
            scale={scales.get(knob)!}
            value={standing(knob)}
            isTurned={turned.has(knob.name)}
            onTurn={onTurn}
            onWrite={onWrite}
          />
        ))}
      </ul>
      {moved.length > 1 && (
        <div className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 pt-2 text-sm">
          <p className="text-quiet">
            Turned:{" "}
            {moved.map((knob) => `${knob.name} ${formatKnob(written(knob), standing(knob))}`).join(", ")}
          </p>
          <div className="flex gap-2">
            {onWrite !== undefined && (
              <Button size="small" onClick={() => onWrite(moved.map(written))}>
                Write all into the text
              </Button>
            )}
            <Button size="small" tone="quiet" onClick={onReset}>
              Reset all
            </Button>
          </div>
        </div>
      )}
    </section>
  );
});

function nearestTo(values: readonly number[], wanted: number): number {
  return values.reduce((best, one) => (Math.abs(one - wanted) < Math.abs(best - wanted) ? one : best));
}
