"use client";

import { memo, useRef } from "react";
import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { Button } from "@/app/_components/ui/button";
import { classNames } from "@/app/_components/ui/class-names";
import { KnobField } from "./knob-field";
import { KnobRuler } from "./knob-ruler";
import type { KnobScale } from "./knob-scale";
import type { KnobOutline } from "./messages";
import type { WrittenKnob } from "./write-knobs";

interface Props {
  readonly knob: KnobOutline;
  readonly scale: KnobScale;
  /** Where it stands now, coherent SI. */
  readonly value: number;
  /** It stands elsewhere than the text says. */
  readonly isTurned: boolean;
  readonly onTurn: (knob: string, value: number | null) => void;
  /** Puts its value into the text; absent where the text may not be changed. */
  readonly onWrite?: ((knobs: readonly WrittenKnob[]) => void) | undefined;
}

const NOTES = { first: "where values are read", outer: "setting shown" } as const;

/** A knob on its ruler: turned by pointer and keys, typed as a value, written into the text or put back to what it says. */
export const KnobControl = memo(function KnobControl(props: Props) {
  const { knob, scale, value, isTurned, onTurn, onWrite } = props;
  const slider = useRef<HTMLInputElement>(null);
  const { name, unit } = knob;
  const written = { knob: name, unit };
  const stays = (act: () => void) => () => {
    act();
    // The button goes; the focus must not go with it.
    slider.current?.focus();
  };
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_minmax(0,8rem)] items-start gap-x-3 border-b py-1.5 sm:grid-cols-[minmax(0,7.5rem)_minmax(0,1fr)_minmax(0,7.5rem)]">
      <div className="min-w-0 pt-1">
        <p className="figures truncate" title={name}>
          {name}
        </p>
        {knob.sweep !== null && <p className="text-quiet text-xs">{NOTES[knob.sweep]}</p>}
      </div>
      <div className="order-last col-span-2 min-w-0 sm:order-none sm:col-span-1">
        <div className="relative h-7">
          <div className="absolute inset-x-[7px] top-2.5">
            <KnobRuler scale={scale} />
          </div>
          <input
            ref={slider}
            type="range"
            min={0}
            max={scale.steps}
            step={1}
            value={scale.stepOf(value)}
            aria-label={name}
            aria-valuetext={formatKnob(written, value)}
            onChange={({ target }) => onTurn(name, scale.valueAt(Number(target.value)))}
            className="knob-slider absolute inset-x-0 top-0 w-full"
          />
        </div>
        <p className="figures flex justify-between text-quiet text-xs" aria-hidden="true">
          <span>{formatKnob(written, scale.low, 4)}</span>
          <span>{formatKnob(written, scale.high, 4)}</span>
        </p>
      </div>
      <div className="min-w-0">
        <KnobField knob={knob} value={value} onTurn={(next) => onTurn(name, next)} />
        <div className={classNames("flex justify-end", !isTurned && "invisible")}>
          {onWrite !== undefined && (
            <Button
              size="small"
              tone="quiet"
              className="min-h-6 text-xs"
              aria-label={`Write ${name} = ${formatKnob(written, value)} into the text`}
              onClick={stays(() => onWrite([{ ...written, value }]))}
            >
              Write
            </Button>
          )}
          <Button
            size="small"
            tone="quiet"
            className="min-h-6 text-xs"
            aria-label={`Put ${name} back to ${formatKnob(written, knob.value)}, as the text has it`}
            onClick={stays(() => onTurn(name, null))}
          >
            Reset
          </Button>
        </div>
      </div>
    </li>
  );
});
