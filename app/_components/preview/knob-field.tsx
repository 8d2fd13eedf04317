"use client";

import { useId, useState } from "react";
import { formatKnob, type KnobUnit } from "@/app/_components/curves/figures-in-words";
import { readQuantity } from "@/app/_components/curves/read-quantity";
import type { KnobOutline } from "./messages";

interface Props {
  readonly knob: KnobOutline;
  readonly value: number;
  readonly onTurn: (value: number) => void;
}

/** A knob's value to read and to type, with its unit. Enter or leaving the field takes it, Escape puts back what stood there. */
export function KnobField({ knob, value, onTurn }: Props) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const unit: KnobUnit = { knob: knob.name, unit: knob.unit };

  const close = () => {
    setTyped(null);
    setProblem(null);
  };
  const take = () => {
    if (typed === null) return;
    const read = readQuantity(typed, unit);
    const wrong = "problem" in read ? read.problem : outside(knob, read.value);
    if (wrong !== null) return setProblem(wrong);
    close();
    if ("value" in read && read.value !== value) onTurn(read.value);
  };
  return (
    <div className="min-w-0">
      <input
        aria-label={`${knob.name}, value`}
        aria-invalid={problem !== null || undefined}
        aria-describedby={problem === null ? undefined : id}
        value={typed ?? formatKnob(unit, value)}
        inputMode="text"
        spellCheck={false}
        autoComplete="off"
        onChange={({ target }) => setTyped(target.value)}
        onBlur={take}
        onFocus={({ target }) => target.select()}
        onKeyDown={(event) => {
          if (event.key === "Enter") take();
          else if (event.key === "Escape") close();
          else return;
          event.preventDefault();
          event.stopPropagation();
        }}
        className="figures min-h-7 w-full rounded-[2px] border border-transparent bg-transparent px-1.5 text-right hover:border-edge focus:border-edge focus:bg-surface aria-[invalid=true]:border-broken"
      />
      {problem !== null && (
        <p id={id} role="alert" className="text-right text-broken text-xs">
          {problem}
        </p>
      )}
    </div>
  );
}

/** What the text says a value must stay within. */
function outside({ name, unit, range }: KnobOutline, value: number): string | null {
  if (range !== null && (value < range.low || value > range.high)) {
    const [low, high] = [range.low, range.high].map((end) => formatKnob({ knob: name, unit }, end));
    return `The text keeps ${name} within ${low} and ${high}.`;
  }
  return name === "temperature" && unit === "K" && value <= 0 ? "The temperature must be above 0 K." : null;
}
