"use client";

import dynamic from "next/dynamic";
import type { ReactNode } from "react";
import { offsetUnder, PlainLines } from "@/app/_components/editor/plain-lines";
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
          // biome-ignore lint/a11y/noStaticElementInteractions: a press into the text is a shorter way to what the button over it does
          <div
            className="absolute inset-0 cursor-text"
            onClick={(event) => {
              // What is marked is to be copied.
              if (document.getSelection()?.isCollapsed === false) return;
              live.begin(offsetUnder(event.clientX, event.clientY));
            }}
            onKeyDown={(event) => event.key === "Enter" && live.begin()}
          >
            {text === original ? children : <PlainLines text={text} label="Netlist text" />}
          </div>
        )}
      </div>
    </>
  );
}
