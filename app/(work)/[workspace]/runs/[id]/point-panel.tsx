"use client";

import { useQuery } from "@tanstack/react-query";
import { type FormEvent, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { formatCount } from "@/app/_components/ui/count";
import { INPUT_CLASS } from "@/app/_components/ui/field";
import { FailedState, LoadingState } from "@/app/_components/ui/states";
import { fetchPoint } from "./fetch-run";
import { PointAccountView } from "./point-account";
import { isLive, type PointAccount, type RunState } from "./run-shapes";

interface Props {
  readonly run: RunState;
  readonly point: number | null;
  /** The account that came with the page. */
  readonly first: PointAccount | null;
  /** Whether there is more than one point to choose. */
  readonly choosable: boolean;
  readonly onPoint: (point: number | null) => void;
}

/** The chosen point in full, and a way to choose one by its number. */
export function PointPanel({ run, point, first, choosable, onPoint }: Props) {
  const live = isLive(run.status);
  const { data, error, isPending, refetch } = useQuery({
    queryKey: ["point", run.id, point],
    queryFn: () => fetchPoint(run.id, point ?? 0),
    enabled: point !== null,
    ...(first !== null && first.point === point && first.outcome !== null ? { initialData: first } : {}),
    staleTime: ({ state }) => (state.data?.outcome == null ? 0 : Number.POSITIVE_INFINITY),
    refetchInterval: ({ state }) => (live && state.data?.outcome == null ? 1000 : false),
  });
  return (
    <section aria-labelledby="point" className="min-w-0">
      <div className="flex min-h-7 flex-wrap items-center justify-between gap-2">
        <h2 id="point" className="caption">
          {point === null ? "One point in full" : `Point ${formatCount(point)}`}
        </h2>
        {choosable && <PointNumber key={point} point={point} points={run.points} onPoint={onPoint} />}
      </div>
      {point === null && (
        <p className="mt-2 border-y py-3 text-quiet text-sm">
          Choose a point on a curve, in the table, or by its number: how it was solved, or why it was not, and
          every net voltage and branch current then stand here.
        </p>
      )}
      {point !== null && isPending && <LoadingState>Fetching the point…</LoadingState>}
      {point !== null && error !== null && (
        <FailedState
          title="The point could not be shown"
          action={<Button onClick={() => refetch()}>Try again</Button>}
        >
          <p>{error.message}</p>
        </FailedState>
      )}
      {point !== null && data !== undefined && <PointAccountView account={data} />}
    </section>
  );
}

function PointNumber({
  point,
  points,
  onPoint,
}: {
  readonly point: number | null;
  readonly points: number;
  readonly onPoint: (point: number | null) => void;
}) {
  const [text, setText] = useState(point === null ? "" : String(point));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const number = Number(text);
    if (text.trim() !== "" && Number.isInteger(number)) onPoint(Math.min(points - 1, Math.max(0, number)));
  };
  return (
    <form onSubmit={submit} className="flex items-center gap-2" data-print="never">
      <input
        aria-label={`Number of a point, 0 to ${points - 1}`}
        inputMode="numeric"
        value={text}
        placeholder={`0 to ${formatCount(points - 1)}`}
        onChange={(event) => setText(event.target.value)}
        className={`${INPUT_CLASS} figures min-h-7! w-32! text-right`}
      />
      <Button type="submit" size="small">
        Show
      </Button>
      {point !== null && (
        <Button size="small" tone="quiet" onClick={() => onPoint(null)}>
          Clear
        </Button>
      )}
    </form>
  );
}
