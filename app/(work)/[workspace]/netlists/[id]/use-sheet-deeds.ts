"use client";

import { usePathname } from "next/navigation";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import type { Deed } from "@/app/_components/palette/deeds";
import type { SheetState } from "./use-sheet";

/** What the sheet offers under "Find or do…": what its buttons do, and its ways on. */
export function useSheetDeeds(sheet: SheetState, mayWrite: boolean): void {
  const path = usePathname();
  const { saved, changed, editor } = sheet;
  const writing: Deed[] = [
    {
      id: "queue",
      words: "Queue run",
      also: "start solve simulate sweep",
      keys: "Ctrl ↵",
      does: () => void sheet.queue(),
    },
    ...(changed
      ? [
          {
            id: "save",
            words: "Save revision",
            also: "keep message",
            keys: "Ctrl S",
            does: () => sheet.openSave(true),
          },
        ]
      : []),
    {
      id: "format",
      words: "Format the text",
      also: "tidy layout",
      keys: "Shift Alt F",
      does: () => editor.current?.format(),
    },
  ];
  useDeeds("here", [
    ...(mayWrite ? writing : []),
    {
      id: "outline",
      words: "Outline of the text",
      also: "jump statements names",
      keys: "Ctrl Shift O",
      does: () => editor.current?.openOutline(),
    },
    { id: "history", words: "History", also: "revisions", does: `${path}/revisions` },
    {
      id: "revision",
      words: `Revision ${saved.revision} to read, duplicate or restore`,
      does: `${path}/revisions/${saved.revision}`,
    },
    ...(saved.revision > 1
      ? [
          {
            id: "compare",
            words: `Compare revision ${saved.revision - 1} with ${saved.revision}`,
            also: "difference changes",
            does: `${path}/compare/${saved.revision - 1}..${saved.revision}`,
          },
        ]
      : []),
  ]);
}
