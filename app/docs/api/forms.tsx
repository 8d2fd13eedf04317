import { Points, Section, Text } from "../_parts/docs-page";
import { Prose } from "../_parts/prose";
import { ReferenceTable } from "../_parts/reference-table";

/** What a run document has, in the words of lib/analyses/result.ts. */
export const DOCUMENT_FIELDS: readonly (readonly [name: string, says: string])[] = [
  ["format", '`"sweepwright-run/1"`. Within this format fields are only added.'],
  ["title", "The title of the netlist."],
  ["verdict", "`holds`, `broken` or `no data`."],
  ["axes", "The sweeps, the first one first: `{ knob, unit, scale, values }`."],
  ["draws", "Random draws; the nominal design comes before them."],
  ["traces", "`{ name, unit, values }`, one value a point, null where it is not solved."],
  [
    "points",
    "`{ outcome, bound, iterations, rung }`, each with one entry a point. `bound` is in V, null without a proof.",
  ],
  ["readings", "`{ name, unit, per, values }`, one value a sweep of the first knob, or one a point."],
  ["requirements", "`{ label, verdict, margin, unit, worst, yield, share, allowed, value, … }`."],
  ["diagnostics", "`{ code, severity, from, to, line, column, message, fix? }`."],
  ["failures", "Points that were not solved: `{ point, outcome, unsettled }`."],
  ["unstable", "Ranges of points that are solved and that the circuit would leave."],
  ["branches", "All operating points, where the text seeks several."],
];

export function RunDocument() {
  return (
    <Section id="run-document" title="The run document">
      <Text>
        <Prose>
          {
            "What `GET /api/v1/runs/{id}` gives as JSON, and `sweepwright run --json` too. Values of points are flat: the first axis fastest, then the others, then the draws."
          }
        </Prose>
      </Text>
      <ReferenceTable
        caption="Fields of the run document"
        heads={["Field", "Holds"]}
        rows={DOCUMENT_FIELDS.map(([name, says]) => ({
          id: `document.${name}`,
          cells: [<code key="name">{name}</code>, <Prose key="says">{says}</Prose>],
        }))}
      />
    </Section>
  );
}

export function Columns() {
  return (
    <Section id="columns" title="Binary columns">
      <Text>
        The run document for readers of many numbers. All is little-endian, and each part begins at a multiple
        of eight bytes.
      </Text>
      <Points
        items={[
          <Prose key="mark">{"Eight bytes of text, `swcolumn`."}</Prose>,
          <Prose key="columns">
            {
              "Columns of Float64, one value a point, NaN where there is none: `trace/k`, `read/k` of a reading per point, `bound` in V, `outcome` as an index into `outcomes`; `axis/k` has the values of an axis."
            }
          </Prose>,
          <Prose key="head">
            {
              "The head: JSON in UTF-8, filled up with blanks. It is the run document without its columns; `columns` names these in the order in which they lie, `points` is their length, and the `count` of an axis that of its column."
            }
          </Prose>,
          <Prose key="length">
            {"The length of the head in bytes, as Float64: the last eight bytes. Begin to read there."}
          </Prose>,
        ]}
      />
    </Section>
  );
}
