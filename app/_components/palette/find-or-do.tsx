"use client";

import { type KeyboardEvent, useContext, useEffect, useId, useRef, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { DeedContext } from "./deed-registry";
import { answering, type Entry, GROUPS } from "./deeds";
import { EntryList } from "./entry-list";
import { useShownKeys } from "./shown-keys";
import { useFound } from "./use-found";

/** Rows that Page Up and Page Down go over. */
const LEAP = 8;

interface Props {
  readonly workspace: string;
  /** What was typed before the field had the focus. */
  readonly begun: () => string;
  readonly onTake: (entry: Entry) => void;
}

/** The field and the list of "Find or do…": what is typed narrows it, arrow keys choose, Enter takes. */
export function FindOrDo({ workspace, begun, onTake }: Props) {
  const id = useId();
  const registry = useContext(DeedContext);
  const list = useRef<HTMLDivElement>(null);
  const keys = useShownKeys();
  const [query, setQuery] = useState("");
  const [chosen, setChosen] = useState<string | null>(null);
  const found = useFound(workspace, query);
  const local = GROUPS.flatMap((group) => answering(group, registry?.of(group) ?? [], query));
  // What the service finds comes last: nothing that is already there moves when it arrives.
  const entries = [...local, ...found.entries];
  const at = Math.max(
    0,
    entries.findIndex(({ key }) => key === chosen),
  );
  const active = entries[at];

  useEffect(() => {
    list.current?.querySelector("[aria-selected=true]")?.scrollIntoView({ block: "nearest" });
  });

  const go = (to: number) => setChosen(entries[Math.min(entries.length - 1, Math.max(0, to))]?.key ?? null);
  const press = (event: KeyboardEvent) => {
    // Enter that ends the writing of a composed letter is not meant for the list.
    if (event.nativeEvent.isComposing) return;
    if (event.key === "ArrowDown") go(at + 1);
    else if (event.key === "ArrowUp") go(at - 1);
    else if (event.key === "PageDown") go(at + LEAP);
    else if (event.key === "PageUp") go(at - LEAP);
    else if (event.key === "Enter") active !== undefined && onTake(active);
    else return;
    event.preventDefault();
  };

  return (
    <>
      <div className="border-b px-2 focus-within:border-accent">
        <input
          role="combobox"
          aria-label="Find or do"
          aria-expanded="true"
          aria-controls={`${id}-list`}
          aria-autocomplete="list"
          aria-activedescendant={active === undefined ? undefined : `${id}-${active.key}`}
          placeholder="A netlist, a run, a page, or what you want done"
          spellCheck={false}
          autoComplete="off"
          maxLength={200}
          value={query}
          onChange={(event) => {
            setQuery(event.target.value);
            setChosen(null);
            list.current?.scrollTo({ top: 0 });
          }}
          onFocus={() => {
            const typed = begun();
            if (typed !== "") setQuery((before) => before + typed);
          }}
          onKeyDown={press}
          className="min-h-13 w-full bg-transparent px-2 outline-none!"
        />
      </div>
      <EntryList id={id} ref={list} entries={entries} active={active} onPoint={setChosen} onTake={onTake} />
      <div className="flex min-h-11 flex-wrap items-center gap-x-4 gap-y-1 border-t bg-paper px-4 py-1.5 text-quiet text-xs">
        <p role="status" className="min-w-0 grow" data-find={found.isSettled ? "settled" : "looking"}>
          {sayFound(query, entries.length, found)}
        </p>
        {found.problem !== null && (
          <Button size="small" onClick={found.again}>
            Try again
          </Button>
        )}
        <p aria-hidden="true" className="figures hidden text-xs sm:block">
          ↑ ↓ choose, ↵ takes it, {keys("Esc")} leaves
        </p>
      </div>
    </>
  );
}

function sayFound(query: string, count: number, { isSettled, problem }: ReturnType<typeof useFound>): string {
  if (problem !== null) return `Netlists and runs could not be looked up. ${problem}`;
  if (!isSettled) return "Looking for netlists and runs…";
  if (query.trim() === "") return "Type to find any netlist or run; the newest stand at the end.";
  if (count > 0) return `${count} found`;
  return "Nothing is called so. Netlists are found by title, owner and text, runs by title, number and person.";
}
