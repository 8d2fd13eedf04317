"use client";

import { useId } from "react";
import { type LogarithmicFit, reasonFor, type Scale } from "./scale";

const CHOICES = [
  { value: "linear", label: "linear" },
  { value: "logarithmic", label: "log" },
] as const;

/** Linear or logarithmic for one axis; where the values allow no logarithm it says so and offers nothing. */
export function AxisSwitch({
  name,
  scale,
  fit,
  onChange,
}: {
  readonly name: string;
  readonly scale: Scale;
  readonly fit: LogarithmicFit;
  readonly onChange: (scale: Scale) => void;
}) {
  const group = useId();
  if (!fit.fits && fit.reason === "no values") return null;
  if (!fit.fits) {
    return (
      <p className="text-quiet text-xs">
        {name} axis linear only: {reasonFor(fit)}
      </p>
    );
  }
  return (
    <fieldset className="flex items-center gap-2">
      <legend className="sr-only">{name} axis</legend>
      <span aria-hidden="true" className="text-quiet text-xs">
        {name} axis
      </span>
      <span className="flex rounded-[2px] border border-edge">
        {CHOICES.map(({ value, label }) => (
          <label
            key={value}
            className="relative flex min-h-6 cursor-pointer items-center px-2 text-xs has-checked:bg-ink has-checked:text-paper has-focus-visible:outline-2 has-focus-visible:outline-accent has-focus-visible:outline-offset-2"
          >
            <input
              type="radio"
              name={group}
              value={value}
              aria-label={value}
              checked={scale === value}
              onChange={() => onChange(value)}
              className="absolute inset-0 cursor-pointer opacity-0"
            />
            {label}
          </label>
        ))}
      </span>
    </fieldset>
  );
}
