"use client";

import { useRouter } from "next/navigation";
import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { CurveFigure } from "@/app/_components/curves/curve-figure";
import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";
import { NumberTable } from "@/app/_components/curves/number-table";
import { Notice } from "@/app/_components/ui/notice";
import { Tabs } from "@/app/_components/ui/tabs";
import { useAddress } from "@/app/_components/ui/use-address";
import { allowedBands } from "@/lib/analyses/allowed-bands";
import type { VoltageSpan } from "./cautions";
import { OperatingPoint } from "./operating-point";
import { type PageState, readPageState, writePageState } from "./page-state";
import { RunHeader } from "./run-header";
import { onPlot, type Found as RunFound, RunPanels, RunVerdicts } from "./run-panels";
import { isLive, type PointAccount, type RunContext, type RunState } from "./run-shapes";
import { RunStatusLine } from "./run-status-line";
import { SpreadView } from "./spread/spread-view";
import { textLinks } from "./text-links";
import { type Found, useLiveRun } from "./use-live-run";
import { useOverview } from "./use-overview";
import { useViewDeeds } from "./use-view-deeds";

/** A finished run is judged within this time, ms, unless it is large; then it is asked for again, each time after twice the wait. */
const JUDGED = 1500;

interface Props {
  readonly workspace: string;
  readonly first: RunState;
  readonly found: Found | null;
  /** Whether there is a form of the curves from afar, which comes before the whole. */
  readonly hasOverview: boolean;
  /** Where its text says what, and what has come since. */
  readonly context: RunContext;
  /** The account of the point that the address names. */
  readonly point: PointAccount | null;
  readonly span: VoltageSpan | null;
  /** The search part of the address the page was asked for with. */
  readonly search: string;
  readonly mayStart: boolean;
  readonly mayCancel: boolean;
}

