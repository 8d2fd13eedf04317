import type { Metadata } from "next";
import { LiveExample } from "@/app/_components/live-example/live-example";
import type { ElementKind } from "@/lib/language/ast";
import { format } from "@/lib/language/format";
import { KINDS } from "@/lib/language/kinds";
import { ROOM_TEMPERATURE, thermalVoltage } from "@/lib/units/constants";
import { formatQuantity } from "@/lib/units/quantity";
import { DocsPage, Points, Section, Text } from "../_parts/docs-page";
import { Formula } from "../_parts/math";
import { Prose } from "../_parts/prose";
import { Sample, titleOf } from "../_parts/sample";
import { MODELS, TEMPERATURE } from "./equations";
import { ParameterTable } from "./parameter-table";

export const metadata: Metadata = { title: "Models" };

const ORDER = Object.keys(KINDS) as ElementKind[];

/** Kinds whose example is tried out rather than read. */
const LIVE: ReadonlySet<ElementKind> = new Set<ElementKind>(["diode", "npn", "opamp"]);

const OUTLINE = [
  { id: "temperature", label: "Temperature" },
  ...ORDER.map((kind) => ({ id: kind, label: kind })),
  { id: "left-out", label: "What is left out" },
];

export default function ModelsPage() {
  return (
    <DocsPage
      title="Models"
      lead="Which equations stand behind each kind of part, every parameter with its unit and range, and where the equations come from."
      outline={OUTLINE}
    >
      <Temperature />
      {ORDER.map((kind) => (
        <Model key={kind} kind={kind} />
      ))}
      <Section id="left-out" title="What is left out">
        <Text>
          All models are static. Charge storage, noise and self-heating are not in them, nor is anything that
          a board adds: leakage along its surface, thermocouples, interference. A result is a proof about
          these equations.
        </Text>
      </Section>
    </DocsPage>
  );
}

function Temperature() {
  return (
    <Section id="temperature" title="Temperature">
      <Text>
        The knob <code>temperature</code> is the ambient of the whole circuit, 25 °C where the file sets
        nothing. It enters every junction through the thermal voltage, with the exact constants of the SI; at
        25 °C it is {formatQuantity(thermalVoltage(ROOM_TEMPERATURE), "V", 6)}.
      </Text>
      <Formula>{TEMPERATURE.thermalVoltage}</Formula>
      <Text>
        The saturation current of a diode or transistor is given at <code>T0</code>. With <code>Eg</code> or{" "}
        <code>x</code> it rises with temperature; without both it stays as it is. The leakage currents of a
        transistor follow the same law with their own ideality.
      </Text>
      <Formula>{TEMPERATURE.saturation}</Formula>
      <p className="mt-2 text-quiet text-sm">
        Sources: SI Brochure, 9th ed., BIPM 2019; Sze and Ng, Physics of Semiconductor Devices, 3rd ed.
        (2007), section 2.3 (from memory).
      </p>
    </Section>
  );
}

function Model({ kind }: { readonly kind: ElementKind }) {
  const { pins, about } = KINDS[kind];
  const { equations, sources, remarks, sample } = MODELS[kind];
  return (
    <Section id={kind} title={<code>{kind}</code>}>
      <Text>{`${about[0]!.toUpperCase()}${about.slice(1)}.`}</Text>
      <p className="mt-1 text-quiet text-sm">
        Pins: <code>{pins.join(", ")}</code>
      </p>
      {equations.map(({ says, formulas }) => (
        <div key={says}>
          <Text>
            <Prose>{says}</Prose>
          </Text>
          {formulas.map((formula) => (
            <Formula key={formula}>{formula}</Formula>
          ))}
        </div>
      ))}
      <ParameterTable kind={kind} />
      {remarks.length > 0 && <Points items={remarks.map((text) => <Prose key={text}>{text}</Prose>)} />}
      {LIVE.has(kind) ? (
        <LiveExample text={format(sample).trimEnd()} title={titleOf(sample)} hasKnobs />
      ) : (
        <Sample text={sample} />
      )}
      {sources.length > 0 && (
        <p className="mt-2 text-quiet text-sm">Sources: {sources.map(({ cites }) => cites).join("; ")}.</p>
      )}
    </Section>
  );
}
