"use client";

import { useRouter } from "next/navigation";
import { useEffect, useMemo, useState } from "react";
import type { DiffForm } from "@/app/_components/diff/text-diff";
import { ButtonLink } from "@/app/_components/ui/button";
import { SelectField } from "@/app/_components/ui/field";
import { PageHeader } from "@/app/_components/ui/page-header";
import { EmptyState, FailedState, LoadingState } from "@/app/_components/ui/states";
import { When } from "@/app/_components/ui/when";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import type { Draft } from "../../drafts";
import { formIn, type Side } from "./compare-shapes";
import { SideFacts } from "./side-facts";
import { TextSection } from "./text-section";
import { useNewestDraft } from "./use-newest-draft";
import { WhatChanged } from "./what-changed";

interface Props {
  readonly workspace: string;
  readonly netlist: { readonly id: string; readonly title: string; readonly latest: number };
  readonly before: Side;
  /** Whose drafts of this browser are meant. */
  readonly writer: string;
  /** The search part of the address the page was asked for with. */
  readonly search: string;
}

/** A revision beside the draft upon it that is in no revision yet. It is on this machine alone, so the page finds it in the browser. */
export function DraftView({ workspace, netlist, before, writer, search }: Props) {
  const router = useRouter();
  const base = `/${workspace}/netlists/${netlist.id}`;
  const found = useNewestDraft(netlist.id, writer);
  const sheet = <ButtonLink href={base}>Open sheet</ButtonLink>;
  const all = Array.from({ length: netlist.latest }, (_, k) => netlist.latest - k);
  return (
    <>
      <PageHeader
        title={netlist.title}
        remark={`revision ${before.number} compared with your draft`}
        actions={
          <>
            <SelectField
              label="Before"
              labelHidden
              value={before.number}
              onChange={(event) => router.push(`${base}/compare/${event.target.value}..draft`)}
            >
              {all.map((number) => (
                <option key={number} value={number}>
                  Revision {number}
                </option>
              ))}
            </SelectField>
            <ButtonLink href={`${base}/revisions`}>History</ButtonLink>
            {sheet}
          </>
        }
      />
      {found.state === "looking" && (
        <div className="px-4 md:px-6">
          <LoadingState>Looking for your draft in this browser…</LoadingState>
        </div>
      )}
      {found.state === "none" && (
        <div className="px-4 py-6 md:px-6">
          <EmptyState title="This browser keeps no draft of this netlist" action={sheet}>
            <p>
              A draft is what you have typed into the sheet and not saved. It stays on the machine and in the
              browser it was typed in, for you alone; saved or dropped, it is gone from here.
            </p>
          </EmptyState>
        </div>
      )}
      {found.state === "no store" && (
        <div className="px-4 py-6 md:px-6">
          <FailedState title="The drafts of this browser could not be read" action={sheet}>
            <p>
              Your browser keeps nothing for this page, as in a private window. Save the draft as a revision
              to compare it.
            </p>
          </FailedState>
        </div>
      )}
      {found.state === "found" && (
        <Compared
          workspace={workspace}
          netlistId={netlist.id}
          before={before}
          draft={found.draft}
          others={found.others}
          search={search}
        />
      )}
    </>
  );
}

function Compared({
  workspace,
  netlistId,
  before,
  draft,
  others,
  search,
}: {
  readonly workspace: string;
  readonly netlistId: string;
  readonly before: Side;
  readonly draft: Draft;
  readonly others: number;
  readonly search: string;
}) {
  const [form, setForm] = useState<DiffForm | null>(() => formIn(search));
  const changes = useMemo(() => changesOfTexts(before.text, draft.text), [before.text, draft.text]);
  useEffect(() => {
    const wanted = form === null ? "" : `?text=${form}`;
    if (wanted !== window.location.search)
      window.history.replaceState(null, "", wanted || window.location.pathname);
  }, [form]);
  const labels = [`Revision ${before.number}`, "Your draft"] as const;
  return (
    <>
      <div className="grid grid-cols-[minmax(0,1fr)] border-b md:grid-cols-2">
        <SideFacts workspace={workspace} netlistId={netlistId} side={before} word="Before" />
        <section
          aria-label="After: your draft"
          className="min-w-0 border-t px-4 py-3 md:border-t-0 md:border-l md:px-6"
        >
          <p className="flex flex-wrap items-baseline gap-x-3">
            <span className="caption">After</span>
            <span className="font-semibold text-sm leading-6">Your draft</span>
          </p>
          <p className="text-quiet text-xs">
            In this browser alone, upon revision {draft.base}, last typed <When iso={draft.at} />
            {others > 0 &&
              `; the newest of ${others + 1}, the others come back one by one where the sheet offers them`}
          </p>
        </section>
      </div>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-10 px-4 py-6 md:px-6">
        <section aria-labelledby="changed" className="min-w-0">
          <WhatChanged found={changes} names={labels} />
          <p className="mt-3 text-quiet text-sm">
            A draft has no run. Queue it from the sheet, and its verdicts and curves can be compared too.
          </p>
        </section>
        <TextSection texts={[before.text, draft.text]} labels={labels} form={form} onForm={setForm} />
      </div>
    </>
  );
}
