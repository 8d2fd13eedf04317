"use client";

import { useState } from "react";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Button } from "@/app/_components/ui/button";
import { Notice } from "@/app/_components/ui/notice";
import { ask } from "./ask";

interface Props {
  readonly netlistId: string;
  readonly isArchived: boolean;
  readonly mayWrite: boolean;
}

/** Says of an archived netlist that it is one, with the way back; archives one that is not, by "Find or do…". */
export function ArchivedNotice({ netlistId, isArchived, mayWrite }: Props) {
  const [archived, setArchived] = useState(isArchived);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const move = async (to: "archive" | "bring-back") => {
    if (busy) return;
    setBusy(true);
    const answer = await ask<{ archived: boolean }>(`/api/v1/netlists/${netlistId}/${to}`, {});
    setBusy(false);
    setProblem(answer.ok ? null : answer.detail);
    if (answer.ok) setArchived(answer.body.archived);
  };
  useDeeds(
    "here",
    mayWrite
      ? [
          archived
            ? {
                id: "bring back",
                words: "Bring the netlist back",
                also: "archive undo",
                does: () => void move("bring-back"),
              }
            : {
                id: "archive",
                words: "Archive the netlist",
                also: "delete remove away",
                does: () => void move("archive"),
              },
        ]
      : [],
    3,
  );
  if (!archived && problem === null) return null;
  return (
    <div className="border-b px-4 py-3 md:px-6" data-print="never">
      <Notice
        tone={problem === null ? "caution" : "broken"}
        title={problem === null ? "This netlist is archived" : "The netlist stays where it is"}
        announce={archived !== isArchived || problem !== null}
      >
        <p>{problem ?? "It stands in no list. Its revisions, its runs and all links to them stay."}</p>
        {mayWrite && (
          <div className="mt-2">
            {archived ? (
              <Button size="small" busy={busy} onClick={() => void move("bring-back")}>
                Bring it back
              </Button>
            ) : (
              <Button size="small" tone="quiet" onClick={() => setProblem(null)}>
                Close
              </Button>
            )}
          </div>
        )}
      </Notice>
    </div>
  );
}
