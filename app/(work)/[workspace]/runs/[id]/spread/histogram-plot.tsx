"use client";

import { type KeyboardEvent, useState } from "react";
import { formatValue } from "@/app/_components/curves/figures-in-words";
import { counted, formatCount } from "@/app/_components/ui/count";
import { onePrefix, spanInWords } from "@/app/_components/ui/one-prefix";
import { Cell, HeadCell, Table } from "@/app/_components/ui/table";
import { formatAxis } from "@/lib/units/quantity";
import type { Histogram, Limits } from "./histogram";

interface Props {
  readonly name: string;
  readonly unit: string;
  readonly found: Histogram;
  readonly limits: Limits;
  readonly nominal: number | null;
}

/** Heights in px: of the bars, and of the room above them for the names of limits. */
const HEIGHT = 96;
const ABOVE = 18;
/** A limit is drawn where it lies no farther from the values than this share of their length. */
const NEAR = 0.5;

/**
 * How many draws have which value: bars with the limits across, a cursor that says each bar's count exactly (pointer or arrow
 * keys), and the same as a table.
 */
export function HistogramPlot({ name, unit, found, limits, nominal }: Props) {
  const [at, setAt] = useState<number | null>(null);
  const { bins, most, known } = found;
  const range = rangeOf(bins, limits);
  const place = (value: number) => `${((100 * (value - range.from)) / (range.to - range.from)).toFixed(3)}%`;
  const lines = [limits.low, limits.high].filter((one) => one !== null && isIn(one, range)) as number[];
  const ends = onePrefix([range.from, range.to], unit, digitsFor(range));
  const step = (event: KeyboardEvent) => {
    const next = nextBar(event.key, at, bins.length);
    if (next === undefined) return;
    event.preventDefault();
    setAt(next);
  };
  const bar = at === null ? null : bins[at]!;
  const words = (i: number) => inWords(found, i, unit);
  return (
    <div className="grid gap-1">
      <div
        role="slider"
        tabIndex={0}
        aria-label={`Bars of ${name} over the draws`}
        aria-valuemin={0}
        aria-valuemax={bins.length - 1}
        aria-valuenow={at ?? 0}
        aria-valuetext={
          at === null ? `${counted(known, "draw")} in ${counted(bins.length, "bar")}` : words(at)
        }
        onKeyDown={step}
        onBlur={() => setAt(null)}
        onPointerLeave={() => setAt(null)}
        data-histogram={bins.length}
      >
        <svg width="100%" height={HEIGHT + ABOVE} className="block overflow-visible" aria-hidden="true">
          {bins.map(({ from, to, count, isOutside }, i) => (
            <g key={from} onPointerEnter={() => setAt(i)}>
              <rect
                x={place(from)}
                width={place(range.from + to - from)}
                y={ABOVE}
                height={HEIGHT}
                fill={i === at ? "var(--wash)" : "transparent"}
              />
              <rect
                x={place(from)}
                width={place(range.from + 0.86 * (to - from))}
                y={ABOVE + HEIGHT * (1 - count / most)}
                height={(HEIGHT * count) / most}
                fill={isOutside ? "var(--broken)" : "var(--trace-1)"}
                fillOpacity={i === at ? 1 : isOutside ? 0.9 : 0.6}
              />
            </g>
          ))}
          <line x1="0" x2="100%" y1={ABOVE + HEIGHT} y2={ABOVE + HEIGHT} stroke="var(--ink)" />
          {lines.map((limit) => (
            <g key={limit} pointerEvents="none">
              <line
                x1={place(limit)}
                x2={place(limit)}
                y1="0"
                y2={ABOVE + HEIGHT}
                stroke="var(--holds)"
                strokeDasharray="4 3"
              />
              <text
                x={place(limit)}
                y="10"
                dx={isRight(limit, range) ? -5 : 5}
                textAnchor={isRight(limit, range) ? "end" : "start"}
                className="figures"
                fill="var(--quiet)"
                style={{ fontSize: 11 }}
              >
                {formatAxis(Number(limit.toPrecision(6)), unit)}
              </text>
            </g>
          ))}
          {nominal !== null && isIn(nominal, range) && (
            <path
              d={`M0 ${ABOVE + HEIGHT + 1}l4 6h-8z`}
              fill="var(--ink)"
              transform=""
              style={{ translate: place(nominal) }}
              className="[transform-box:view-box]"
            />
          )}
        </svg>
      </div>
      <div className="figures flex justify-between text-quiet text-xs" aria-hidden="true">
        {[ends.texts[0], ends.texts[1]].map((text) => (
          <span key={text}>
            {text}
            {ends.unit !== "" && `\u202f${ends.unit}`}
          </span>
        ))}
      </div>
      <p className="min-h-10 text-quiet text-xs" aria-live="polite" data-bar={at ?? undefined}>
        {bar === null || at === null ? summary(found, limits, unit) : words(at)}
      </p>
      <details className="text-xs" data-print="never">
        <summary className="min-h-6 w-fit">Counts as a table</summary>
        <Table className="mt-1 w-auto!">
          <caption className="sr-only">{name} over the draws, by bars</caption>
          <thead>
            <tr>
              <HeadCell figure>From</HeadCell>
              <HeadCell figure>To</HeadCell>
              <HeadCell figure>Draws</HeadCell>
              <HeadCell>Limits</HeadCell>
            </tr>
          </thead>
          <tbody>
            {bins.map(({ from, to, count, isOutside }) => (
              <tr key={from}>
                <Cell figure className="py-0.5!">
                  {formatValue(from, unit)}
                </Cell>
                <Cell figure className="py-0.5!">
                  {formatValue(to, unit)}
                </Cell>
                <Cell figure className="py-0.5!">
                  {formatCount(count)}
                </Cell>
                <Cell className="py-0.5! text-quiet">{isOutside ? "outside" : "within"}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      </details>
    </div>
  );
}

interface Ends {
  readonly from: number;
  readonly to: number;
}

function rangeOf(bins: Histogram["bins"], { low, high }: Limits): Ends {
  const [from, to] = [bins[0]!.from, bins.at(-1)!.to];
  const near = NEAR * (to - from);
  const room = 0.02 * (to - from);
  return {
    from: low !== null && low < from && low > from - near ? low - room : from,
    to: high !== null && high > to && high < to + near ? high + room : to,
  };
}

/** Digits that tell the ends of a range apart, and places within it. */
function digitsFor({ from, to }: Ends): number {
  const size = Math.max(Math.abs(from), Math.abs(to));
  return Math.min(12, 2 + Math.ceil(Math.log10(size / (to - from)) + 1e-9));
}

function isIn(value: number, { from, to }: Ends): boolean {
  return value >= from && value <= to;
}

function isRight(value: number, { from, to }: Ends): boolean {
  return value > from + 0.6 * (to - from);
}

function nextBar(key: string, at: number | null, count: number): number | null | undefined {
  const here = at ?? -1;
  if (key === "ArrowRight" || key === "ArrowUp") return Math.min(count - 1, here + 1);
  if (key === "ArrowLeft" || key === "ArrowDown") return Math.max(0, here - 1);
  if (key === "Home") return 0;
  if (key === "End") return count - 1;
  return key === "Escape" ? null : undefined;
}

function inWords({ bins }: Histogram, i: number, unit: string): string {
  const { from, to, count, isOutside } = bins[i]!;
  return `${counted(count, "draw")} at ${spanInWords(from, to, unit, 5)}${isOutside ? ", outside the limits" : ""}`;
}

/** "3 of 400 draws lie outside the limits." and what is not in the bars. */
function summary({ known, unknown, outside }: Histogram, { low, high }: Limits, unit: string): string {
  const show = (value: number) => formatAxis(Number(value.toPrecision(6)), unit);
  const limits =
    low === null
      ? high === null
        ? null
        : `above ${show(high)}`
      : high === null
        ? `below ${show(low)}`
        : `outside ${spanInWords(low, high, unit, 6)}`;
  const parts = [
    limits === null
      ? `${counted(known, "draw")}; no requirement limits it directly`
      : `${outside === 0 ? "None" : formatCount(outside)} of ${counted(known, "draw")} ${outside === 1 || outside === 0 ? "lies" : "lie"} ${limits}`,
  ];
  if (unknown > 0) parts.push(`${counted(unknown, "draw")} without a value`);
  return `${parts.join("; ")}. The triangle marks the nominal design.`;
}
