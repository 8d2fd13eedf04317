"use client";

import type { ReactNode, RefObject } from "react";
import { LateConnections } from "@/app/_components/drawing/late-connections";
import type { CursorAt } from "@/app/_components/drawing/text-connections";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Tabs } from "@/app/_components/ui/tabs";

interface Props {
  /** What stands under the first tab. */
  readonly preview: ReactNode;
  /** Which tab is open. */
  readonly side: "preview" | "connections";
  readonly onSide: (side: string) => void;
  readonly text: string;
  readonly cursor: CursorAt | null;
  readonly editor: RefObject<EditorHandle | null>;
}

/** Beside the text: what it would give, or what it connects. */
export function SheetSide({ preview, side, onSide, text, cursor, editor }: Props) {
  useDeeds(
    "here",
    [
      side === "preview"
        ? {
            id: "connections",
            words: "Show the connections",
            also: "drawing nets parts",
            does: () => onSide("connections"),
          }
        : { id: "preview", words: "Show the preview", also: "curves knobs", does: () => onSide("preview") },
    ],
    1,
  );
  return (
    <Tabs
      label="Beside the text"
      value={side}
      onChange={onSide}
      tabs={[
        { value: "preview", label: "Preview", content: preview },
        {
          value: "connections",
          label: "Connections",
          content: <LateConnections text={text} cursor={cursor} editor={editor} />,
        },
      ]}
    />
  );
}
