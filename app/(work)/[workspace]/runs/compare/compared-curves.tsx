"use client";

import { useQueries } from "@tanstack/react-query";
import { useMemo } from "react";
import { CurveFigure } from "@/app/_components/curves/curve-figure";
import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";
import { Button } from "@/app/_components/ui/button";
import { SelectField } from "@/app/_components/ui/field";
import { FailedState, LoadingState } from "@/app/_components/ui/states";
import { Tabs } from "@/app/_components/ui/tabs";
import { fetchColumns } from "../[id]/fetch-run";
import { isLive } from "../[id]/run-shapes";
import type { ComparedRun } from "./compare-shapes";
import type { CompareState } from "./compare-state";
import { type Comparison, laidOver, settingsIn, subtracted } from "./comparison";

interface Props {
  readonly runs: readonly ComparedRun[];
  readonly state: CompareState;
  readonly onState: (change: Partial<CompareState>) => void;
}

const NO_CURVES: CurveSource = { axes: [], traces: [], points: { outcome: [] } };

/** The curves of all runs on one ruler, or less those of the first; what cannot be laid over each other is said. */
export function ComparedCurves({ runs, state, onState }: Props) {
  const documents = useQueries({
    queries: runs.map(({ run }) => ({
      queryKey: ["run-columns", run.id],
      queryFn: async () => (await fetchColumns(run.id, null))!.document,
      staleTime: isLive(run.status) ? 0 : Number.POSITIVE_INFINITY,
      refetchInterval: isLive(run.status) ? 2000 : (false as const),
    })),
    combine: (results) => ({
      data: results.map(({ data }) => data),
      error: results.find(({ error }) => error !== null)?.error ?? null,
      again: () => results.filter(({ error }) => error !== null).forEach(({ refetch }) => void refetch()),
    }),
  });
  const { data, error, again } = documents;
  const layers = useMemo(
    () =>
      runs.flatMap(({ letter }, k) => {
        const source = data[k];
        return source === undefined ? [] : [{ label: letter, source }];
      }),
    [runs, data],
  );
  const first = runs[0]!;
  const { mode, origin } = state;
  const settings = useMemo(() => (layers[0] === undefined ? [] : settingsIn(layers[0].source)), [layers]);
  const alone = runs.length === 1 ? (settings[0] ?? null) : null;
  const from = origin !== null && settings.includes(origin) ? origin : alone;
  const shown = useMemo(
    () => (mode === "difference" ? subtracted(layers, from) : laidOver(layers)),
    [mode, layers, from],
  );
  if (error !== null)
    return (
      <FailedState
        title="The curves could not be fetched"
        action={<Button onClick={again}>Try again</Button>}
      >
        <p>{error.message}</p>
      </FailedState>
    );
  const isComplete = data.every((one) => one !== undefined);
  return (
    <section aria-labelledby="curves">
      <h2 id="curves" className="sr-only">
        Curves
      </h2>
      <Tabs
        label="How curves are compared"
        value={mode}
        onChange={(next) =>
          onState({
            mode: next === "difference" ? "difference" : "overlay",
            traces: null,
            families: null,
            only: null,
            point: null,
          })
        }
        tabs={[
          {
            value: "overlay",
            label: "Laid over each other",
            content: (
              <Figure
                {...figureOf(shown, "Curves of the runs")}
                state={state}
                onState={onState}
                complete={isComplete}
              />
            ),
          },
          {
            value: "difference",
            label: "Difference",
            content: (
              <div className="grid gap-3">
                <Measured runs={runs} settings={settings} origin={from} onState={onState} />
                <Figure
                  {...figureOf(shown, `Differences from run ${first.letter}`)}
                  state={state}
                  onState={onState}
                  complete={isComplete}
                />
              </div>
            ),
          },
        ]}
      />
    </section>
  );
}

function figureOf({ source, apart }: Comparison, name: string) {
  return { source: source ?? NO_CURVES, apart, name };
}

function Figure({
  source,
  apart,
  name,
  state,
  onState,
  complete,
}: {
  readonly source: CurveSource;
  readonly apart: readonly string[];
  readonly name: string;
  readonly state: CompareState;
  readonly onState: Props["onState"];
  readonly complete: boolean;
}) {
  const set = useMemo(() => curveSet(source), [source]);
  if (!complete) return <LoadingState>Fetching the curves…</LoadingState>;
  return (
    <div className="grid gap-4">
      {set === null ? (
        <p className="border-y py-6 text-quiet text-sm">There is no curve to show.</p>
      ) : (
        <CurveFigure
          set={set}
          name={name}
          view={state}
          onView={onState}
          point={state.point}
          onPoint={(point) => onState({ point })}
          waiting={null}
        />
      )}
      {apart.length > 0 && (
        <div className="max-w-prose text-sm" data-apart={apart.length}>
          <h3 className="caption">What to bear in mind</h3>
          <ul className="mt-1 list-disc pl-5 text-quiet">
            {[...new Set(apart)].map((words) => (
              <li key={words}>{words}</li>
            ))}
          </ul>
        </div>
      )}
    </div>
  );
}

function Measured({
  runs,
  settings,
  origin,
  onState,
}: {
  readonly runs: readonly ComparedRun[];
  readonly settings: readonly string[];
  readonly origin: string | null;
  readonly onState: Props["onState"];
}) {
  const first = runs[0]!;
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2 text-sm">
      <span>
        Each curve less run {first.letter}
        {settings.length > 1 ? " at" : ""}
      </span>
      {settings.length > 1 && (
        <SelectField
          label="Setting that is subtracted"
          labelHidden
          value={origin ?? ""}
          onChange={({ target }) => onState({ origin: target.value || null, families: null, point: null })}
        >
          {runs.length > 1 && <option value="">the same setting</option>}
          {settings.map((setting) => (
            <option key={setting}>{setting}</option>
          ))}
        </SelectField>
      )}
    </div>
  );
}
