"use client";

import { memo, type ReactNode, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { classNames } from "@/app/_components/ui/class-names";
import { formatCount } from "@/app/_components/ui/count";
import { INPUT_CLASS } from "@/app/_components/ui/field";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import { valueIn } from "./columns";
import type { Cursor } from "./cursor-layer";
import { missing } from "./cursor-marks";
import { type CurveColumn, type CurveSet, type Family, pointAt } from "./curve-set";
import type { CurveView, Isolated } from "./curve-view";
import { formatKnob, formatValue } from "./figures-in-words";
import { LineSample } from "./line-sample";
import type { Choice, Storey } from "./storeys";

interface Props {
  readonly set: CurveSet;
  readonly storeys: readonly Storey[];
  readonly choice: Choice;
  /** What is seen alone. */
  readonly only: Isolated | null;
  readonly cursor: Cursor | null;
  readonly onView: (change: Partial<CurveView>) => void;
  readonly onFollow: (family: number | null) => void;
}

/** Settings listed at once, beside those that are drawn. */
const FEW_ROWS = 30;
/** More settings than this are not drawn at a stroke. */
const MOST_DRAWN = 250;

/**
 * The lines of the plot: a column a trace, a row a setting, each with its switch, its sample, and its value at the cursor. What
 * stands beside a switch shows that one alone, and all others again; a row pointed at or reached by Tab is followed in the plot.
 */
export const LineTable = memo(function LineTable(props: Props) {
  const { set, storeys, choice, only, cursor, onView, onFollow } = props;
  const [wanted, setWanted] = useState("");
  const { traces } = set;
  const drawn = new Map(storeys.flatMap(({ lines }) => lines.map((line) => [line.key, line] as const)));
  const at = cursor === null ? null : set.x[cursor.place];
  const value = (trace: CurveColumn, family: number) => {
    if (cursor === null) return "";
    const found = valueIn(trace.values, pointAt(set, family, cursor.place));
    return found === null ? missing(set, { family, place: cursor.place }) : formatValue(found, trace.unit);
  };
  const toggled = <T,>(list: readonly T[], item: T, all: readonly T[]) =>
    all.filter((one) => (one === item ? !list.includes(one) : list.includes(one)));
  const names = traces.map(({ name }) => name);
  const indices = set.families.map(({ index }) => index);
  const many = set.families.length > FEW_ROWS;
  const rows = many ? found(set.families, choice.families, wanted) : set.families;
  const shown = wanted.trim() === "" ? indices : rows.map(({ index }) => index);
  const isOnly = (one: Isolated) => JSON.stringify(only) === JSON.stringify(one);
  const switchFor = (
    name: string,
    one: Isolated,
    checked: boolean,
    onChange: () => void,
    label: ReactNode,
  ) => (
    <Switch
      name={name}
      checked={checked}
      only={isOnly(one)}
      onChange={onChange}
      onOnly={() => onView({ only: isOnly(one) ? null : one })}
    >
      {label}
    </Switch>
  );
  return (
    <div className="grid gap-2">
      {set.families.length > 6 && (
        <div className="flex flex-wrap items-center gap-2">
          {many && (
            <label className="flex flex-wrap items-center gap-2">
              <span className="text-quiet text-xs">Find a setting</span>
              <input
                type="search"
                value={wanted}
                onChange={({ target }) => setWanted(target.value)}
                className={`${INPUT_CLASS} figures min-h-7! w-48!`}
              />
            </label>
          )}
          {set.families.length > MOST_DRAWN && wanted.trim() === "" ? null : (
            <Button size="small" onClick={() => onView({ families: shown, only: null })}>
              {wanted.trim() === "" ? `Draw all ${formatCount(shown.length)}` : "Draw those found"}
            </Button>
          )}
          <Button size="small" tone="quiet" onClick={() => onView({ families: null, only: null })}>
            The usual ones
          </Button>
          {many && (
            <span className="text-quiet text-xs" aria-live="polite">
              {formatCount(rows.length)} of {formatCount(set.families.length)} settings listed, the drawn ones
              among them
            </span>
          )}
        </div>
      )}
      <TableFrame label="Lines of the plot" className="max-h-96 overflow-y-auto">
        <Table className="w-auto min-w-full">
          <caption className="sr-only">Lines of the plot, and their values at the cursor</caption>
          <thead>
            <tr>
              <HeadCell className="w-full">
                <span className="whitespace-nowrap">
                  {at === null || at === undefined
                    ? "Lines"
                    : `At ${set.axis.knob} ${formatKnob(set.axis, at)}`}
                  {set.outer.length > 0 && `, by ${set.outer.map(({ knob }) => knob).join(" and ")}`}
                </span>
              </HeadCell>
              {traces.map(({ name, unit }) => (
                <HeadCell key={name} figure>
                  {traces.length > 1 ? (
                    switchFor(
                      name,
                      { trace: name },
                      choice.traces.includes(name),
                      () => onView({ traces: toggled(choice.traces, name, names) }),
                      <Named name={name} unit={unit} />,
                    )
                  ) : (
                    <Named name={name} unit={unit} />
                  )}
                </HeadCell>
              ))}
            </tr>
          </thead>
          <tbody onPointerLeave={() => onFollow(null)}>
            {rows.map(({ index, label }) => (
              <tr
                key={index}
                onPointerEnter={() => set.families.length > 1 && onFollow(index)}
                onFocus={() => set.families.length > 1 && onFollow(index)}
                onBlur={() => onFollow(null)}
              >
                <Cell className="py-1!">
                  {set.families.length > 1 ? (
                    switchFor(
                      label,
                      { family: index },
                      choice.families.includes(index),
                      () => onView({ families: toggled(choice.families, index, indices) }),
                      <span className="figures text-xs">{label}</span>,
                    )
                  ) : (
                    <span className="text-quiet text-xs">one setting</span>
                  )}
                </Cell>
                {traces.map((trace) => {
                  const line = drawn.get(`${trace.name} ${index}`);
                  return (
                    <Cell key={trace.name} figure className="py-1!">
                      <span className="flex min-h-6 min-w-0 items-center justify-end gap-2.5 whitespace-normal text-xs">
                        {value(trace, index)}
                        {line !== undefined && <LineSample style={line.style} />}
                      </span>
                    </Cell>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </div>
  );
});

/** The settings whose label holds all words of `wanted`, and in any case those that are drawn; so many rows at most. */
function found(families: readonly Family[], drawn: readonly number[], wanted: string): readonly Family[] {
  const words = wanted.toLowerCase().split(/\s+/).filter(Boolean);
  const shown = new Set(drawn);
  let room = FEW_ROWS;
  return families.filter(({ index, label }) => {
    if (shown.has(index)) return true;
    const text = label.toLowerCase().replaceAll("\u202f", " ");
    return words.every((word) => text.includes(word)) && room-- > 0;
  });
}

interface SwitchProps {
  readonly name: string;
  readonly checked: boolean;
  readonly only: boolean;
  readonly onChange: () => void;
  readonly onOnly: () => void;
  readonly children: ReactNode;
}

/** Draws one or hides it, and beside that shows it alone. */
function Switch({ name, checked, only, onChange, onOnly, children }: SwitchProps) {
  return (
    <span className="inline-flex items-center gap-1.5">
      <label className="inline-flex min-h-6 cursor-pointer items-center gap-2 whitespace-nowrap text-ink">
        <input type="checkbox" checked={checked} onChange={onChange} className="size-3.5 accent-accent" />
        {children}
      </label>
      <button
        type="button"
        aria-label={`Only ${name}`}
        aria-pressed={only}
        onClick={onOnly}
        className={classNames(
          "min-h-6 min-w-6 rounded-[2px] border px-1.5 font-normal text-xs",
          only
            ? "border-ink bg-ink text-paper"
            : "border-transparent text-quiet hover:border-edge hover:text-ink",
        )}
      >
        only
      </button>
    </span>
  );
}

function Named({ name, unit }: { readonly name: string; readonly unit: string }) {
  return (
    <span className="whitespace-nowrap text-ink">
      {name} {unit !== "1" && <span className="figures text-quiet text-xs">{unit}</span>}
    </span>
  );
}
