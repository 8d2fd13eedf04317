"use client";

import dynamic from "next/dynamic";
import { type ReactNode, type RefObject, useState } from "react";
import type { CursorAt } from "@/app/_components/drawing/text-connections";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Tabs } from "@/app/_components/ui/tabs";

// Fetched when it is first looked at.
const TextConnections = dynamic(
  () => import("@/app/_components/drawing/text-connections").then((all) => all.TextConnections),
  {
    ssr: false,
    loading: () => <p className="border-y py-3 text-quiet text-sm">The drawing is coming…</p>,
  },
);

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
  useDeeds(
    "here",
    [
      tab === "preview"
        ? {
            id: "connections",
            words: "Show the connections",
            also: "drawing nets parts",
            does: () => setTab("connections"),
          }
        : { id: "preview", words: "Show the preview", also: "curves knobs", does: () => setTab("preview") },
    ],
    1,
  );
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
          content: <TextConnections text={text} cursor={cursor} editor={editor} />,
        },
      ]}
    />
  );
}
