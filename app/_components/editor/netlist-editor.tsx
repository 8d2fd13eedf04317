"use client";

import "./editor.css";
import { type Ref, type RefObject, useEffect, useImperativeHandle, useRef, useState } from "react";
import { format } from "@/lib/language/format";
import type { EditorEvents, EditorHandle } from "./editor-handle";
import { atFirstSign } from "./first-sign";
import { JumpList } from "./jump-list";
import { mend } from "./markers";
import type { Mounted, MountedEvents } from "./mount-editor";
import { PlainBox } from "./plain-box";
import { PlainLines } from "./plain-lines";
import type { Marked } from "./providers";
import type { Told } from "./questions";
import { type BarCommand, TextBar } from "./text-bar";
import { useJumps } from "./use-jumps";

interface Props extends EditorEvents {
  readonly ref: Ref<EditorHandle>;
  /** The text to begin with; later ones come through the handle. */
  readonly initial: string;
  readonly readOnly: boolean;
  /** Problems to mark, and the text they are of. */
  readonly problems: Marked | null;
  /** The value of a net, element, knob or value at the cursor's point of the preview; null where there is none. */
  readonly valueAtCursor?: (name: string) => string | null;
  /** Once what can be written in stands there: the editor, or the box in its place. */
  readonly onArrive?: () => void;
  /** Whether the editor comes with the first sign that somebody is at the page; else it comes at once. */
  readonly isPatient?: boolean;
}

const LABEL = "Netlist text";

/**
 * The text of a netlist to write in. The server renders it as plain lines; the editor takes their place when it has arrived, and
 * a plain box does where it cannot be had.
 */
export function NetlistEditor({
  ref,
  initial,
  readOnly,
  problems,
  valueAtCursor = noValue,
  onArrive,
  isPatient = false,
  ...events
}: Props) {
  const place = useRef<HTMLDivElement>(null);
  const box = useRef<HTMLTextAreaElement>(null);
  const mounted = useRef<Mounted | null>(null);
  const [state, setState] = useState<"coming" | "here" | "missing">("coming");
  const [told, setTold] = useState<Told | null>(null);
  const jumps = useJumps();
  /** What was asked of the editor while it was on its way. */
  const waiting = useRef<((editor: EditorHandle) => void)[]>([]);

  const plain = plainHandle(box, initial, events, (act) => waiting.current.push(act));
  const now = () => mounted.current ?? plain;
  const openOutline = () => jumps.openOutline(now().text());
  const live = useRef({ events, valueAtCursor, openOutline, jumps });
  useEffect(() => {
    live.current = { events, valueAtCursor, openOutline, jumps };
  });

  // biome-ignore lint/correctness/useExhaustiveDependencies: mounted once; a later text or right comes through the handle
  useEffect(() => {
    let gone = false;
    const on: MountedEvents = {
      onEdit: () => live.current.events.onEdit(),
      onQueue: () => live.current.events.onQueue(),
      onSave: () => live.current.events.onSave(),
      onTab: (does) => live.current.events.onTab(does),
      onRest: (offset, what) => {
        setTold(what);
        live.current.events.onCursor?.(offset, what?.paths ?? []);
      },
      onOutline: () => live.current.openOutline(),
      onPlaces: (what) => live.current.jumps.openPlaces(now().text(), what),
      valueAtCursor: (name) => live.current.valueAtCursor(name),
    };
    const fetchEditor = () =>
      import("./mount-editor")
        .then(({ mountEditor }) => mountEditor(place.current!, { text: initial, readOnly, label: LABEL }, on))
        .then((editor) => {
          if (gone) return editor.dispose();
          mounted.current = editor;
          setState("here");
        })
        .catch((error: unknown) => {
          console.error("The editor could not be loaded; a plain box takes its place.", error);
          if (gone) return;
          setState("missing");
          on.onTab("always moves on");
        });
    const begin = () => void fetchEditor();
    const callOff = isPatient ? atFirstSign(begin) : undefined;
    if (!isPatient) begin();
    return () => {
      gone = true;
      callOff?.();
      mounted.current?.dispose();
      mounted.current = null;
    };
  }, []);

  useEffect(() => {
    if (state === "here" && problems !== null) mounted.current?.mark(problems);
  }, [problems, state]);

  // biome-ignore lint/correctness/useExhaustiveDependencies: told once, whoever listens by then
  useEffect(() => {
    if (state === "coming") return;
    for (const act of waiting.current.splice(0)) act({ ...now(), openOutline });
    onArrive?.();
  }, [state]);

  useImperativeHandle(ref, () => ({
    text: () => now().text(),
    replace: (text) => now().replace(text),
    goTo: (span) => now().goTo(span),
    show: (span) => now().show(span),
    mend: (fix, of) => now().mend(fix, of),
    format: () => now().format(),
    openOutline,
  }));

  const run = (command: BarCommand) => {
    if (command === "outline") openOutline();
    else if (command === "format") now().format();
    else mounted.current?.run(command);
  };
  const closeJumps = () => {
    jumps.close();
    if (mounted.current === null) box.current?.focus();
    else mounted.current.focus();
  };

  return (
    <div className="flex h-full min-h-0 flex-col">
      <TextBar told={told} readOnly={readOnly} state={state} onRun={run} />
      <div className="relative min-h-0 grow bg-surface">
        <div ref={place} className="sheet-editor absolute inset-0" hidden={state === "missing"} />
        {state === "coming" && (
          <PlainLines
            text={initial}
            label={`${LABEL}, the editor is loading`}
            onPress={(offset) => plain.goTo({ from: offset, to: offset })}
          />
        )}
        {state === "missing" && (
          <PlainBox ref={box} label={LABEL} initial={initial} readOnly={readOnly} events={events} />
        )}
        {jumps.jumps !== null && (
          <JumpList
            key={jumps.jumps.label}
            {...jumps.jumps}
            onClose={closeJumps}
            onJump={(span) => {
              jumps.close();
              now().goTo(span);
            }}
          />
        )}
      </div>
    </div>
  );
}

/** The plain box in the editor's place; while neither is there, what is asked waits for whichever comes. */
function plainHandle(
  box: RefObject<HTMLTextAreaElement | null>,
  initial: string,
  { onEdit }: Pick<EditorEvents, "onEdit">,
  later: (act: (editor: EditorHandle) => void) => void,
): EditorHandle {
  const text = () => box.current?.value ?? initial;
  const put = (next: string) => {
    if (box.current === null) return later((editor) => editor.replace(next));
    box.current.value = next;
    onEdit();
  };
  return {
    text,
    replace: put,
    goTo: (span) => {
      if (box.current === null) return later((editor) => editor.goTo(span));
      box.current.focus();
      box.current.setSelectionRange(span.from, span.to);
    },
    show: (span) => {
      if (box.current === null) return later((editor) => editor.show(span));
      if (span !== null) box.current.setSelectionRange(span.from, span.to);
    },
    mend: (fix, of) => {
      if (box.current === null) return later((editor) => editor.mend(fix, of));
      if (text() === of) put(mend(of, fix));
    },
    format: () => put(format(text())),
    openOutline: () => {},
  };
}

function noValue(): null {
  return null;
}
