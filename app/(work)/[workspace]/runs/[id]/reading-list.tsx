import { onePrefix } from "@/app/_components/ui/one-prefix";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { AxisDocument, ReadingDocument } from "@/lib/analyses/result";
import { LineLink } from "./requirement-list";
import { listedBeside, settingCount, settingsOf } from "./spread/subjects";
import type { TextLinks } from "./text-links";
import { UnlistedSettings } from "./unlisted-settings";

interface Props {
  readonly readings: readonly ReadingDocument[];
  /** Of the run; the readings go over all but the first. */
  readonly axes: readonly AxisDocument[];
  readonly links: TextLinks;
}

/** Settings that stand side by side as columns; more stand below each other. */
const COLUMNS = 6;

/** The readings of the nominal design at each setting, and how far the draws spread them. */
export function ReadingList({ readings, axes, links }: Props) {
  const numbers = readings.filter(({ per }) => per === "sweep");
  if (numbers.length === 0) return null;
  const count = settingCount(axes);
  const settings = settingsOf(axes, listedBeside(numbers.length));
  const across = count <= COLUMNS;
  return (
    <section aria-labelledby="readings">
      <h2 id="readings" className="caption">
        Readings
      </h2>
      <TableFrame label="Readings" className="mt-1 max-h-112 overflow-y-auto">
        {across ? (
          <Across numbers={numbers} settings={settings} count={count} links={links} />
        ) : (
          <Down numbers={numbers} settings={settings} count={count} />
        )}
      </TableFrame>
      <UnlistedSettings listed={settings.length} count={count} />
    </section>
  );
}

interface TableProps {
  readonly numbers: readonly ReadingDocument[];
  readonly settings: readonly string[];
  /** Settings of the run, of which the first are listed. */
  readonly count: number;
}

/** A row a reading, a column a setting. */
function Across({ numbers, settings, count, links }: TableProps & { readonly links: TextLinks }) {
  return (
    <Table aria-labelledby="readings">
      <thead>
        <tr>
          <HeadCell>Reading</HeadCell>
          {settings.map((words) => (
            <HeadCell key={words} figure className="figures font-normal!">
              {words === "" ? "Nominal" : words}
            </HeadCell>
          ))}
        </tr>
      </thead>
      <tbody>
        {numbers.map((reading) => (
          <tr key={reading.name}>
            <Cell className="break-words">
              {reading.name}{" "}
              <LineLink line={links.readingLines[reading.name]} links={links} label={reading.name} />
            </Cell>
            {settings.map((words, row) => (
              <Cell key={words} figure>
                {written(reading, settings.length)(reading.values[row])}
                <Spread reading={reading} settings={count} listed={settings.length} row={row} />
              </Cell>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

/** A row a setting, a column a reading. */
function Down({ numbers, settings, count }: TableProps) {
  return (
    <Table aria-labelledby="readings">
      <thead>
        <tr>
          <HeadCell>Setting</HeadCell>
          {numbers.map(({ name }) => (
            <HeadCell key={name} figure>
              {name}
            </HeadCell>
          ))}
        </tr>
      </thead>
      <tbody>
        {settings.map((words, row) => (
          <tr key={words}>
            <Cell className="figures">{words}</Cell>
            {numbers.map((reading) => (
              <Cell key={reading.name} figure>
                {written(reading, settings.length)(reading.values[row])}
                <Spread reading={reading} settings={count} listed={settings.length} row={row} />
              </Cell>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

/** Writes values of a reading with the prefix of its largest at any setting, so that they can be compared; six digits of that one. */
function written({ values, unit }: ReadingDocument, settings: number) {
  const known = values.slice(0, settings).filter((value) => value !== null);
  const largest = known.reduce((most, value) => (Math.abs(value) > Math.abs(most) ? value : most), 0);
  return (value: number | null | undefined) => {
    if (value === null || value === undefined) return "no value";
    const { texts, unit: shared } = onePrefix([value, largest], unit, 6, true);
    return shared === "" ? texts[0]! : `${texts[0]}\u202f${shared}`;
  };
}

interface SpreadProps {
  readonly reading: ReadingDocument;
  readonly settings: number;
  readonly listed: number;
  readonly row: number;
}

/** The least and the most of a setting over the random draws; the first rows are the nominal design. */
function Spread({ reading, settings, listed, row }: SpreadProps) {
  const { values } = reading;
  const show = written(reading, listed);
  const drawn: number[] = [];
  let unknown = 0;
  for (let at = settings + row; at < values.length; at += settings) {
    const value = values[at];
    if (value === null || value === undefined) unknown++;
    else drawn.push(value);
  }
  if (drawn.length === 0 && unknown === 0) return null;
  if (drawn.length === 0) return <span className="block text-quiet text-xs">no draw has it</span>;
  const least = drawn.reduce((a, b) => Math.min(a, b));
  const most = drawn.reduce((a, b) => Math.max(a, b));
  return (
    <span className="block text-quiet text-xs">
      {show(least)}
      <br />
      <span className="sr-only">over the draws </span>to {show(most)}
      {unknown > 0 && `, ${unknown} unknown`}
    </span>
  );
}
