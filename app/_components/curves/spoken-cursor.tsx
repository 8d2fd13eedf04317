"use client";

import { useEffect, useState } from "react";
import { valueIn } from "./columns";
import type { Cursor } from "./cursor-layer";
import { missing } from "./cursor-marks";
import { type CurveSet, pointAt } from "./curve-set";
import { formatKnob, formatValue } from "./figures-in-words";
import type { StoreyView } from "./storey-views";

/** Ms of rest before the values are read out, so that a held arrow key does not queue up sentences. */
const REST = 300;

/** Reads out, politely, the values of all drawn traces where the cursor comes to rest. */
export function SpokenCursor({
  set,
  storeys,
  cursor,
}: {
  readonly set: CurveSet;
  readonly storeys: readonly StoreyView[];
  readonly cursor: Cursor | null;
}) {
  const [text, setText] = useState("");
  useEffect(() => {
    const timer = setTimeout(() => setText(cursor === null ? "" : spoken(set, storeys, cursor)), REST);
    return () => clearTimeout(timer);
  }, [set, storeys, cursor]);
  return (
    <p className="sr-only" aria-live="polite" data-spoken>
      {text}
    </p>
  );
}

function spoken(set: CurveSet, storeys: readonly StoreyView[], { family, place }: Cursor): string {
  const label = set.families[family]?.label ?? "";
  const values = storeys.flatMap(({ lines, unit }) =>
    lines
      .filter((line) => line.family === family)
      .map((line) => {
        const value = valueIn(line.values, place);
        return `${line.trace} ${value === null ? missing(set, { family, place }) : formatValue(value, unit)}`;
      }),
  );
  const where = `${set.axis.knob} ${formatKnob(set.axis, set.x[place]!)}${label === "" ? "" : `, ${label}`}`;
  return `${where}: ${values.join(", ")}. Point ${pointAt(set, family, place)}.`;
}
