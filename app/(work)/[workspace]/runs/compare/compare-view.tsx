"use client";

import { useRouter } from "next/navigation";
import { useEffect, useState } from "react";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { counted } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { PageHeader } from "@/app/_components/ui/page-header";
import { EmptyState } from "@/app/_components/ui/states";
import { useAddress } from "@/app/_components/ui/use-address";
import { isLive, type RunState } from "../[id]/run-shapes";
import { settingCount } from "../[id]/spread/subjects";
import { ChosenRuns } from "./chosen-runs";
import { type ComparedRun, MOST, nameOf } from "./compare-shapes";
import { readCompareState, writeCompareState } from "./compare-state";
import { ComparedCurves } from "./compared-curves";
import { ComparedReadings } from "./compared-readings";
import { ComparedRequirements } from "./compared-requirements";
import { RunPicker } from "./run-picker";
import { TextDifferences } from "./text-differences";

/** Ms between two looks at runs that are under way. */
const REST = 2000;

interface Props {
  readonly workspace: string;
  readonly runs: readonly ComparedRun[];
  /** Runs that the address names and that there are not. */
  readonly lost: number;
  /** The search part of the address, without the runs. */
  readonly search: string;
}

/** Runs side by side: curves laid over each other or subtracted, readings, requirements, and what their texts say differently. */
export function CompareView({ workspace, runs, lost, search }: Props) {
  const router = useRouter();
  const [state, setState] = useState(() => readCompareState(new URLSearchParams(search)));
  const ids = runs.map(({ run }) => run.id);
  useAddress(writeCompareState(ids, state));
  const isMoving = runs.some(({ run }) => isLive(run.status) || isUnjudged(run));
  useEffect(() => {
    if (!isMoving) return;
    const timer = setInterval(() => router.refresh(), REST);
    return () => clearInterval(timer);
  }, [isMoving, router]);
  const choose = (next: readonly string[]) => {
    // What was chosen of the curves before belongs to other settings now; how they are shown does not.
    const kept = { ...state, families: null, point: null, origin: null, only: null };
    router.replace(`/${workspace}/runs/compare${writeCompareState(next, kept)}`, { scroll: false });
  };
  useDeeds(
    "here",
    runs.length === 0
      ? []
      : (["overlay", "difference"] as const)
          .filter((mode) => mode !== state.mode)
          .map((mode) => ({
            id: mode,
            words:
              mode === "overlay" ? "Lay the curves over each other" : "Show the difference of the curves",
            also: "overlay difference subtract",
            does: () =>
              setState((before) => ({
                ...before,
                mode,
                traces: null,
                families: null,
                only: null,
                point: null,
              })),
          })),
  );
  return (
    <>
      <PageHeader
        title="Compare runs"
        remark={runs.length === 0 ? "None chosen" : counted(runs.length, "run")}
      />
      <div className="grid grow grid-cols-[minmax(0,1fr)] content-start gap-8 px-4 py-4 md:px-6">
        {lost > 0 && (
          <Notice tone="caution" title={`${counted(lost, "run")} of the address could not be found`}>
            <p>It may have been removed, or belong to another workspace. The others are shown.</p>
          </Notice>
        )}
        {runs.length > 0 && <ChosenRuns workspace={workspace} runs={runs} onRuns={choose} />}
        {runs.length < MOST && (
          <RunPicker
            workspace={workspace}
            chosen={ids}
            netlistId={runs[0]?.run.netlistId ?? null}
            open={runs.length < 2}
            onAdd={(id) => choose([...ids, id])}
          />
        )}
        {runs.length === 0 ? (
          <EmptyState title="Choose the runs to compare">
            <p>
              Two or more, of one netlist or of several; or one alone, whose settings are then measured from
              each other.
            </p>
          </EmptyState>
        ) : (
          <>
            <ComparedCurves
              runs={runs}
              state={state}
              onState={(change) => setState((before) => ({ ...before, ...change }))}
            />
            <ComparedRequirements runs={runs} />
            <ComparedReadings
              runs={runs.map((one) => ({
                head: nameOf(one, runs),
                readings: one.run.judgement?.readings ?? [],
                settings: one.settings,
                settingCount: settingCount(one.run.plan.axes),
              }))}
            />
            <TextDifferences runs={runs} workspace={workspace} />
          </>
        )}
      </div>
    </>
  );
}

function isUnjudged({ status, judgement, error }: RunState): boolean {
  return status === "done" && judgement === null && error === null;
}
