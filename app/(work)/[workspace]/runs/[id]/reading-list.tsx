import { formatKnob, formatValue } from "@/app/_components/curves/figures-in-words";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { Budget } from "@/lib/analyses/budget";
import type { AxisDocument, ReadingDocument } from "@/lib/analyses/result";
import { Costs } from "./costs";

interface Props {
  readonly readings: readonly ReadingDocument[];
  /** Of the run; the readings go over all but the first. */
  readonly axes: readonly AxisDocument[];
  readonly budgets: readonly Budget[];
}

/** The readings of the nominal design, how far the draws spread them, and which parts cost each the most. */
export function ReadingList({ readings, axes, budgets }: Props) {
  const numbers = readings.filter(({ per }) => per === "sweep");
  if (numbers.length === 0) return null;
  const settings = axes.slice(1).reduce((product, { values }) => product * values.length, 1);
  const spread = numbers.some(({ values }) => values.length > settings);
  return (
    <section aria-labelledby="readings">
      <h2 id="readings" className="caption">
        Readings
      </h2>
      <TableFrame label="Readings" className="mt-1">
        <Table aria-labelledby="readings">
          <thead>
            <tr>
              <HeadCell>Reading</HeadCell>
              <HeadCell figure>Nominal</HeadCell>
              {spread && <HeadCell figure>Over the draws</HeadCell>}
            </tr>
          </thead>
          <tbody>
            {numbers.flatMap((reading) =>
              Array.from({ length: settings }, (_, row) => (
                // biome-ignore lint/suspicious/noArrayIndexKey: the settings of a run never change
                <tr key={`${reading.name} ${row}`}>
                  <Cell>
                    {reading.name} <span className="text-quiet text-xs">{settingOf(axes, row)}</span>
                    <Costs budget={budgets.find((one) => one.reading === reading.name && one.row === row)} />
                  </Cell>
                  <Cell figure>{formatValue(reading.values[row] ?? null, reading.unit)}</Cell>
                  {spread && <Cell figure>{spreadOf(reading, settings, row)}</Cell>}
                </tr>
              )),
            )}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}

function settingOf(axes: readonly AxisDocument[], row: number): string {
  let rest = row;
  return axes
    .slice(1)
    .map((axis) => {
      const value = axis.values[rest % axis.values.length]!;
      rest = Math.floor(rest / axis.values.length);
      return `${axis.knob} ${formatKnob(axis, value, 4)}`;
    })
    .join(", ");
}

/** The least and the most of a setting over the random draws; the first rows are the nominal design. */
function spreadOf({ values, unit }: ReadingDocument, settings: number, row: number): string {
  const drawn: number[] = [];
  for (let at = settings + row; at < values.length; at += settings) {
    const value = values[at];
    if (value === null || value === undefined) return "no data";
    drawn.push(value);
  }
  if (drawn.length === 0) return "";
  const least = drawn.reduce((a, b) => Math.min(a, b));
  const most = drawn.reduce((a, b) => Math.max(a, b));
  return `${formatValue(least, unit)} to ${formatValue(most, unit)}`;
}
