"use client";

import { useCallback, useEffect, useState } from "react";
import type { DiffForm } from "@/app/_components/diff/text-diff";
import { PageHeader } from "@/app/_components/ui/page-header";
import type { TextChanges } from "@/lib/language/changes/of-texts";
import {
  type CompareState,
  readCompareState,
  writeCompareState,
} from "../../../../runs/compare/compare-state";
import { ComparedReadings } from "../../../../runs/compare/compared-readings";
import { CompareActions } from "./compare-actions";
import { formIn, type Side } from "./compare-shapes";
import { CurveSection } from "./curve-section";
import { RunLack } from "./run-lack";
import { SideFacts } from "./side-facts";
import { TextSection } from "./text-section";
import { VerdictTable } from "./verdict-table";
import { WhatChanged } from "./what-changed";

interface Props {
  readonly workspace: string;
  readonly netlist: { readonly id: string; readonly title: string; readonly latest: number };
  readonly before: Side;
  readonly after: Side;
  readonly changes: TextChanges;
  /** The search part of the address the page was asked for with. */
  readonly search: string;
  readonly mayRun: boolean;
}

/** Two revisions: what changed in words, how the verdicts turned, the curves over one another, the text line by line. */
export function CompareView({ workspace, netlist, before, after, changes, search, mayRun }: Props) {
  const [state, setState] = useState(() => readCompareState(new URLSearchParams(search)));
  const [form, setForm] = useState<DiffForm | null>(() => formIn(search));
  const show = useCallback((change: Partial<CompareState>) => setState((now) => ({ ...now, ...change })), []);
  useEffect(() => {
    const curves = writeCompareState([], state);
    const text = form === null ? "" : `${curves === "" ? "?" : "&"}text=${form}`;
    if (curves + text !== window.location.search)
      window.history.replaceState(null, "", curves + text || window.location.pathname);
  }, [state, form]);

  const labels = [`Revision ${before.number}`, `Revision ${after.number}`] as const;
  const runs = before.run !== null && after.run !== null ? { old: before.run, now: after.run } : null;
  return (
    <>
      <PageHeader
        title={netlist.title}
        remark={`revision ${before.number} compared with revision ${after.number}`}
        actions={
          <CompareActions workspace={workspace} netlist={netlist} pair={[before.number, after.number]} />
        }
      />
      <div className="grid grid-cols-[minmax(0,1fr)] border-b md:grid-cols-2">
        <SideFacts workspace={workspace} netlistId={netlist.id} side={before} word="Before" />
        <SideFacts workspace={workspace} netlistId={netlist.id} side={after} word="After" edge />
      </div>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-10 px-4 py-6 md:px-6">
        <div className="grid grid-cols-[minmax(0,1fr)] content-start gap-x-12 gap-y-8 lg:grid-cols-2">
          <section aria-labelledby="changed" className="min-w-0">
            <WhatChanged found={changes} names={labels} />
          </section>
          <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-8">
            <section aria-labelledby="verdicts">
              <h2 id="verdicts" className="caption">
                Verdicts{" "}
                {runs !== null && (
                  <span className="ml-2 font-normal">
                    of run {runs.old.number} and run {runs.now.number}
                  </span>
                )}
              </h2>
              <div className="mt-2">
                {runs === null ? (
                  <RunLack
                    workspace={workspace}
                    netlistId={netlist.id}
                    sides={[
                      { side: before, errors: changes.errors.before },
                      { side: after, errors: changes.errors.after },
                    ]}
                    mayRun={mayRun}
                  />
                ) : runs.old.isJudged && runs.now.isJudged ? (
                  <VerdictTable before={runs.old} after={runs.now} labels={labels} />
                ) : (
                  <p className="border-y py-3 text-quiet text-sm">
                    A run has just finished and is being judged. Load the page again in a moment.
                  </p>
                )}
              </div>
            </section>
            {runs !== null && (
              <ComparedReadings
                runs={[runs.old, runs.now].map(({ readings, settings, settingCount }, side) => ({
                  head: labels[side]!,
                  readings,
                  settings,
                  settingCount,
                }))}
              />
            )}
          </div>
        </div>
        {runs !== null && (
          <section aria-labelledby="curves" className="min-w-0">
            <h2 id="curves" className="caption">
              Curves <span className="ml-2 font-normal">nominal, of the latest finished run of each</span>
            </h2>
            <div className="mt-3">
              <CurveSection
                workspace={workspace}
                before={{ revision: before.number, run: runs.old.id }}
                after={{ revision: after.number, run: runs.now.id }}
                state={state}
                onState={show}
              />
            </div>
          </section>
        )}
        <TextSection texts={[before.text, after.text]} labels={labels} form={form} onForm={setForm} />
      </div>
    </>
  );
}
