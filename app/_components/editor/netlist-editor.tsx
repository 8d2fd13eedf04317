"use client";

import "./editor.css";
import { type Ref, useEffect, useImperativeHandle, useRef, useState } from "react";
import { format } from "@/lib/language/format";
import type { EditorEvents, EditorHandle } from "./editor-handle";
import { mend } from "./markers";
import type { Marked, Mounted } from "./mount-editor";
import { FONT_FAMILY, FONT_SIZE, LINE_HEIGHT } from "./palette";
import { PlainLines } from "./plain-lines";

interface Props extends EditorEvents {
  readonly ref: Ref<EditorHandle>;
  /** The text to begin with; later ones come through the handle. */
  readonly initial: string;
  readonly readOnly: boolean;
  /** Problems to mark, and the text they are of. */
  readonly problems: Marked | null;
}

const LABEL = "Netlist text";

/**
 * The text of a netlist to write in. The server renders it as plain lines; the editor takes their place when it has arrived, and
 * a plain box does where it cannot be had.
 */
export function NetlistEditor({ ref, initial, readOnly, problems, ...events }: Props) {
  const place = useRef<HTMLDivElement>(null);
  const box = useRef<HTMLTextAreaElement>(null);
  const mounted = useRef<Mounted | null>(null);
  const live = useRef(events);
  const [state, setState] = useState<"coming" | "here" | "missing">("coming");

  useEffect(() => {
    live.current = events;
  });

  // biome-ignore lint/correctness/useExhaustiveDependencies: mounted once; a later text or right comes through the handle
  useEffect(() => {
    let gone = false;
    const told: EditorEvents = {
      onEdit: () => live.current.onEdit(),
      onQueue: () => live.current.onQueue(),
      onSave: () => live.current.onSave(),
      onTab: (does) => live.current.onTab(does),
    };
    import("./mount-editor")
      .then(({ mountEditor }) => mountEditor(place.current!, { text: initial, readOnly, label: LABEL }, told))
      .then((editor) => {
        if (gone) return editor.dispose();
        mounted.current = editor;
        setState("here");
      })
      .catch((error: unknown) => {
        console.error("The editor could not be loaded; a plain box takes its place.", error);
        if (gone) return;
        setState("missing");
        told.onTab("always moves on");
      });
    return () => {
      gone = true;
      mounted.current?.dispose();
      mounted.current = null;
    };
  }, []);

  useEffect(() => {
    if (state === "here" && problems !== null) mounted.current?.mark(problems);
  }, [problems, state]);

  useImperativeHandle(ref, () => {
    const boxText = () => box.current?.value ?? initial;
    const put = (text: string) => {
      if (box.current === null) return;
      box.current.value = text;
      live.current.onEdit();
    };
    const plain: EditorHandle = {
      text: boxText,
      replace: put,
      goTo: ({ from, to }) => {
        box.current?.focus();
        box.current?.setSelectionRange(from, to);
      },
      mend: (fix, of) => {
        if (boxText() === of) put(mend(of, fix));
      },
      format: () => put(format(boxText())),
    };
    const now = () => mounted.current ?? plain;
    return {
      text: () => now().text(),
      replace: (text) => now().replace(text),
      goTo: (span) => now().goTo(span),
      mend: (fix, of) => now().mend(fix, of),
      format: () => now().format(),
    };
  }, [initial]);

  return (
    <div className="relative h-full min-h-0 bg-surface">
      <div ref={place} className="sheet-editor absolute inset-0" hidden={state === "missing"} />
      {state === "coming" && <PlainLines text={initial} label={`${LABEL}, the editor is loading`} />}
      {state === "missing" && (
        <textarea
          ref={box}
          aria-label={LABEL}
          defaultValue={initial}
          readOnly={readOnly}
          spellCheck={false}
          onChange={() => live.current.onEdit()}
          onKeyDown={(event) => {
            if (!event.ctrlKey && !event.metaKey) return;
            if (event.key === "Enter") live.current.onQueue();
            else if (event.key === "s") live.current.onSave();
            else return;
            event.preventDefault();
          }}
          className="absolute inset-0 resize-none bg-surface p-3"
          style={{ fontFamily: FONT_FAMILY, fontSize: FONT_SIZE, lineHeight: `${LINE_HEIGHT}px` }}
        />
      )}
    </div>
  );
}
