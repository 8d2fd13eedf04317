"use client";

import { type FormEvent, useEffect, useId, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { INPUT_CLASS } from "@/app/_components/ui/field";
import type { CurveSet } from "./curve-set";
import { formatKnob } from "./figures-in-words";
import type { Range } from "./range";
import { readQuantity } from "./read-quantity";
import type { Zoom } from "./use-zoom";
import { CLOSER, STEP } from "./zoom-keys";

const MOVES: readonly {
  readonly name: string;
  readonly label: string;
  readonly does: (zoom: Zoom) => void;
}[] = [
  { name: "Closer", label: "+", does: ({ stretch }) => stretch(CLOSER) },
  { name: "Wider", label: "\u2212", does: ({ stretch }) => stretch(1 / CLOSER) },
  { name: "Move the view left", label: "\u2190", does: ({ pan }) => pan(-STEP) },
  { name: "Move the view right", label: "\u2192", does: ({ pan }) => pan(STEP) },
];

/** The part of the sweep in view, as two fields: what dragging over the plot does, for those who do not drag. */
export function ZoomFields({
  set,
  zoom,
  act,
}: {
  readonly set: CurveSet;
  readonly zoom: Range | null;
  readonly act: Zoom;
}) {
  const id = useId();
  const from = formatKnob(set.axis, zoom?.from ?? set.x[0] ?? 0);
  const to = formatKnob(set.axis, zoom?.to ?? set.x.at(-1) ?? 0);
  const [typed, setTyped] = useState({ from, to });
  const [problem, setProblem] = useState<string | null>(null);

  useEffect(() => {
    setTyped({ from, to });
    setProblem(null);
  }, [from, to]);

  const show = (event: FormEvent) => {
    event.preventDefault();
    const low = readQuantity(typed.from, set.axis);
    const high = readQuantity(typed.to, set.axis);
    if ("problem" in low) return setProblem(low.problem);
    if ("problem" in high) return setProblem(high.problem);
    if (low.value >= high.value) return setProblem("“From” must lie below “to”.");
    if (low.value > (set.x.at(-1) ?? 0) || high.value < (set.x[0] ?? 0)) {
      return setProblem(
        `The sweep runs from ${formatKnob(set.axis, set.x[0] ?? 0)} to ${formatKnob(set.axis, set.x.at(-1) ?? 0)}.`,
      );
    }
    setProblem(null);
    act.show({ from: low.value, to: high.value });
  };

  const field = (end: "from" | "to", label: string) => (
    <label className="flex items-center gap-2">
      <span className="text-quiet text-xs">{label}</span>
      <input
        name={end}
        value={typed[end]}
        onChange={(event) => setTyped({ ...typed, [end]: event.target.value })}
        aria-describedby={problem === null ? undefined : id}
        aria-invalid={problem === null ? undefined : true}
        autoComplete="off"
        spellCheck={false}
        className={`${INPUT_CLASS} figures min-h-7! w-24! text-right`}
      />
    </label>
  );
  return (
    <form onSubmit={show} className="flex flex-wrap items-center gap-x-3 gap-y-2" data-print="never">
      {field("from", `${set.axis.knob} from`)}
      {field("to", "to")}
      <Button type="submit" size="small">
        Show
      </Button>
      <span className="inline-flex">
        {MOVES.map(({ name, label, does }) => (
          <Button
            key={name}
            size="small"
            tone="quiet"
            aria-label={name}
            title={name}
            className="min-w-7 px-1.5! text-base leading-none"
            onClick={() => does(act)}
          >
            <span aria-hidden="true">{label}</span>
          </Button>
        ))}
      </span>
      <Button size="small" tone="quiet" disabled={!act.canGoBack} onClick={act.back}>
        Back
      </Button>
      <Button size="small" tone="quiet" disabled={zoom === null} onClick={() => act.show(null)}>
        Whole sweep
      </Button>
      {problem !== null && (
        <p id={id} role="alert" className="w-full text-broken text-xs">
          {problem}
        </p>
      )}
    </form>
  );
}
