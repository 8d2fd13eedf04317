"use client";

import { type RefObject, useEffect, useState } from "react";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";
import { namesAt } from "./chosen";
import { ConnectionDrawing } from "./connection-drawing";
import { useConnections } from "./use-connections";

/** Where the cursor rests in the text, and the names that what stands there has in the circuit. */
export interface CursorAt {
  readonly offset: number;
  readonly names: readonly string[];
}

interface Props {
  readonly text: string;
  readonly cursor: CursorAt | null;
  readonly editor: RefObject<EditorHandle | null>;
}

/** The drawing of the text's connections, linked both ways: what is chosen in it is shown in the text, and the cursor is marked in it. */
export function TextConnections({ text, cursor, editor }: Props) {
  const connections = useConnections(text);
  const [chosen, setChosen] = useState<readonly string[]>([]);
  useEffect(() => {
    if (connections !== null && cursor !== null) {
      setChosen(namesAt(connections, cursor.offset, cursor.names));
    }
  }, [connections, cursor]);
  // A mark in the text is of the drawing, and goes with it.
  useEffect(() => () => editor.current?.show(null), [editor]);
  return (
    <section aria-label="Connections" className="h-[max(420px,calc(100dvh-300px))]">
      <ConnectionDrawing
        connections={connections}
        chosen={chosen}
        onChoose={(name, span) => {
          setChosen([name]);
          editor.current?.show(span);
        }}
      />
    </section>
  );
}
