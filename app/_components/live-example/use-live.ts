"use client";

import { type RefObject, useCallback, useEffect, useRef, useState } from "react";
import type { CursorAt } from "@/app/_components/drawing/text-connections";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";
import type { Previewing } from "@/app/_components/preview/previewing";
import { usePreviewing } from "@/app/_components/preview/use-preview";
import { changedSpan } from "./changed-span";
import { type Keeping, keepText, keptText } from "./kept-text";

/** A text to read, and to write in as soon as one wants to. */
export interface Live {
  readonly original: string;
  readonly text: string;
  readonly isEditing: boolean;
  readonly editor: RefObject<EditorHandle | null>;
  readonly previewing: Previewing;
  /** Brings the editor, with the cursor at an offset of the text. */
  readonly begin: (offset?: number) => void;
  /** Puts another text in its place as one step that undo takes back, and marks the lines that changed; brings the editor first. */
  readonly change: (make: (text: string) => string | null) => void;
  /** What the last change by `putBack` took away; null where nothing was. */
  readonly aside: string | null;
  readonly putBack: () => void;
  readonly takeAgain: () => void;
  /** Where the cursor of the editor rests; null before there is one. */
  readonly cursor: CursorAt | null;
  readonly rest: (cursor: CursorAt) => void;
  /** For the editor: after each change, and once it is there. */
  readonly edited: () => void;
  readonly arrived: () => void;
}

/** A live text that begins as `original`; nothing is solved before `isSeen`. With `keeping` a changed text outlives a reload. */
export function useLive(original: string, isSeen: boolean, keeping?: Keeping): Live {
  const editor = useRef<EditorHandle>(null);
  const isHere = useRef(false);
  const waiting = useRef<((handle: EditorHandle) => void)[]>([]);
  const [text, setText] = useState(original);
  const [isEditing, setEditing] = useState(false);
  const [cursor, rest] = useState<CursorAt | null>(null);
  const [aside, setAside] = useState<string | null>(null);
  const previewing = usePreviewing(text, isSeen);

  // biome-ignore lint/correctness/useExhaustiveDependencies: read once, when the page has come
  useEffect(() => {
    const kept = keeping === undefined ? null : keptText(keeping);
    if (kept === null || kept === original) return;
    setText(kept);
    setEditing(true);
    previewing.setText(kept);
  }, []);

  const when = useCallback((act: (handle: EditorHandle) => void) => {
    if (isHere.current && editor.current !== null) return act(editor.current);
    waiting.current.push(act);
    setEditing(true);
  }, []);

  const edited = useCallback(() => {
    if (editor.current === null) return;
    const now = editor.current.text();
    setText(now);
    previewing.setText(now);
    if (keeping !== undefined) keepText(keeping, now === original ? null : now);
  }, [previewing, original, keeping]);

  const arrived = useCallback(() => {
    isHere.current = true;
    const handle = editor.current;
    if (handle === null) return;
    for (const act of waiting.current.splice(0)) act(handle);
  }, []);

  const begin = useCallback(
    (offset = 0) => when((handle) => handle.goTo({ from: offset, to: offset })),
    [when],
  );

  const change = useCallback(
    (make: (text: string) => string | null) =>
      when((handle) => {
        const before = handle.text();
        const after = make(before);
        if (after === null || after === before) return;
        handle.replace(after);
        handle.show(changedSpan(before, after));
      }),
    [when],
  );

  const putBack = useCallback(() => {
    change((now) => {
      setAside(now);
      return original;
    });
  }, [change, original]);

  const takeAgain = useCallback(() => {
    if (aside !== null) change(() => aside);
    setAside(null);
  }, [change, aside]);

  return {
    ...{ original, text, isEditing, editor, previewing, begin, change, aside, putBack, takeAgain },
    ...{ cursor, rest, edited, arrived },
  };
}
