"use client";

import { Button } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { StateMark } from "@/app/_components/ui/state-mark";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { lineStarts, placeOf } from "@/lib/language/span";
import { spellCode } from "./markers";
import { MessageText } from "./message-text";

/** Rows that are drawn; a text with more problems than these has one cause, and mending the first shows it. */
const MOST_ROWS = 100;

interface Props {
  /** The text that the problems are of. */
  readonly text: string;
  readonly diagnostics: readonly Diagnostic[];
  readonly mayMend: boolean;
  readonly onGoTo: (problem: Diagnostic) => void;
  readonly onMend: (problem: Diagnostic) => void;
}

/** The problems of the text, in its order: press one to go to its place, or its button to mend it. */
export function ProblemList({ text, diagnostics, mayMend, onGoTo, onMend }: Props) {
  const starts = lineStarts(text);
  const rest = diagnostics.length - MOST_ROWS;
  return (
    <section
      aria-label="Problems"
      // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable from the keyboard
      tabIndex={0}
      className="max-h-48 shrink-0 overflow-y-auto border-t bg-paper"
    >
      <ul>
        {diagnostics.slice(0, MOST_ROWS).map((one) => (
          <li
            key={`${one.code} ${one.from} ${one.message}`}
            className="flex flex-wrap items-start gap-x-3 gap-y-1 border-b px-4 py-1.5 last:border-b-0 md:flex-nowrap md:px-6"
          >
            <button
              type="button"
              onClick={() => onGoTo(one)}
              className="group grid min-h-7 min-w-0 grow grid-cols-[auto_4.5rem_minmax(0,1fr)] items-baseline gap-x-2 rounded-[2px] py-0.5 text-left text-sm"
            >
              <span className={one.severity === "error" ? "text-broken" : "text-nodata"}>
                <StateMark shape={one.severity === "error" ? "cross" : "diamond"} />
                <span className="sr-only">{one.severity}</span>
              </span>
              <span className="whitespace-nowrap text-quiet">line {placeOf(starts, one.from).line}</span>
              <span className="min-w-0 break-words group-hover:underline group-hover:underline-offset-3">
                <b className="font-semibold">{spellCode(one.code)}</b> <MessageText message={one.message} />
              </span>
            </button>
            {one.fix !== undefined && mayMend && (
              <Button size="small" onClick={() => onMend(one)} className="ml-24 max-w-full md:ml-0">
                <span className="truncate">{one.fix.title}</span>
              </Button>
            )}
          </li>
        ))}
      </ul>
      {rest > 0 && (
        <p className="px-4 py-1.5 text-quiet text-sm md:px-6">and {counted(rest, "more problem")}</p>
      )}
    </section>
  );
}
