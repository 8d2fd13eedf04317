"use client";

import { type RefObject, useEffect } from "react";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";
import { lineStarts } from "@/lib/language/span";

/** Ms between two looks for the editor, and looks at most. */
const LOOK = 100;
const LOOKS = 150;

/** Goes to the line that the address asks for, #L12, as soon as the editor has come: a link from a run leads to a part so. */
export function useAskedLine(editor: RefObject<EditorHandle | null>): void {
  useEffect(() => {
    const asked = /^#L(\d+)$/.exec(window.location.hash)?.[1];
    if (asked === undefined) return;
    let looks = 0;
    const timer = setInterval(() => {
      const isThere = document.querySelector(".sheet-editor .view-line") !== null;
      if (++looks > LOOKS) clearInterval(timer);
      if (!isThere || editor.current === null) return;
      clearInterval(timer);
      const text = editor.current.text();
      const starts = lineStarts(text);
      const from = starts[Number(asked) - 1];
      if (from !== undefined)
        editor.current.goTo({ from, to: (starts[Number(asked)] ?? text.length + 1) - 1 });
    }, LOOK);
    return () => clearInterval(timer);
  }, [editor]);
}