/** A run: how far it is, its curves and numbers, what its tolerances do, and beside them what it came to. */
export function RunView(props: Props) {
  const { workspace, first, found, context, point, span, mayStart, mayCancel } = props;
  const router = useRouter();
  const overview = useOverview(workspace, first.id, first.plan.traces.length, props.hasOverview);
  const live = useLiveRun(first, found, overview.over);
  const { document, problem, finished, behind, setRun } = live;
  // The stream ends before the run is judged: its verdict comes with the page that is asked for again.
  const run = useMemo(
    () => ({ ...live.run, verdict: live.run.verdict ?? first.verdict }),
    [live.run, first.verdict],
  );
  const [state, setState] = useState(() => readPageState(new URLSearchParams(props.search)));
  // The cursor moves with the pointer: what follows it listens for itself, and the page is not drawn anew.
  const onCursor = useRef<(point: number | null) => void>(() => {});
  const moved = useCallback((point: number | null) => onCursor.current(point), []);
  const show = useCallback(
    (change: Partial<PageState>) => setState((before) => ({ ...before, ...change })),
    [],
  );

  useAddress(writePageState(state));

  // What only the server knows of a finished run: its extremes at once, its judgement a moment later.
  const judged = first.judgement !== null || first.error !== null;
  useEffect(() => {
    if (!finished) return;
    router.refresh();
    if (judged) return;
    let timer: ReturnType<typeof setTimeout>;
    const again = (wait: number) => {
      timer = setTimeout(() => {
        router.refresh();
        again(2 * wait);
      }, wait);
    };
    again(JUDGED);
    return () => clearTimeout(timer);
  }, [finished, judged, router]);

  const source = useMemo(
    (): CurveSource =>
      document ?? {
        axes: run.plan.axes,
        traces: run.plan.traces.map((trace) => ({ ...trace, values: [] })),
        points: { outcome: [] },
      },
    [document, run.plan],
  );
  const isWhole = document !== null || overview.source === null;
  const seen = isWhole ? source : overview.source;
  const set = useMemo(() => curveSet(seen), [seen]);
  useViewDeeds(set, state, show);
  const numbers = useMemo(() => withDraws(source, run.plan.draws), [source, run.plan.draws]);
  const allowed = useMemo(() => (document === null ? [] : allowedBands(document)), [document]);
  const proved = useMemo(() => provedIn(source), [source]);
  const { judgement } = first;
  const matter = useMemo(
    () =>
      document && {
        axes: run.plan.axes,
        readings: document.readings,
        requirements: document.requirements,
        budgets: judgement?.budgets ?? [],
        causes: judgement?.causes ?? [],
      },
    [document, run.plan.axes, judgement],
  );
  const links = useMemo(() => textLinks(workspace, run, context), [workspace, run, context]);
  const panels = document ?? judgedAlready(first);
  const chosen = state.point !== null && state.point < run.points ? state.point : set === null ? 0 : null;

  return (
    <>
      <RunHeader
        workspace={workspace}
        run={run}
        mayStart={mayStart}
        mayCancel={mayCancel}
        onRun={setRun}
        proved={document === null ? null : proved}
        latestRevision={context.latestRevision}
        figure={set === null || document === null ? null : { set, view: state, allowed }}
      />
      <RunStatusLine run={run} behind={behind} />
      {problem !== null && (
        <div className="px-4 pt-4 md:px-6">
          <Notice tone="caution" title="The curves could not be brought up to date" announce>
            <p>{problem} Trying again.</p>
          </Notice>
        </div>
      )}
      <div className="grid grow grid-cols-[minmax(0,1fr)] lg:grid-rows-[auto_1fr] lg:grid-cols-[minmax(0,8fr)_minmax(300px,5fr)] 2xl:grid-cols-[minmax(0,11fr)_minmax(300px,6fr)]">
        <RunVerdicts run={run} found={panels} links={links} onShow={show} />
        <div className="min-w-0 px-4 pt-2 pb-8 md:px-6 lg:col-start-1 lg:row-span-2 lg:row-start-1">
          {set === null ? (
            <OperatingPoint source={source} />
          ) : (
            <Tabs
              label="Results"
              value={state.tab}
              onChange={(tab) => show({ tab: tab === "numbers" ? "numbers" : "curves" })}
              tabs={[
                {
                  value: "curves",
                  label: "Curves",
                  content: (
                    <CurveFigure
                      set={set}
                      name={`Curves of ${run.title}, run ${run.number}`}
                      view={state}
                      onView={show}
                      point={chosen === null ? null : onPlot(run, chosen)}
                      onPoint={(next) => isWhole && show({ point: next })}
                      waiting={waitingFor(run, document !== null, !isWhole)}
                      allowed={allowed}
                      onCursor={isWhole ? moved : nothing}
                    />
                  ),
                },
                {
                  value: "numbers",
                  label: "Table of numbers",
                  content: (
                    <NumberTable
                      source={numbers}
                      page={state.page}
                      failedOnly={state.failed}
                      point={chosen}
                      onPage={(page) => show({ page })}
                      onFailedOnly={(failed) => show({ failed, page: 1 })}
                      onPoint={(next) => show({ point: next })}
                    />
                  ),
                },
              ]}
            />
          )}
          {matter !== null && (
            <SpreadView
              matter={matter}
              budgetsMissing={
                judgement === null ? "to come" : judgement.budgets === null ? "too large" : null
              }
              links={links}
              subject={state.subject}
              setting={state.setting}
              onSubject={(subject, setting) => show({ subject, setting })}
            />
          )}
        </div>
        <RunPanels
          workspace={workspace}
          run={run}
          found={panels}
          links={links}
          span={span}
          chosen={chosen}
          point={point}
          onCursor={onCursor}
          onShow={show}
        />
      </div>
    </>
  );
}

/** The points of curves from afar have other numbers than those of the run. */
function nothing(): void {}

/** What was kept of a finished run's judgement, to be shown while its document is on the way; null where it lacks anything shown. */
function judgedAlready({ judgement }: RunState): RunFound | null {
  if (judgement === null || judgement.requirements.some(({ drawn }) => drawn === undefined)) return null;
  return { requirements: judgement.requirements, readings: judgement.readings, failures: [] };
}

/** The draws as one more axis, for the table that lists every point. The curves are those of draw 0, the nominal design. */
function withDraws(source: CurveSource, draws: number): CurveSource {
  if (draws === 0) return source;
  const values = Array.from({ length: draws + 1 }, (_, draw) => draw);
  return { ...source, axes: [...source.axes, { knob: "draw", unit: "1", scale: "list", values }] };
}

/** Points with a proof. */
function provedIn({ points }: CurveSource): number {
  const { bound = [] } = points;
  let proved = 0;
  for (let k = 0; k < bound.length; k++) if (Number.isFinite(bound[k] ?? Number.NaN)) proved++;
  return proved;
}

/** Why no curve can be there yet; null when what is there is all there is. */
function waitingFor({ status, pointsDone }: RunState, fetched: boolean, isAfar: boolean): string | null {
  if (pointsDone === 0) return isLive(status) ? "Waiting for the first points" : null;
  if (fetched) return null;
  return isAfar
    ? "Fetching every point of these curves, to be read and looked at closely…"
    : "Fetching the curves…";
}
