"use client";

import { type ReactNode, type RefObject, useEffect, useState } from "react";
import { namesAt } from "@/app/_components/drawing/chosen";
import { ConnectionDrawing } from "@/app/_components/drawing/connection-drawing";
import { useConnections } from "@/app/_components/drawing/use-connections";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";
import { Tabs } from "@/app/_components/ui/tabs";

/** Where the cursor rests in the text, and the names that what stands there has in the circuit. */
export interface CursorAt {
  readonly offset: number;
  readonly names: readonly string[];
}

interface Props {
  /** What stands under the first tab. */
  readonly preview: ReactNode;
  readonly text: string;
  readonly cursor: CursorAt | null;
  readonly editor: RefObject<EditorHandle | null>;
}

/** Beside the text: what it would give, or what it connects. */
export function SheetSide({ preview, text, cursor, editor }: Props) {
  const [tab, setTab] = useState("preview");
  return (
    <Tabs
      label="Beside the text"
      value={tab}
      onChange={setTab}
      tabs={[
        { value: "preview", label: "Preview", content: preview },
        {
          value: "connections",
          label: "Connections",
          content: <SheetConnections text={text} cursor={cursor} editor={editor} />,
        },
      ]}
    />
  );
}

/** The drawing of the text's connections, linked both ways: what is chosen in it is shown in the text, and the cursor is marked in it. */
function SheetConnections({ text, cursor, editor }: Omit<Props, "preview">) {
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
