import { onePrefix } from "@/app/_components/ui/one-prefix";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { ReadingDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { type SideBySide, sideBySide } from "./side-by-side";

/** A run as its readings are compared. */
export interface ReadRun {
  /** What stands over its column. */
  readonly head: string;
  readonly readings: readonly ReadingDocument[];
  /** Its settings in words, in the order in which readings are kept; one empty text where it has none. */
  readonly settings: readonly string[];
}

/** The nominal readings of all runs at each setting, and how far they lie from those of the first run, as they are and in relation. */
export function ComparedReadings({ runs }: { readonly runs: readonly ReadRun[] }) {
  const rows = sideBySide(runs.map(({ readings, settings }) => labelled(readings, settings)));
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
                <HeadCell key={one.head} figure className="min-w-36">
                  {one.head}
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
                    <Cell key={runs[k]!.head} figure>
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
  return <span className="block text-quiet text-xs">{movedInWords(from.value, to.value, to.unit)}</span>;
}

/** "+1.20 mV, +2.4 %": as it is and in relation to the first; the first alone where that is 0 or a part of a relation too small to say. */
export function movedInWords(from: number, to: number, unit: string): string {
  const by = to - from;
  // Closer than the digits that rounding leaves is no movement.
  if (Math.abs(by) <= 1e-11 * Math.abs(from)) return "the same";
  const signed = (text: string) => `${by < 0 ? "\u2212" : "+"}${text}`;
  const moved = signed(formatQuantity(Math.abs(by), unit, 3));
  const percent = Math.abs((100 * by) / from);
  if (!Number.isFinite(percent) || percent < 0.0005 || percent >= 1000) return moved;
  const digits = Math.max(0, Math.min(3, 1 - Math.floor(Math.log10(percent))));
  const relation = `${percent.toFixed(digits)}\u202f%`;
  return `${moved}, ${by / from < 0 ? "\u2212" : "+"}${relation}`;
}
