import type { Metadata } from "next";
import Link from "next/link";
import type { ElementKind } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import { DocsPage, Points, Section, Text } from "../_parts/docs-page";
import { FilterField } from "../_parts/filter-field";
import { Prose } from "../_parts/prose";
import { ReferenceTable } from "../_parts/reference-table";
import { Sample } from "../_parts/sample";
import { LimitTable } from "./limit-list";
import { StatementEntry } from "./statement-entry";
import { STATEMENTS, WIRING } from "./statements";
import { TOLERANCE_SAMPLE, TOLERANCES } from "./tolerances";
import {
  ConstantTable,
  FunctionTable,
  OperatorTable,
  PrefixList,
  SignalTable,
  UnitTable,
} from "./vocabulary";

export const metadata: Metadata = { title: "Language" };

const OUTLINE = [
  { id: "text", label: "The text" },
  { id: "values", label: "Values and units" },
  { id: "tolerances", label: "Tolerances" },
  { id: "statements", label: "Statements" },
  ...Object.keys(STATEMENTS).map((word) => ({ id: `statement.${word}`, label: word })),
  { id: "wiring", label: "Wiring" },
  { id: "kinds", label: "Kinds" },
  { id: "signals", label: "Signals" },
  { id: "expressions", label: "Expressions" },
  { id: "functions", label: "Functions" },
  { id: "constants", label: "Constants" },
  { id: "limits", label: "Limits" },
];

const TEXT_RULES = [
  "A statement stands on one line. It goes on in the next one after `--`, an operator, a comma, a colon or an open bracket.",
  "A comment begins with `#` and ends with its line.",
  "The order of statements is free, but a reading uses only those before it.",
  "Capitals count. A name begins with a letter or `_` and goes on with letters, digits and `_`; it means one thing in its file or block.",
  "The formatter knows one spelling and one spacing for everything and keeps comments; two texts with one canonical form are the same revision.",
] as const;

const VALUE_RULES = [
  "Every quantity carries a unit: `4.7 kΩ`, `-2 mV/K`, `20 ppm/K`. A pure number carries none.",
  "Prefixes count their case: `m` is milli, `M` is mega. A prefix without its unit is an error that proposes the unit (UNI2).",
  "Units combine with `·` and `/` and powers: `A/V²`, `1/K`. In expressions they are checked as dimensions: `V / Ω` is A.",
  "`ohm`, `u`, `degC` and `+-` are read as Ω, µ, °C and ±; the formatter writes the latter.",
  "`25 °C` is a point on the scale, 298.15 K. Differences are in K: `± 5 °C` proposes `± 5 K` (UNI6).",
] as const;

function prose(words: string) {
  return <Prose>{words}</Prose>;
}

export default function LanguagePage() {
  return (
    <DocsPage
      title="Language"
      lead="A netlist is one text: what is wired, what is turned, and what must hold. This is everything that may stand in it."
      outline={OUTLINE}
    >
      <FilterField what="sweep, tolerance, current into a pin" />
      <Section id="text" title="The text">
        <Points items={TEXT_RULES.map(prose)} />
      </Section>
      <Section id="values" title="Values and units">
        <Points items={VALUE_RULES.map(prose)} />
        <UnitTable />
        <p className="caption mt-5">Prefixes</p>
        <PrefixList />
      </Section>
      <Section id="tolerances" title="Tolerances">
        <Text>
          A tolerance is part of the value it follows: in <code>let</code>, <code>knob</code>, a model, or
          behind the value of an element. Each part draws it for itself.
        </Text>
        <ReferenceTable
          caption="Tolerances"
          heads={["Written", "Means"]}
          rows={TOLERANCES.map(({ id, form, says }) => ({
            id,
            cells: [<code key="form">{form}</code>, prose(says)],
          }))}
        />
        <Sample text={TOLERANCE_SAMPLE} />
      </Section>
      <Section id="statements" title="Statements">
        {Object.entries(STATEMENTS).map(([word, statement]) => (
          <StatementEntry
            key={word}
            id={`statement.${word}`}
            title={<code>{word}</code>}
            statement={statement}
          />
        ))}
      </Section>
      <Section id="wiring" title="Wiring">
        {Object.entries(WIRING).map(([name, { title, ...statement }]) => (
          <StatementEntry key={name} id={`wiring.${name}`} title={title} statement={statement} />
        ))}
      </Section>
      <Section id="kinds" title="Kinds">
        <Text>
          What stands after the colon of a part. Its equations and parameters are on the page of the{" "}
          <Link href="/docs/models" className="link">
            models
          </Link>
          .
        </Text>
        <KindTable />
      </Section>
      <Section id="signals" title="Signals">
        <Text>
          What a solved circuit has: voltages, currents, powers. They stand in <code>show</code>, laws,
          readings and requirements, and nowhere else.
        </Text>
        <SignalTable text={prose} />
      </Section>
      <Section id="expressions" title="Expressions">
        <OperatorTable />
      </Section>
      <Section id="functions" title="Functions">
        <Text>
          A logarithm or an exponential wants a pure number, so one writes <code>log10(out.v / 1 V)</code>.
          What goes along a whole sweep stands under{" "}
          <Link href="/docs/readings" className="link">
            readings
          </Link>
          .
        </Text>
        <FunctionTable />
      </Section>
      <Section id="constants" title="Constants">
        <ConstantTable />
      </Section>
      <Section id="limits" title="Limits">
        <Text>Beyond them the answer is one diagnostic, at once.</Text>
        <LimitTable />
      </Section>
    </DocsPage>
  );
}

function KindTable() {
  return (
    <ReferenceTable
      caption="Kinds"
      heads={["Kind", "Is", "Pins", "Takes"]}
      rows={(Object.keys(KINDS) as ElementKind[]).map((kind) => {
        const { pins, about, follows, value } = KINDS[kind];
        const takes = {
          value: `a value in ${value?.unit}`,
          model: "a model",
          law: "volts or amps",
          parameters: "parameters",
        }[follows];
        return {
          id: `kind.${kind}`,
          cells: [<code key="kind">{kind}</code>, about, <code key="pins">{pins.join(", ")}</code>, takes],
        };
      })}
      spare={[2, 3]}
      small={({ cells }) => (
        <>
          {cells[2]}; takes {cells[3]}
        </>
      )}
    />
  );
}
