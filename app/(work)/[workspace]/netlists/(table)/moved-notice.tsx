"use client";

import Link from "next/link";
import { useEffect, useRef } from "react";
import { Button } from "@/app/_components/ui/button";
import { Notice } from "@/app/_components/ui/notice";
import type { Moved } from "./use-archive";

interface Props {
  readonly workspace: string;
  readonly moved: Moved;
  readonly busy: boolean;
  readonly onUndo: () => void;
  readonly onClose: () => void;
}

/** Says over the list what was just done to it, with the way back. The focus comes here: its row is gone. */
export function MovedNotice({ workspace, moved, busy, onUndo, onClose }: Props) {
  const { row, to, problem } = moved;
  const way = useRef<HTMLButtonElement>(null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: each move has its own way back
  useEffect(() => way.current?.focus(), [moved]);
  if (problem !== null) {
    return (
      <Notice tone="broken" title={`“${row.title}” stays where it is`} announce>
        <p>{problem}</p>
        <Button ref={way} size="small" tone="quiet" className="mt-2" onClick={onClose}>
          Close
        </Button>
      </Notice>
    );
  }
  return (
    <Notice
      tone="holds"
      title={`“${row.title}” is ${to === "archive" ? "archived" : "in the list again"}`}
      announce
    >
      {to === "archive" && <p>Its revisions, its runs and all links to them stay.</p>}
      <div className="mt-2 flex flex-wrap gap-2">
        <Button ref={way} size="small" busy={busy} onClick={onUndo}>
          {busy ? "Undoing…" : "Undo"}
        </Button>
        <Link href={`/${workspace}/netlists/${row.id}`} className="link inline-flex min-h-7 items-center">
          Open it
        </Link>
        <Button size="small" tone="quiet" onClick={onClose}>
          Close
        </Button>
      </div>
    </Notice>
  );
}
