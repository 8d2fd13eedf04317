"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { ask } from "../../ask";
import type { Side } from "./compare-shapes";

interface Props {
  readonly workspace: string;
  readonly netlistId: string;
  /** Each with the number of errors in its text, with which it cannot run. */
  readonly sides: readonly { readonly side: Side; readonly errors: number }[];
  readonly mayRun: boolean;
}

/** Why there are no verdicts and no curves to compare, and the way to have them. */
export function RunLack({ workspace, netlistId, sides, mayRun }: Props) {
  const router = useRouter();
  const [busy, setBusy] = useState<number | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const queue = async (number: number) => {
    setBusy(number);
    setProblem(null);
    const answer = await ask<{ id: string }>("/api/v1/runs", { netlistId, base: number });
    setBusy(null);
    if (answer.ok) router.push(`/${workspace}/runs/${answer.body.id}`);
    else setProblem(answer.detail);
  };
  return (
    <div className="grid gap-3">
      <ul className="border-t">
        {sides
          .filter(({ side }) => side.run === null)
          .map(({ side, errors }) => (
            <li
              key={side.number}
              className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 border-b py-2.5"
            >
              <p className="min-w-0 text-sm">{lackOf(side, errors)}</p>
              {mayRun && errors === 0 && !isMoving(side) && (
                <Button size="small" busy={busy === side.number} onClick={() => void queue(side.number)}>
                  {busy === side.number ? "Queueing…" : `Queue revision ${side.number}`}
                </Button>
              )}
            </li>
          ))}
      </ul>
      <p className="text-quiet text-sm">Verdicts and curves stand here when both have run.</p>
      {problem !== null && (
        <Notice tone="broken" title="The run was not queued" announce>
          <p>{problem}</p>
        </Notice>
      )}
    </div>
  );
}

function isMoving({ newest }: Side): boolean {
  return newest?.status === "queued" || newest?.status === "running";
}

function lackOf({ number, newest }: Side, errors: number): string {
  if (errors > 0) return `Revision ${number} has ${counted(errors, "error")} to mend before it can run.`;
  if (newest === null) return `Revision ${number} was never run.`;
  switch (newest.status) {
    case "failed":
      return `Run ${newest.number} of revision ${number} failed. ${newest.error ?? ""}`.trim();
    case "cancelled":
      return `Run ${newest.number} of revision ${number} was cancelled.`;
    default:
      return `Run ${newest.number} of revision ${number} is ${newest.status}; load the page again when it has finished.`;
  }
}
