"use client";

import type { Ref } from "react";
import type { EditorEvents } from "./editor-handle";
import { FONT_FAMILY, FONT_SIZE, LINE_HEIGHT } from "./palette";

interface Props {
  readonly ref: Ref<HTMLTextAreaElement>;
  readonly label: string;
  readonly initial: string;
  readonly readOnly: boolean;
  readonly events: Pick<EditorEvents, "onEdit" | "onQueue" | "onSave" | "onCursor">;
}

/** What takes the editor's place where it cannot be had: a plain box with the same text and the keys of the page. */
export function PlainBox({ ref, label, initial, readOnly, events }: Props) {
  return (
    <textarea
      ref={ref}
      aria-label={label}
      defaultValue={initial}
      readOnly={readOnly}
      spellCheck={false}
      onChange={() => events.onEdit()}
      onSelect={(event) => events.onCursor?.(event.currentTarget.selectionStart, [])}
      onKeyDown={(event) => {
        if (!event.ctrlKey && !event.metaKey) return;
        if (event.key === "Enter") events.onQueue();
        else if (event.key === "s") events.onSave();
        else return;
        event.preventDefault();
      }}
      className="absolute inset-0 resize-none bg-surface p-3"
      style={{ fontFamily: FONT_FAMILY, fontSize: FONT_SIZE, lineHeight: `${LINE_HEIGHT}px` }}
    />
  );
}
