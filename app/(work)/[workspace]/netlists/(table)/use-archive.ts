"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { ask } from "../[id]/ask";
import type { NetlistRow } from "./use-netlists";

/** What came of the last move out of the list or back into it. */
export interface Moved {
  readonly row: NetlistRow;
  readonly to: "archive" | "bring-back";
  /** Why it was not done; null when it was. */
  readonly problem: string | null;
}

/** Takes netlists out of the list and puts them back. Nothing is asked before: each move is undone by the other. */
export function useArchive(workspace: string) {
  const queries = useQueryClient();
  const [moved, setMoved] = useState<Moved | null>(null);
  const [busy, setBusy] = useState(false);
  const move = async (row: NetlistRow, to: Moved["to"]) => {
    if (busy) return;
    setBusy(true);
    const answer = await ask(`/api/v1/netlists/${row.id}/${to}`, {});
    if (answer.ok) await queries.invalidateQueries({ queryKey: ["netlists", workspace] });
    setBusy(false);
    setMoved({ row, to, problem: answer.ok ? null : answer.detail });
  };
  return { moved, busy, move, close: () => setMoved(null) };
}
