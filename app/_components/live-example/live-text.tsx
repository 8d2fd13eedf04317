"use client";

import dynamic from "next/dynamic";
import type { MouseEvent, ReactNode } from "react";
import { PlainLines } from "@/app/_components/editor/plain-lines";
import { Button } from "@/app/_components/ui/button";
import type { Live } from "./use-live";

interface Props {
  readonly live: Live;
  /** Ctrl Enter in the text; nothing where it has nothing to start. */
  readonly onRun?: () => void;
  /** The text as it was given, rendered by the server. */
  readonly children: ReactNode;
}

const LiveEditor = dynamic(() => import("./live-editor").then((all) => all.LiveEditor), {
  ssr: false,
  loading: () => <div className="min-h-9 border-b" />,
});

/** The text of an example: to be read, and from the first press on it, or on the button over it, to be written in. */
export function LiveText({ live, onRun, children }: Props) {
  const { isEditing, text, original, aside } = live;
  const isChanged = text !== original;
  return (
    <>
      <div className="flex min-h-9 shrink-0 flex-wrap items-center justify-end gap-x-2 border-b px-4">
        <p className="grow text-quiet text-xs" aria-live="polite">
          {isChanged ? "changed by you, kept in this browser alone" : "as it was given"}
        </p>
        {!isEditing && (
          <Button size="small" tone="quiet" onClick={() => live.begin()}>
            Edit the text
          </Button>
        )}
        {isChanged && (
          <Button size="small" tone="quiet" onClick={live.putBack}>
            Put back the original text
          </Button>
        )}
        {!isChanged && aside !== null && (
          <Button size="small" tone="quiet" onClick={live.takeAgain}>
            Take your text again
          </Button>
        )}
      </div>
      <div className="relative min-h-0 grow bg-surface">
        {isEditing ? (
          <LiveEditor live={live} onRun={onRun} />
        ) : (
          // The button over the text does the same from the keyboard.
          // biome-ignore lint/a11y/noStaticElementInteractions: a press into the text is a shorter way to the same
          // biome-ignore lint/a11y/useKeyWithClickEvents: as above
          <div className="absolute inset-0 cursor-text" onClick={(event) => beginAt(event, live)}>
            {text === original ? children : <PlainLines text={text} label="Netlist text" />}
          </div>
        )}
      </div>
    </>
  );
}

/** Begins at the line that was pressed, unless something was marked to be copied. */
function beginAt({ target }: MouseEvent, live: Live): void {
  if (!(target instanceof Element) || document.getSelection()?.isCollapsed === false) return;
  const line = target.closest("li");
  const index = line === null ? 0 : Array.from(line.parentElement?.children ?? []).indexOf(line);
  const before = live.text.split("\n").slice(0, index);
  live.begin(before.reduce((sum, one) => sum + one.length + 1, 0));
}
