import { formatKnob, formatValue } from "@/app/_components/curves/figures-in-words";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { AxisDocument, ReadingDocument } from "@/lib/analyses/result";
import type { ComparedRun } from "./compare-shapes";

/** The nominal readings of both runs at the settings that both have, and by how much they moved. */
export function ReadingTable({
  before,
  after,
  labels,
}: {
  readonly before: ComparedRun;
  readonly after: ComparedRun;
  readonly labels: readonly [before: string, after: string];
}) {
  const rows = after.readings.flatMap((now) => {
    const was = before.readings.find(({ name, unit }) => name === now.name && unit === now.unit);
    return was === undefined ? [] : settingsOf(after).map((setting) => rowOf(was, now, setting, before));
  });
  if (rows.length === 0) return null;
  return (
    <section aria-labelledby="readings">
      <h2 id="readings" className="caption">
        Readings, nominal
      </h2>
      <TableFrame label="Readings" className="mt-1">
        <Table aria-labelledby="readings">
          <thead>
            <tr>
              <HeadCell>Reading</HeadCell>
              <HeadCell figure>{labels[0]}</HeadCell>
              <HeadCell figure>{labels[1]}</HeadCell>
              <HeadCell figure>Moved by</HeadCell>
            </tr>
          </thead>
          <tbody>
            {rows.map(({ name, setting, unit, was, now }) => (
              <tr key={`${name} ${setting}`}>
                <Cell>
                  {name} <span className="text-quiet text-xs">{setting}</span>
                </Cell>
                <Cell figure>{formatValue(was, unit)}</Cell>
                <Cell figure>{formatValue(now, unit)}</Cell>
                <Cell figure>{was === null || now === null ? "" : formatValue(now - was, unit)}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}

/** Words for each setting of the outer sweeps, in the order in which readings are kept. */
function settingsOf({ axes }: ComparedRun): { text: string; place: number }[] {
  const count = axes.reduce((product, { values }) => product * values.length, 1);
  return Array.from({ length: count }, (_, place) => ({ text: settingText(axes, place), place }));
}

function settingText(axes: readonly AxisDocument[], place: number): string {
  let rest = place;
  return axes
    .map((axis) => {
      const value = axis.values[rest % axis.values.length]!;
      rest = Math.floor(rest / axis.values.length);
      return `${axis.knob} ${formatKnob(axis, value, 6)}`;
    })
    .join(", ");
}

function rowOf(
  was: ReadingDocument,
  now: ReadingDocument,
  { text, place }: { readonly text: string; readonly place: number },
  before: ComparedRun,
) {
  const other = settingsOf(before).find((one) => one.text === text);
  return {
    name: now.name,
    unit: now.unit,
    setting: text,
    was: other === undefined ? null : (was.values[other.place] ?? null),
    now: now.values[place] ?? null,
  };
}
