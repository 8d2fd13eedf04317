"use client";

import { type RefObject, useCallback, useEffect, useRef, useState } from "react";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";

/** Milliseconds of rest after which what was typed is looked at. */
const REST = 120;

/**
 * The text of the editor, brought up to date when the typing rests. `edited` is to be called at each change; `settle` reads the
 * text at once.
 */
export function useSettledText(editor: RefObject<EditorHandle | null>, initial: string) {
  // A page that is brought up to date after a save hands on another text: what was typed meanwhile must not lose its rest by it.
  const [begun] = useState(initial);
  const [text, setText] = useState(begun);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);

  const settle = useCallback((): string => {
    clearTimeout(timer.current);
    const now = editor.current?.text() ?? begun;
    setText(now);
    return now;
  }, [editor, begun]);

  const edited = useCallback(() => {
    clearTimeout(timer.current);
    timer.current = setTimeout(settle, REST);
  }, [settle]);

  useEffect(() => {
    // A tab that is closed or hidden may never come back; its last words are kept before it goes.
    const hide = () => settle();
    window.addEventListener("pagehide", hide);
    return () => {
      clearTimeout(timer.current);
      window.removeEventListener("pagehide", hide);
    };
  }, [settle]);

  return { text, edited, settle };
}
