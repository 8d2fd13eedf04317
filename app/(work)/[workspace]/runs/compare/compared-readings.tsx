import { onePrefix } from "@/app/_components/ui/one-prefix";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { ReadingDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { settingsOf } from "../[id]/spread/subjects";
import { type ComparedRun, nameOf } from "./compare-shapes";
import { type SideBySide, sideBySide } from "./side-by-side";

/** The nominal readings of all runs at each setting, and how far they lie from those of the first run. */
export function ComparedReadings({ runs }: { readonly runs: readonly ComparedRun[] }) {
  const rows = sideBySide(
    runs.map(({ run }) => labelled(run.judgement?.readings ?? [], settingsOf(run.plan.axes))),
  );
  if (rows.length === 0) return null;
  return (
    <section aria-labelledby="readings">
      <h2 id="readings" className="caption">
        Readings, nominal
      </h2>
      <TableFrame label="Readings side by side" className="mt-1 max-h-128 overflow-y-auto">
        <Table aria-labelledby="readings">
          <thead>
            <tr>
              <HeadCell>Reading</HeadCell>
              {runs.map((one) => (
                <HeadCell key={one.letter} figure className="min-w-36">
                  {nameOf(one, runs)}
                </HeadCell>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map(({ label, each }) => {
              const [first] = each;
              const { name, unit } = each.find((one) => one !== null)!;
              const known = valuesOf(rows, name, unit);
              return (
                <tr key={label}>
                  <Cell className="min-w-32">{label}</Cell>
                  {each.map((one, k) => (
                    <Cell key={runs[k]!.letter} figure>
                      {one === null ? <span className="text-quiet">not read</span> : written(one, known)}
                      {k > 0 && <Moved from={first ?? null} to={one} />}
                    </Cell>
                  ))}
                </tr>
              );
            })}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}

/** All values of one reading, at every setting and in every run. */
function valuesOf(rows: readonly SideBySide<Read>[], name: string, unit: string): number[] {
  return rows.flatMap(({ each }) =>
    each.flatMap((one) => (one?.value == null || one.name !== name || one.unit !== unit ? [] : [one.value])),
  );
}

interface Read {
  readonly label: string;
  readonly name: string;
  readonly unit: string;
  readonly value: number | null;
}

function labelled(readings: readonly ReadingDocument[], settings: readonly string[]): Read[] {
  return readings
    .filter(({ per }) => per === "sweep")
    .flatMap(({ name, unit, values }) =>
      settings.map((setting, row) => ({
        name,
        label: setting === "" ? name : `${name}, ${setting}`,
        unit,
        value: values[row] ?? null,
      })),
    );
}

/** With the prefix of the largest of a row, so that values can be compared at sight. */
function written({ value, unit }: Read, all: readonly number[]): string {
  if (value === null) return "no value";
  const largest = all.reduce((most, one) => (Math.abs(one) > Math.abs(most) ? one : most), value);
  const { texts, unit: shared } = onePrefix([value, largest], unit, 6, true);
  return shared === "" ? texts[0]! : `${texts[0]}\u202f${shared}`;
}

function Moved({ from, to }: { readonly from: Read | null; readonly to: Read | null }) {
  if (from?.value == null || to?.value == null) return null;
  if (from.unit !== to.unit) return <span className="block text-quiet text-xs">in another unit</span>;
  const by = to.value - from.value;
  const sign = by < 0 ? "\u2212" : "+";
  return (
    <span className="block text-quiet text-xs">
      {by === 0 ? "the same" : `${sign}${formatQuantity(Math.abs(by), to.unit, 3)}`}
    </span>
  );
}
