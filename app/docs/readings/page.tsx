import type { Metadata } from "next";
import { LiveExample } from "@/app/_components/live-example/live-example";
import { format } from "@/lib/language/format";
import { REDUCTIONS } from "@/lib/language/reductions";
import { DocsPage, Entry, Points, Section, Text } from "../_parts/docs-page";
import { FilterField } from "../_parts/filter-field";
import { Formula } from "../_parts/math";
import { Prose } from "../_parts/prose";
import { Sample, titleOf } from "../_parts/sample";
import { Forms } from "../language/statement-entry";
import { CONTRACT_SAMPLE, Judging, Points as PointAccount, Statistics } from "./judging";
import { REDUCTION_TEXTS, readingNetlist } from "./reductions";
import { RELATIONS } from "./relations";

export const metadata: Metadata = { title: "Readings" };

const NAMES = Object.keys(REDUCTIONS) as (keyof typeof REDUCTIONS)[];

const OUTLINE = [
  { id: "readings", label: "How a reading is made" },
  ...NAMES.map((name) => ({ id: `reading.${name}`, label: name })),
  { id: "windows", label: "Windows" },
  { id: "margins", label: "Relations and margins" },
  { id: "verdicts", label: "Verdicts" },
  { id: "draws", label: "Draws and yield" },
  { id: "budget", label: "Error budget" },
  { id: "points", label: "Solved and proved" },
];

const RULES = [
  "A reading goes along the first sweep, once for each setting of the other sweeps and each draw.",
  "It sees the points in its windows, all of them without a window. If one of these has no value, neither has the reading.",
  "Knobs and values in it are nominal; only the circuit is drawn.",
  "Reductions may stand inside each other and in arithmetic: `highest(abs(deviation(out))) / 1 mV`.",
] as const;

export default function ReadingsPage() {
  return (
    <DocsPage
      title="Readings"
      lead="How a trace becomes a number, how the number is judged, and what the figures of a run mean."
      outline={OUTLINE}
    >
      <FilterField what="slope, margin, no data" />
      <Section id="readings" title="How a reading is made">
        <Points items={RULES.map((rule) => <Prose key={rule}>{rule}</Prose>)} />
        <Text>
          <Prose>
            {
              "In the formulas $y_k$ is the trace and $x_k$ the first knob at the $n$ points of the windows. Each example is read from this sweep of a junction with 4 Ω, over six decades:"
            }
          </Prose>
        </Text>
        <LiveExample text={format(readingNetlist("")).trimEnd()} title="The sweep of the examples" />
        {NAMES.map((name) => (
          <Reduction key={name} name={name} />
        ))}
      </Section>
      <Section id="windows" title="Windows">
        <Forms forms={["for KNOB in LOW .. HIGH", "at KNOB = VALUE"]} />
        <Points
          items={[
            <Prose key="ends">
              Both ends belong to a window. Several windows may be given; a point lies in all of them.
            </Prose>,
            <Prose key="empty">
              {
                "A window without a point of the plan is an error (CON1), so nothing holds for want of points."
              }
            </Prose>,
            <Prose key="handed">
              A requirement keeps to the windows of the readings that it uses, and may narrow them further by
              other knobs.
            </Prose>,
          ]}
        />
      </Section>
      <Section id="margins" title="Relations and margins">
        <Text>
          The margin is the distance to what would break a requirement, in the unit of its value. The margin
          of a run is the least over all points and draws that count.
        </Text>
        {RELATIONS.map(({ id, form, margin, says }) => (
          <Entry key={id} id={`relation.${id}`} title={<code>{form}</code>}>
            <Formula>{margin}</Formula>
            <Text>
              <Prose>{says}</Prose>
            </Text>
          </Entry>
        ))}
        <LiveExample text={format(CONTRACT_SAMPLE).trimEnd()} title={titleOf(CONTRACT_SAMPLE)} />
      </Section>
      <Judging />
      <Statistics />
      <PointAccount />
    </DocsPage>
  );
}

function Reduction({ name }: { readonly name: keyof typeof REDUCTIONS }) {
  const { about, gives } = REDUCTIONS[name];
  const { form, formula, unit, rules, sample } = REDUCTION_TEXTS[name];
  return (
    <Entry id={`reading.${name}`} title={<code>{form}</code>}>
      <Text>
        {about[0]!.toUpperCase()}
        {about.slice(1)}. {gives === "point" ? "One value a point" : "One value a sweep"}; its unit is {unit}.
      </Text>
      <Formula>{formula}</Formula>
      <Points items={rules.map((rule) => <Prose key={rule}>{rule}</Prose>)} />
      <Sample text={readingNetlist(sample)} shown={sample} title={`Reading: ${name}`} />
    </Entry>
  );
}
