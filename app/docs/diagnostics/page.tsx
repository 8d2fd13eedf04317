import type { Metadata } from "next";
import { CATALOGUE, type Code } from "@/lib/language/catalogue";
import { DocsPage, Entry, Section, Text } from "../_parts/docs-page";
import { FilterField } from "../_parts/filter-field";
import { Prose } from "../_parts/prose";
import { answered } from "./answered";

export const metadata: Metadata = { title: "Diagnostics" };

/** Families of codes, in the order in which a text is read. */
const FAMILIES: readonly { readonly id: string; readonly title: string; readonly says: string }[] = [
  { id: "TXT", title: "Characters and numbers", says: "The text cannot be cut into words." },
  { id: "FRM", title: "Form", says: "Words that do not make a statement." },
  { id: "NAM", title: "Names", says: "Names that are taken, missing, or mean something else." },
  { id: "UNI", title: "Units and values", says: "Quantities that do not fit their place." },
  {
    id: "WIR",
    title: "Wiring",
    says: "Circuits that no solution, or more than one, can belong to, found before anything is solved.",
  },
  { id: "PLN", title: "Plan", says: "Sweeps, draws and traces." },
  { id: "CON", title: "Contract", says: "Readings and requirements that could never be judged." },
  { id: "CAP", title: "Size limits", says: "More than a machine that many share does for one file." },
];

const CODES = Object.keys(CATALOGUE) as Code[];

export default function DiagnosticsPage() {
  return (
    <DocsPage
      title="Diagnostics"
      lead="Every code that a netlist can be answered with. Each example is put to the checker as this page is made: what it says, and the fix that it offers, are its own words."
      outline={FAMILIES.map(({ id, title }) => ({ id, label: title }))}
    >
      <FilterField what="NAM3, tolerance, ground" />
      {FAMILIES.map(({ id, title, says }) => (
        <Section key={id} id={id} title={title}>
          <Text>{says}</Text>
          {CODES.filter((code) => code.startsWith(id)).map((code) => (
            <Diagnosed key={code} code={code} />
          ))}
        </Section>
      ))}
    </DocsPage>
  );
}

function Diagnosed({ code }: { readonly code: Code }) {
  const { severity, message, line, fix } = answered(code);
  const [before, fault, behind] = line;
  const isEmpty = line.join("").trim() === "";
  return (
    <Entry
      id={code}
      title={
        <>
          <code>{code}</code> {CATALOGUE[code]}
        </>
      }
    >
      {!isEmpty && (
        <p className="figures mt-1 break-words border-l-2 bg-wash py-1 pr-3 pl-4 text-[0.8125rem] leading-6">
          {before}
          <mark className="bg-transparent text-inherit underline decoration-2 decoration-broken decoration-wavy underline-offset-4">
            {fault}
          </mark>
          {behind}
        </p>
      )}
      <p className="mt-1.5 max-w-2xl text-sm">
        <span className={severity === "error" ? "text-broken" : "text-nodata"}>
          {severity === "error" ? "Error" : "Warning"}
        </span>
        {": "}
        <Prose>{message}</Prose>
      </p>
      {fix !== null && (
        <p className="mt-1 text-sm">
          <span className="text-holds">Fix</span>
          {`: ${fix.title}. `}
          {fix.line.trim() !== "" && <code className="break-words text-quiet">{fix.line}</code>}
        </p>
      )}
    </Entry>
  );
}
