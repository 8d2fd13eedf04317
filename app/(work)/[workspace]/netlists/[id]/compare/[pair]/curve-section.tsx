"use client";

import { useQueries } from "@tanstack/react-query";
import Link from "next/link";
import { useMemo } from "react";
import { CurveFigure } from "@/app/_components/curves/curve-figure";
import { curveSet } from "@/app/_components/curves/curve-set";
import type { CurveSource } from "@/app/_components/curves/curve-source";
import { difference } from "@/app/_components/curves/difference";
import { type Overlaid, overlay } from "@/app/_components/curves/overlay";
import { Button } from "@/app/_components/ui/button";
import { FailedState, LoadingState } from "@/app/_components/ui/states";
import { Tabs } from "@/app/_components/ui/tabs";
import { fetchColumns } from "../../../../runs/[id]/fetch-run";
import type { CompareState } from "../../../../runs/compare/compare-state";

interface Props {
  readonly workspace: string;
  readonly before: { readonly revision: number; readonly run: string };
  readonly after: { readonly revision: number; readonly run: string };
  readonly state: CompareState;
  readonly onState: (change: Partial<CompareState>) => void;
}

/** The curves of both revisions over one ruler, or what the later one has over the earlier. */
export function CurveSection({ workspace, before, after, state, onState }: Props) {
  const { data, error, again } = useQueries({
    queries: [before.run, after.run].map((run) => ({
      queryKey: ["run-columns", run],
      queryFn: async () => (await fetchColumns(run, null))!.document,
      staleTime: Number.POSITIVE_INFINITY,
    })),
    combine: (results) => ({
      data: results.map((one) => one.data),
      error: results.find((one) => one.error !== null)?.error ?? null,
      again: () => results.filter((one) => one.error !== null).forEach((one) => void one.refetch()),
    }),
  });
  const [old, now] = data;
  const shown = useMemo(() => {
    if (old === undefined || now === undefined) return null;
    const a = { label: `revision ${before.revision}`, source: old };
    const b = { label: `revision ${after.revision}`, source: now };
    return state.mode === "overlay" ? overlay([a, b]) : difference(a, b);
  }, [old, now, before.revision, after.revision, state.mode]);
  if (error !== null)
    return (
      <FailedState
        title="The curves could not be fetched"
        action={<Button onClick={again}>Try again</Button>}
      >
        <p>{error.message}</p>
      </FailedState>
    );
  const content =
    shown === null ? (
      <LoadingState>Fetching the curves…</LoadingState>
    ) : (
      <Figure shown={shown} revisions={[before.revision, after.revision]} state={state} onState={onState} />
    );
  return (
    <>
      <Tabs
        label="How the curves are compared"
        value={state.mode}
        onChange={(next) =>
          onState({
            mode: next === "difference" ? "difference" : "overlay",
            ...{ traces: null, families: null, only: null, point: null },
          })
        }
        tabs={[
          { value: "overlay", label: "Laid over each other", content },
          { value: "difference", label: "Difference", content },
        ]}
      />
      {old !== undefined && now !== undefined && (
        <p className="mt-3 text-quiet text-sm">
          {apart(old, now, before.revision)}
          {apart(now, old, after.revision)}
          <Link
            href={`/${workspace}/runs/compare?runs=${before.run},${after.run}`}
            prefetch={false}
            className="link inline-block min-h-6"
          >
            Compare these runs with others
          </Link>
        </p>
      )}
    </>
  );
}

function Figure({
  shown,
  revisions,
  state,
  onState,
}: Pick<Props, "state" | "onState"> & {
  readonly shown: Overlaid;
  readonly revisions: readonly [number, number];
}) {
  const set = useMemo(() => ("source" in shown ? curveSet(shown.source) : null), [shown]);
  if ("problem" in shown || set === null) {
    return (
      <p className="border-y py-3 text-quiet text-sm">
        {"problem" in shown ? shown.problem : "There is no curve to show."}
      </p>
    );
  }
  const what = state.mode === "overlay" ? "Curves" : "Difference";
  return (
    <CurveFigure
      set={set}
      name={`${what} of revisions ${revisions[0]} and ${revisions[1]}`}
      view={state}
      onView={onState}
      point={state.point}
      onPoint={(point) => onState({ point })}
      waiting={null}
    />
  );
}

/** What only one of the two shows, as a sentence with a blank behind it; empty where there is nothing. */
function apart(these: CurveSource, those: CurveSource, revision: number): string {
  const names = these.traces
    .filter(({ name, unit }) => !those.traces.some((one) => one.name === name && one.unit === unit))
    .map(({ name }) => name);
  return names.length === 0 ? "" : `Only revision ${revision} shows ${names.join(", ")}. `;
}
