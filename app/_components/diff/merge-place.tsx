"use client";

import { useId } from "react";
import { type Choice, type Conflict, linesFor } from "./merge";

interface Props {
  readonly place: Conflict;
  readonly number: number;
  readonly of: number;
  /** What the other text is called: "Revision 5". */
  readonly theirs: string;
  readonly choice: Choice | undefined;
  readonly onChoice: (choice: Choice) => void;
}

const BOX = "font-(family-name:--font-figures) text-[0.8125rem] leading-6 whitespace-pre-wrap break-words";

/** A place that both changed: what it was, what each made of it, and what to take. */
export function MergePlace({ place, number, of, theirs, choice, onChoice }: Props) {
  const id = useId();
  const option = (take: Exclude<Choice["take"], "edit">, label: string) => (
    <label className="flex min-h-7 items-center gap-1.5 text-sm">
      <input
        type="radio"
        name={id}
        checked={choice?.take === take}
        onChange={() => onChoice({ take })}
        className="size-4 accent-(--accent)"
      />
      {label}
    </label>
  );
  const side = (take: "mine" | "theirs", label: string, lines: readonly string[]) => (
    <div className="min-w-0 border bg-paper">
      <div className="border-b px-3 py-1">{option(take, label)}</div>
      {/* biome-ignore lint/a11y/useKeyWithClickEvents: the radio above does the same by keyboard */}
      <pre className={`${BOX} min-h-10 cursor-pointer px-3 py-1.5`} onClick={() => onChoice({ take })}>
        {lines.length === 0 ? (
          <span className="text-quiet">nothing, the lines were removed</span>
        ) : (
          lines.join("\n")
        )}
      </pre>
    </div>
  );
  const written = () => linesFor(place, choice ?? { take: "mine first" }).join("\n");
  return (
    <fieldset className="grid grid-cols-[minmax(0,1fr)] gap-2 border-t pt-3">
      <legend className="float-left w-full font-semibold text-sm">
        Place {number} of {of}, near line {place.line}
        {choice === undefined && <span className="ml-2 font-normal text-nodata">to be chosen</span>}
      </legend>
      <details className="text-sm">
        <summary className="min-h-6 text-quiet">What stood there before</summary>
        <pre className={`${BOX} border-l-2 pl-3 text-quiet`}>
          {place.base.length === 0 ? "nothing" : place.base.join("\n")}
        </pre>
      </details>
      <div className="grid gap-2 md:grid-cols-2">
        {side("mine", "Mine", place.mine)}
        {side("theirs", theirs, place.theirs)}
      </div>
      <div className="flex flex-wrap gap-x-5">
        {option("mine first", "Both, mine first")}
        {option("theirs first", `Both, ${theirs.toLowerCase()} first`)}
        <label className="flex min-h-7 items-center gap-1.5 text-sm">
          <input
            type="radio"
            name={id}
            checked={choice?.take === "edit"}
            onChange={() => onChoice({ take: "edit", text: written() })}
            className="size-4 accent-(--accent)"
          />
          Write it myself
        </label>
      </div>
      {choice?.take === "edit" && (
        <textarea
          aria-label={`Lines of place ${number}`}
          value={choice.text}
          spellCheck={false}
          rows={Math.min(12, choice.text.split("\n").length + 1)}
          onChange={(event) => onChoice({ take: "edit", text: event.target.value })}
          className={`${BOX} w-full border border-edge bg-surface px-3 py-1.5`}
        />
      )}
    </fieldset>
  );
}
