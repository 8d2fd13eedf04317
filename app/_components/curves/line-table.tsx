"use client";

import { type ReactNode, useState } from "react";
import { formatCount } from "@/app/_components/ui/count";
import { INPUT_CLASS } from "@/app/_components/ui/field";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { Cursor } from "./cursor-layer";
import { missing } from "./cursor-marks";
import { type CurveSet, type Family, pointAt } from "./curve-set";
import type { StoreyView } from "./curve-view";
import { formatKnob, formatValue } from "./figures-in-words";
import { LineSample } from "./line-sample";
import type { Choice } from "./storeys";

interface Props {
  readonly set: CurveSet;
  readonly storeys: readonly StoreyView[];
  readonly choice: Choice;
  readonly cursor: Cursor | null;
  readonly onTraces: (traces: readonly string[]) => void;
  readonly onFamilies: (families: readonly number[]) => void;
}

/** Settings listed at once, beside those that are drawn. */
const FEW_ROWS = 30;

/** The lines of the plot: a column a trace, a row a setting, each with its switch, its sample, and its value at the cursor. */
export function LineTable({ set, storeys, choice, cursor, onTraces, onFamilies }: Props) {
  const [wanted, setWanted] = useState("");
  const { traces } = set.source;
  const drawn = new Map(storeys.flatMap(({ lines }) => lines.map((line) => [line.key, line] as const)));
  const at = cursor === null ? null : set.x[cursor.place];
  const value = (trace: (typeof traces)[number], family: number) => {
    if (cursor === null) return "";
    const found = trace.values[pointAt(set, family, cursor.place)] ?? null;
    return found === null ? missing(set, { family, place: cursor.place }) : formatValue(found, trace.unit);
  };
  const toggled = <T,>(list: readonly T[], item: T, all: readonly T[]) =>
    all.filter((one) => (one === item ? !list.includes(one) : list.includes(one)));
  const names = traces.map(({ name }) => name);
  const indices = set.families.map(({ index }) => index);
  const many = set.families.length > FEW_ROWS;
  const rows = many ? found(set.families, choice.families, wanted) : set.families;
  return (
    <div className="grid gap-2">
      {many && (
        <label className="flex flex-wrap items-center gap-2">
          <span className="text-quiet text-xs">Find a setting</span>
          <input
            type="search"
            value={wanted}
            onChange={({ target }) => setWanted(target.value)}
            className={`${INPUT_CLASS} figures min-h-7! w-48!`}
          />
          <span className="text-quiet text-xs" aria-live="polite">
            {formatCount(rows.length)} of {formatCount(set.families.length)} settings listed, the drawn ones
            among them
          </span>
        </label>
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
                    <Switch
                      checked={choice.traces.includes(name)}
                      onChange={() => onTraces(toggled(choice.traces, name, names))}
                    >
                      <Named name={name} unit={unit} />
                    </Switch>
                  ) : (
                    <Named name={name} unit={unit} />
                  )}
                </HeadCell>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((family) => (
              <tr key={family.index}>
                <Cell className="py-1!">
                  {set.families.length > 1 ? (
                    <Switch
                      checked={choice.families.includes(family.index)}
                      onChange={() => onFamilies(toggled(choice.families, family.index, indices))}
                    >
                      <span className="figures text-xs">{family.label}</span>
                    </Switch>
                  ) : (
                    <span className="text-quiet text-xs">one setting</span>
                  )}
                </Cell>
                {traces.map((trace) => {
                  const line = drawn.get(`${trace.name} ${family.index}`);
                  return (
                    <Cell key={trace.name} figure className="py-1!">
                      <span className="flex min-h-6 items-center justify-end gap-2.5 text-xs">
                        {value(trace, family.index)}
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
}

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

function Switch({
  checked,
  onChange,
  children,
}: {
  readonly checked: boolean;
  readonly onChange: () => void;
  readonly children: ReactNode;
}) {
  return (
    <label className="inline-flex min-h-6 cursor-pointer items-center gap-2 whitespace-nowrap text-ink">
      <input type="checkbox" checked={checked} onChange={onChange} className="size-3.5 accent-accent" />
      {children}
    </label>
  );
}

function Named({ name, unit }: { readonly name: string; readonly unit: string }) {
  return (
    <span className="whitespace-nowrap text-ink">
      {name} {unit !== "1" && <span className="figures text-quiet text-xs">{unit}</span>}
    </span>
  );
}
