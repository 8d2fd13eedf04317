"use client";

import { useMemo } from "react";
import { classNames } from "@/app/_components/ui/class-names";
import { formatCount } from "@/app/_components/ui/count";
import { Pager } from "@/app/_components/ui/pager";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import { outcomeInWords } from "@/lib/analyses/reasons";
import { valueIn } from "./columns";
import { type CurveSource, settingOf } from "./curve-set";
import { whyMissing } from "./failed-reasons";
import { formatValue } from "./figures-in-words";

interface Props {
  readonly source: CurveSource;
  /** Counted from 1. */
  readonly page: number;
  readonly failedOnly: boolean;
  /** Flat number of the chosen point. */
  readonly point: number | null;
  readonly onPage: (page: number) => void;
  readonly onFailedOnly: (failedOnly: boolean) => void;
  readonly onPoint: (point: number) => void;
}

/** Rows on one page. */
const SIZE = 50;

/** Every point of a run in numbers, with what became of it; a page at a time. */
export function NumberTable({ source, page, failedOnly, point, onPage, onFailedOnly, onPoint }: Props) {
  const { axes, traces, points } = source;
  const total = axes.reduce((product, { values }) => product * values.length, 1);
  const failed = useMemo(
    () => points.outcome.flatMap((outcome, i) => (outcome === null || outcome === "converged" ? [] : [i])),
    [points.outcome],
  );
  const count = failedOnly ? failed.length : total;
  const from = Math.min((page - 1) * SIZE, Math.max(0, SIZE * (Math.ceil(count / SIZE) - 1)));
  const rows = failedOnly
    ? failed.slice(from, from + SIZE)
    : Array.from({ length: Math.max(0, Math.min(SIZE, total - from)) }, (_, i) => from + i);
  const pager = count > SIZE && (
    <Pager label="Pages of the numbers" page={from / SIZE + 1} size={SIZE} total={count} onPage={onPage} />
  );
  return (
    <div className="grid gap-3">
      <label className="inline-flex min-h-7 w-fit cursor-pointer items-center gap-2 text-sm">
        <input
          type="checkbox"
          checked={failedOnly}
          onChange={({ target }) => onFailedOnly(target.checked)}
          className="size-3.5 accent-accent"
        />
        Failed points only <span className="text-quiet">({formatCount(failed.length)})</span>
      </label>
      {pager}
      {count === 0 ? (
        <p className="border-y py-6 text-quiet text-sm">No point has failed.</p>
      ) : (
        <TableFrame label="Numbers of all points">
          <Table>
            <caption className="sr-only">
              Points of the run: setting, traces and outcome; {formatCount(count)} rows, {SIZE} on a page
            </caption>
            <thead>
              <tr>
                <HeadCell figure>Point</HeadCell>
                {axes.map((axis) => (
                  <HeadCell key={axis.knob} figure>
                    <span className="whitespace-nowrap text-ink">{axis.knob}</span>
                  </HeadCell>
                ))}
                {traces.map(({ name }) => (
                  <HeadCell key={name} figure>
                    <span className="whitespace-nowrap text-ink">{name}</span>
                  </HeadCell>
                ))}
                <HeadCell>Outcome</HeadCell>
              </tr>
            </thead>
            <tbody>
              {rows.map((k) => (
                <tr
                  key={k}
                  className={classNames(k === point && "bg-wash")}
                  aria-current={k === point || undefined}
                >
                  <Cell figure className="py-0.5! align-middle!">
                    <button
                      type="button"
                      aria-label={`Show point ${k} in full`}
                      onClick={() => onPoint(k)}
                      className="min-h-6 min-w-6 text-right underline decoration-edge underline-offset-3 hover:decoration-ink"
                    >
                      {formatCount(k)}
                    </button>
                  </Cell>
                  {settingOf(axes, k).map(({ axis, text }) => (
                    <Cell key={axis.knob} figure className="py-1! align-middle!">
                      {text}
                    </Cell>
                  ))}
                  {traces.map(({ name, unit, values }) => (
                    <Cell
                      key={name}
                      figure
                      className={classNames(
                        "py-1! align-middle!",
                        valueIn(values, k) === null && "text-quiet",
                      )}
                    >
                      {formatValue(valueIn(values, k), unit)}
                    </Cell>
                  ))}
                  <Outcome outcome={points.outcome[k] ?? null} why={whyMissing(source, k)} />
                </tr>
              ))}
            </tbody>
          </Table>
        </TableFrame>
      )}
      {pager}
    </div>
  );
}

function Outcome({ outcome, why }: { readonly outcome: string | null; readonly why: string }) {
  const failed = outcome !== null && outcome !== "converged";
  return (
    <Cell
      className={classNames("whitespace-nowrap py-1! align-middle!", failed ? "text-broken" : "text-quiet")}
    >
      {outcome === "converged" ? outcomeInWords(outcome) : why}
    </Cell>
  );
}
