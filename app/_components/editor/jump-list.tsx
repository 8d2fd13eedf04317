"use client";

import { type KeyboardEvent, useEffect, useId, useRef, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { classNames } from "@/app/_components/ui/class-names";
import type { Span } from "@/lib/language/span";
import { type JumpEntry, matching } from "./jump-entries";

/** Rows that are drawn; what is looked for narrows a longer list. */
const MOST_ROWS = 400;

interface Props {
  readonly label: string;
  /** Null while they are being found. */
  readonly entries: readonly JumpEntry[] | null;
  /** What to say where there are none. */
  readonly empty: string;
  readonly onJump: (span: Span) => void;
  readonly onClose: () => void;
}

/** A list over the text to jump from: type to narrow it, arrow keys to choose, Enter to go there, Escape to stay. */
export function JumpList({ label, entries, empty, onJump, onClose }: Props) {
  const id = useId();
  const field = useRef<HTMLInputElement>(null);
  const list = useRef<HTMLDivElement>(null);
  const [wanted, setWanted] = useState("");
  const [chosen, setChosen] = useState(0);
  const found = matching(entries ?? [], wanted).slice(0, MOST_ROWS);
  const active = Math.min(chosen, found.length - 1);

  useEffect(() => field.current?.focus(), []);
  useEffect(() => {
    list.current?.querySelector("[aria-selected=true]")?.scrollIntoView({ block: "nearest" });
  });

  const press = (event: KeyboardEvent) => {
    const last = found.length - 1;
    if (event.key === "ArrowDown") setChosen(Math.min(active + 1, last));
    else if (event.key === "ArrowUp") setChosen(Math.max(active - 1, 0));
    else if (event.key === "PageDown") setChosen(Math.min(active + 10, last));
    else if (event.key === "PageUp") setChosen(Math.max(active - 10, 0));
    else if (event.key === "Escape") onClose();
    else if (event.key === "Enter" && found[active] !== undefined) onJump(found[active].span);
    else return;
    event.preventDefault();
    event.stopPropagation();
  };

  const groups = [...new Set(found.map(({ group }) => group))];
  return (
    <section
      aria-label={label}
      className="absolute inset-y-0 right-0 z-10 flex w-full flex-col border-l bg-surface sm:w-96"
    >
      <div className="flex items-center gap-2 border-b p-2">
        <input
          ref={field}
          role="combobox"
          aria-label={`${label}: look for`}
          aria-expanded="true"
          aria-controls={`${id}-list`}
          aria-autocomplete="list"
          aria-activedescendant={active >= 0 ? `${id}-${active}` : undefined}
          placeholder="Look for"
          spellCheck={false}
          autoComplete="off"
          value={wanted}
          onChange={(event) => {
            setWanted(event.target.value);
            setChosen(0);
          }}
          onKeyDown={press}
          className="min-h-8 min-w-0 grow rounded-[2px] border border-edge bg-surface px-2 text-sm"
        />
        <Button size="small" tone="quiet" onClick={onClose}>
          Close
        </Button>
      </div>
      <div
        ref={list}
        id={`${id}-list`}
        role="listbox"
        aria-label={label}
        className="min-h-0 grow overflow-y-auto pb-2"
      >
        {groups.map((group) => (
          // biome-ignore lint/a11y/useSemanticElements: a group of options, for which HTML has no element
          <div key={group} role="group" aria-label={group}>
            <p aria-hidden="true" className="caption px-3 pt-3 pb-1">
              {group}
            </p>
            {found.map((entry, index) =>
              entry.group !== group ? null : (
                <Row
                  key={entry.key}
                  id={`${id}-${index}`}
                  entry={entry}
                  isActive={index === active}
                  onPoint={() => setChosen(index)}
                  onJump={() => onJump(entry.span)}
                />
              ),
            )}
          </div>
        ))}
      </div>
      {found.length === 0 && (
        <p role="status" className="absolute inset-x-0 top-14 px-3 text-quiet text-sm">
          {entries === null
            ? "Reading the text…"
            : entries.length === 0
              ? empty
              : "Nothing here has these letters."}
        </p>
      )}
    </section>
  );
}

function Row({
  id,
  entry: { name, says, line, depth },
  isActive,
  onPoint,
  onJump,
}: {
  readonly id: string;
  readonly entry: JumpEntry;
  readonly isActive: boolean;
  readonly onPoint: () => void;
  readonly onJump: () => void;
}) {
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: the field above the list has the keys of all its options
    <div
      id={id}
      role="option"
      tabIndex={-1}
      aria-selected={isActive}
      onMouseMove={onPoint}
      onClick={onJump}
      className={classNames(
        "grid min-h-8 cursor-pointer grid-cols-[minmax(0,1fr)_auto] items-baseline gap-x-3 border-transparent border-l-2 px-3 py-1 text-sm",
        isActive && "border-l-accent bg-wash",
      )}
      style={{ paddingLeft: 12 + depth * 16 }}
    >
      <span className="min-w-0 truncate">
        <span className="figures mr-2 font-semibold">{name}</span>
        <span className="figures text-quiet text-xs">{says}</span>
      </span>
      <span className="text-quiet text-xs">line {line}</span>
    </div>
  );
}
