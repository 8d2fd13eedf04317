"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { type RefObject, useEffect, useState } from "react";
import { formatCount } from "@/app/_components/ui/count";
import { effortInWords, outcomeInWords } from "@/lib/analyses/reasons";
import { formatQuantity } from "@/lib/units/quantity";
import { fetchPoint } from "./fetch-run";
import { Power } from "./point-account";

/** How long the cursor rests before its point is asked for, ms. */
const REST = 100;

/** The proof mark of the point under the cursor of the plot, and how it was solved: there before anything is chosen. */
export function CursorAccount({
  run,
  onCursor,
}: {
  readonly run: string;
  /** Where the plot tells of its cursor. */
  readonly onCursor: RefObject<(point: number | null) => void>;
}) {
  const at = useSettled(onCursor);
  const { data } = useQuery({
    queryKey: ["point", run, at],
    queryFn: () => fetchPoint(run, at ?? 0),
    enabled: at !== null,
    placeholderData: keepPreviousData,
    staleTime: ({ state }) => (state.data?.outcome == null ? 0 : Number.POSITIVE_INFINITY),
  });
  const found = at === null ? undefined : data;
  const solved = found?.outcome === "converged";
  return (
    <section aria-labelledby="cursor-account" data-cursor-point={found?.point}>
      <h2 id="cursor-account" className="caption">
        At the cursor
        {found !== undefined && <span className="font-normal">, point {formatCount(found.point)}</span>}
      </h2>
      <dl className="mt-1 border-t">
        <Row name="proved within">
          {found === undefined
            ? null
            : !solved
              ? outcomeInWords(found.outcome)
              : found.bound === null
                ? "not proved"
                : formatQuantity(found.bound, "V", 2)}
        </Row>
        <Row name="iterations">
          {found?.iterations != null && effortInWords(found.iterations, found.rung)}
        </Row>
        <Row name="largest residual">
          {found?.residual != null && (
            <>
              <Power value={found.residual} />
              &#8239;A
            </>
          )}
        </Row>
      </dl>
    </section>
  );
}

function Row({ name, children }: { readonly name: string; readonly children: React.ReactNode }) {
  return (
    <div className="flex min-h-7 items-baseline justify-between gap-4 border-b py-1">
      <dt className="figures">{name}</dt>
      <dd className="figures text-right">{children || <span className="text-quiet">–</span>}</dd>
    </div>
  );
}

/** The last point on which the cursor has rested. */
function useSettled(onCursor: RefObject<(point: number | null) => void>): number | null {
  const [settled, setSettled] = useState<number | null>(null);
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined;
    onCursor.current = (point) => {
      clearTimeout(timer);
      if (point !== null) timer = setTimeout(() => setSettled(point), REST);
    };
    return () => {
      clearTimeout(timer);
      onCursor.current = () => {};
    };
  }, [onCursor]);
  return settled;
}
