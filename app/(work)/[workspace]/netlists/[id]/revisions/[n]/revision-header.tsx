"use client";

import Link from "next/link";
import { useEffect, useRef } from "react";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { Menu, MenuLink } from "@/app/_components/ui/menu";
import { Notice } from "@/app/_components/ui/notice";
import { PageHeader } from "@/app/_components/ui/page-header";
import type { Role } from "@/lib/permissions/actor";
import { shortHash } from "../../saved";
import type { NetlistFacts, RevisionFacts } from "./revision-shapes";
import { useRevisionDeeds } from "./use-revision-deeds";

interface Props {
  readonly workspace: string;
  readonly netlist: NetlistFacts;
  readonly revision: RevisionFacts;
  readonly mayWrite: boolean;
  readonly mayRun: boolean;
  readonly role: Role;
}

/** Others that a revision is offered to be compared with, beside the newest and its neighbours. */
const OFFERED = 8;

/** What revision this is, and what can be done with it; what came of it stands below, with its undo. */
export function RevisionHeader({ workspace, netlist, revision, mayWrite, mayRun, role }: Props) {
  const deeds = useRevisionDeeds(workspace, netlist, revision.number);
  const base = `/${workspace}/netlists/${netlist.id}`;
  const { number, hash } = revision;
  const isNewest = number === netlist.latest;
  const isLikeNewest = hash === netlist.latestHash;
  const { busy, remark } = deeds;
  const answer = useRef<HTMLDivElement>(null);
  // The button that was pressed may be gone by now, and the focus with it.
  // biome-ignore lint/correctness/useExhaustiveDependencies: both are what makes buttons come and go
  useEffect(() => {
    if (document.activeElement === document.body) answer.current?.querySelector("button")?.focus();
  }, [remark, isLikeNewest]);
  useDeeds("here", [
    { id: "sheet", words: "Open sheet", also: "netlist text edit", does: base },
    { id: "history", words: "History", also: "revisions", does: `${base}/revisions` },
    ...(mayWrite
      ? [
          {
            id: "duplicate",
            words: "Duplicate",
            also: "copy new netlist",
            does: () => void deeds.duplicate(),
          },
        ]
      : []),
    ...(mayWrite && !isLikeNewest
      ? [
          {
            id: "restore",
            words: `Restore revision ${number}`,
            also: "back",
            does: () => void deeds.restore(),
          },
        ]
      : []),
    ...(mayRun
      ? [{ id: "queue", words: "Queue run", also: "start solve sweep", does: () => void deeds.queue() }]
      : []),
    ...(isNewest
      ? []
      : [
          {
            id: "compare",
            words: `Compare with the newest, revision ${netlist.latest}`,
            also: "difference changes",
            does: `${base}/compare/${number}..${netlist.latest}`,
          },
        ]),
  ]);
  return (
    <>
      <PageHeader
        title={netlist.title}
        remark={
          <>
            revision {number}
            {isNewest ? ", the newest" : ` of ${netlist.latest}`},{" "}
            <code title={`Hash of the text: ${hash}`}>{shortHash(hash)}</code>
          </>
        }
        actions={
          <>
            {!mayWrite && (
              <p className="text-quiet text-sm">As {role} you read revisions and compare them.</p>
            )}
            <ButtonLink href={`${base}/revisions`}>History</ButtonLink>
            {netlist.latest > 1 && (
              <Menu trigger={<Button>Compare with…</Button>}>
                {othersOf(number, netlist.latest).map((other) => (
                  <MenuLink
                    key={other}
                    href={`${base}/compare/${Math.min(other, number)}..${Math.max(other, number)}`}
                  >
                    Revision {other}
                    {other === netlist.latest && ", the newest"}
                  </MenuLink>
                ))}
              </Menu>
            )}
            {mayWrite && (
              <>
                <Button busy={busy === "duplicating"} onClick={() => void deeds.duplicate()}>
                  {busy === "duplicating" ? "Duplicating…" : "Duplicate"}
                </Button>
                {!isLikeNewest && (
                  <Button busy={busy === "restoring"} onClick={() => void deeds.restore()}>
                    {busy === "restoring" ? "Restoring…" : "Restore"}
                  </Button>
                )}
              </>
            )}
            {mayRun && (
              <Button busy={busy === "queueing"} onClick={() => void deeds.queue()}>
                {busy === "queueing" ? "Queueing…" : "Queue run"}
              </Button>
            )}
            <ButtonLink href={base} tone={isNewest ? "primary" : "plain"}>
              Open sheet
            </ButtonLink>
          </>
        }
      />
      {remark !== null && (
        <div ref={answer} className="px-4 pt-4 md:px-6" data-print="never">
          <Notice tone={remark.tone} title={remark.title} announce>
            <p>{remark.detail}</p>
            <div className="mt-2 flex flex-wrap gap-2">
              {remark.undo !== undefined && (
                <Button size="small" busy={busy === "undoing"} onClick={() => void deeds.undo()}>
                  {busy === "undoing" ? "Undoing…" : "Undo"}
                </Button>
              )}
              {remark.link !== undefined && (
                <Link href={remark.link.href} className="link inline-flex min-h-7 items-center">
                  {remark.link.label}
                </Link>
              )}
              <Button size="small" tone="quiet" onClick={deeds.close}>
                Close
              </Button>
            </div>
          </Notice>
        </div>
      )}
    </>
  );
}

/** The newest first, then those around `number`. */
function othersOf(number: number, latest: number): number[] {
  const around = Array.from({ length: latest }, (_, k) => k + 1)
    .filter((other) => other !== number && other !== latest)
    .sort((a, b) => Math.abs(a - number) - Math.abs(b - number))
    .slice(0, OFFERED)
    .sort((a, b) => b - a);
  return number === latest ? around : [latest, ...around];
}
