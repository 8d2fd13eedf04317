"use client";

import { useId } from "react";
import { formatKnob } from "@/app/_components/curves/figures-in-words";
import type { AxisDocument } from "@/lib/analyses/result";

interface Props {
  /** An outer sweep with all its values. */
  readonly axis: AxisDocument;
  /** The value of it that is shown. */
  readonly value: number;
  readonly onTurn: (knob: string, value: number) => void;
}

/** Which setting of an outer sweep the preview shows. */
export function SettingChoice({ axis, value, onTurn }: Props) {
  const id = useId();
  const place = axis.values.indexOf(value);
  return (
    <span className="inline-flex items-center gap-2 text-sm">
      <label htmlFor={id} className="figures text-quiet">
        {axis.knob}
      </label>
      <select
        id={id}
        value={place}
        onChange={({ target }) => onTurn(axis.knob, axis.values[Number(target.value)]!)}
        className="figures min-h-7 max-w-44 rounded-[2px] border border-edge bg-surface px-1.5 text-ink"
      >
        {place === -1 && <option value={-1}>{formatKnob(axis, value)}, not in the sweep</option>}
        {axis.values.map((one, index) => (
          <option key={one} value={index}>
            {formatKnob(axis, one)}
          </option>
        ))}
      </select>
    </span>
  );
}
