"use client";

import { useQuery } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { PageHeader } from "@/app/_components/ui/page-header";
import { Pager } from "@/app/_components/ui/pager";
import { ask } from "../ask";
import { REVISIONS_SHOWN, type RevisionLines } from "./revision-line";
import { RevisionRow } from "./revision-row";

interface Props {
  readonly workspace: string;
  readonly netlist: { readonly id: string; readonly number: number; readonly title: string };
  readonly page: number;
  readonly first: RevisionLines;
}

/** The history of a netlist: every revision with what changed in it and how its latest run came out; any two can be compared. */
export function RevisionsView({ workspace, netlist, page, first }: Props) {
  const router = useRouter();
  const base = `/${workspace}/netlists/${netlist.id}`;
  const [chosen, setChosen] = useState<readonly number[]>([]);
  const { data, error, refetch } = useQuery({
    queryKey: ["revisions", netlist.id, page],
    initialData: first,
    queryFn: async () => {
      const search = new URLSearchParams({ page: String(page), size: String(REVISIONS_SHOWN) });
      const answer = await ask<RevisionLines>(`/api/v1/netlists/${netlist.id}/revisions?${search}`);
      if (!answer.ok) throw new Error(answer.detail);
      return answer.body;
    },
    refetchInterval: (query) =>
      query.state.data?.rows.some(({ lastRun }) => isMoving(lastRun?.status)) ? 2000 : false,
  });
  const [older, newer] = [...chosen].sort((a, b) => a - b);
  const ready = older !== undefined && newer !== undefined;
  const choose = (number: number, isChosen: boolean) =>
    setChosen((before) =>
      isChosen ? [...before.slice(-1), number] : before.filter((other) => other !== number),
    );

  useDeeds("here", [
    { id: "sheet", words: "Open sheet", also: "netlist text edit", does: base },
    ...(data.total > 1
      ? [
          {
            id: "compare",
            words: `Compare the newest two, ${data.total - 1} with ${data.total}`,
            also: "difference changes",
            does: `${base}/compare/${data.total - 1}..${data.total}`,
          },
        ]
      : []),
  ]);

  return (
    <>
      <PageHeader
        title={netlist.title}
        remark={`history, ${counted(data.total, "revision")}, netlist ${netlist.number}`}
        actions={<ButtonLink href={base}>Open sheet</ButtonLink>}
      />
      <div className="grid gap-4 px-4 py-4 md:px-6">
        {error !== null && (
          <Notice tone="caution" title="This list may be out of date" announce>
            <p>{error.message}</p>
            <Button size="small" className="mt-2" onClick={() => refetch()}>
              Try again
            </Button>
          </Notice>
        )}
        {data.total > 1 ? (
          <div className="flex flex-wrap items-center gap-x-4 gap-y-2" data-print="never">
            <p className="text-quiet text-sm" aria-live="polite">
              {ready
                ? `Revisions ${older} and ${newer} are chosen`
                : chosen.length === 1
                  ? `Revision ${chosen[0]} is chosen; choose another to compare it with`
                  : "Choose two revisions to compare them"}
            </p>
            <Button
              size="small"
              disabled={!ready}
              onClick={() => router.push(`${base}/compare/${older}..${newer}`)}
            >
              {ready ? `Compare ${older} with ${newer}` : "Compare"}
            </Button>
          </div>
        ) : (
          <p className="text-quiet text-sm">
            There is one revision so far. Each time the text is saved or queued with changes, another one is
            added here; none is ever changed.
          </p>
        )}
        <ol className="border-t">
          {data.rows.map((row) => (
            <RevisionRow
              key={row.number}
              base={base}
              runs={`/${workspace}/runs`}
              row={row}
              isNewest={row.number === data.total}
              isChosen={chosen.includes(row.number)}
              mayChoose={data.total > 1}
              onChoose={choose}
            />
          ))}
        </ol>
        {data.total > REVISIONS_SHOWN && (
          <Pager
            label="Pages of the history"
            page={page}
            size={REVISIONS_SHOWN}
            total={data.total}
            onPage={(next) =>
              router.push(next === 1 ? `${base}/revisions` : `${base}/revisions?page=${next}`)
            }
          />
        )}
      </div>
    </>
  );
}

function isMoving(status: string | undefined): boolean {
  return status === "queued" || status === "running";
}
