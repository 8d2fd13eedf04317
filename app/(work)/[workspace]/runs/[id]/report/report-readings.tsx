import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { AxisDocument, ReadingDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { listedBeside, settingCount, settingsOf } from "../spread/subjects";
import { UnlistedSettings } from "../unlisted-settings";

interface Props {
  readonly readings: readonly ReadingDocument[];
  readonly axes: readonly AxisDocument[];
  readonly draws: number;
}

/** The readings that are one number a sweep: nominal at each setting, and the least and the most of the draws. */
export function ReportReadings({ readings, axes, draws }: Props) {
  const numbers = readings.filter(({ per }) => per === "sweep");
  const count = settingCount(axes);
  const settings = settingsOf(axes, listedBeside(numbers.length));
  if (numbers.length === 0) return null;
  const isDrawn = draws > 0;
  return (
    <section aria-labelledby="report-readings" className="grid grid-cols-[minmax(0,1fr)] gap-3">
      <h2 id="report-readings">Readings</h2>
      <TableFrame label="Readings of the run">
        <Table>
          <caption>Readings at each setting{isDrawn && ", with the least and the most of the draws"}</caption>
          <thead>
            <tr>
              <HeadCell>Reading</HeadCell>
              <HeadCell>Setting</HeadCell>
              <HeadCell figure>Nominal</HeadCell>
              {isDrawn && <HeadCell figure>Least</HeadCell>}
              {isDrawn && <HeadCell figure>Most</HeadCell>}
            </tr>
          </thead>
          <tbody>
            {numbers.flatMap((reading) =>
              settings.map((words, row) => {
                const drawn = drawnOf(reading, count, row);
                const show = (value: number | null | undefined) =>
                  value === null || value === undefined ? "no value" : formatQuantity(value, reading.unit, 6);
                return (
                  <tr key={`${reading.name} ${words}`}>
                    <th scope="row" className="border-b py-1.5 pr-4 text-left font-normal">
                      {reading.name}
                    </th>
                    <Cell>{words === "" ? "as it stands" : words}</Cell>
                    <Cell figure>{show(reading.values[row])}</Cell>
                    {isDrawn && <Cell figure>{show(drawn.length === 0 ? null : least(drawn))}</Cell>}
                    {isDrawn && (
                      <Cell figure>{show(drawn.length === 0 ? null : -least(drawn.map((v) => -v)))}</Cell>
                    )}
                  </tr>
                );
              }),
            )}
          </tbody>
        </Table>
      </TableFrame>
      <UnlistedSettings listed={settings.length} count={count} />
    </section>
  );
}

/** What the draws make of a reading at one of `count` settings. */
function drawnOf({ values }: ReadingDocument, count: number, setting: number): number[] {
  const drawn: number[] = [];
  for (let at = count + setting; at < values.length; at += count) {
    const value = values[at];
    if (value !== null && value !== undefined) drawn.push(value);
  }
  return drawn;
}

function least(values: readonly number[]): number {
  return values.reduce((a, b) => Math.min(a, b));
}
