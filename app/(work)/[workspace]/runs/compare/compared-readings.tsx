import { counted } from "@/app/_components/ui/count";
import { onePrefix } from "@/app/_components/ui/one-prefix";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { ReadingDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { listedBeside } from "../[id]/spread/subjects";
import { UnlistedSettings } from "../[id]/unlisted-settings";
import { type SideBySide, sideBySide } from "./side-by-side";

/** A run as its readings are compared. */
export interface ReadRun {
  /** What stands over its column. */
  readonly head: string;
  readonly readings: readonly ReadingDocument[];
  /** Its first settings in words, in the order in which readings are kept; one empty text where it has none. */
  readonly settings: readonly string[];
  /** How many it has. */
  readonly settingCount: number;
}

/** Rows of the table, at most: readings of runs that have no name in common stand below each other. */
const MOST_ROWS = 6_000;

/** The nominal readings of all runs at each setting, and how far they lie from those of the first run, as they are and in relation. */
export function ComparedReadings({ runs }: { readonly runs: readonly ReadRun[] }) {
  const all = sideBySide(runs.map(labelled));
  if (all.length === 0) return null;
  const rows = all.slice(0, MOST_ROWS);
  const largest = largestOf(rows);
  const shortened = runs.find((one) => listedOf(one).length < one.settingCount);
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
              return (
                <tr key={label}>
                  <Cell className="min-w-32">{label}</Cell>
                  {each.map((one, k) => (
                    <Cell key={runs[k]!.head} figure>
                      {one === null ? <span className="text-quiet">not read</span> : written(one, largest)}
                      {k > 0 && <Moved from={first ?? null} to={one} />}
                    </Cell>
                  ))}
                </tr>
              );
            })}
          </tbody>
        </Table>
      </TableFrame>
      {shortened !== undefined && (
        <UnlistedSettings listed={listedOf(shortened).length} count={shortened.settingCount} />
      )}
      {rows.length < all.length && (
        <p className="mt-1 text-quiet text-sm">
          {counted(all.length - rows.length, "row")} more are left out.
        </p>
      )}
    </section>
  );
}

/** The values of each reading that are shown, at every setting and in every run, by its name and unit: the largest alone. */
function largestOf(rows: readonly SideBySide<Read>[]): Map<string, number> {
  const found = new Map<string, number>();
  for (const one of rows.flatMap(({ each }) => each)) {
    if (one?.value == null) continue;
    const key = `${one.name} ${one.unit}`;
    if (Math.abs(one.value) > Math.abs(found.get(key) ?? 0)) found.set(key, one.value);
  }
  return found;
}

interface Read {
  readonly label: string;
  readonly name: string;
  readonly unit: string;
  readonly value: number | null;
}

const numbersOf = ({ readings }: ReadRun) => readings.filter(({ per }) => per === "sweep");

function listedOf(run: ReadRun): readonly string[] {
  return run.settings.slice(0, listedBeside(numbersOf(run).length));
}

function labelled(run: ReadRun): Read[] {
  const settings = listedOf(run);
  return numbersOf(run).flatMap(({ name, unit, values }) =>
    settings.map((setting, row) => ({
      name,
      label: setting === "" ? name : `${name}, ${setting}`,
      unit,
      value: values[row] ?? null,
    })),
  );
}

/** With the prefix of the largest of its reading, so that values can be compared at sight. */
function written({ name, value, unit }: Read, largest: ReadonlyMap<string, number>): string {
  if (value === null) return "no value";
  const { texts, unit: shared } = onePrefix([value, largest.get(`${name} ${unit}`) ?? value], unit, 6, true);
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
