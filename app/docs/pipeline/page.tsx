import type { Metadata } from "next";
import Link from "next/link";
import { CODES, COMMANDS, FILES } from "@/lib/cli/commands";
import type { Command } from "@/lib/cli/options";
import { DocsPage, Entry, Points, Section, Text } from "../_parts/docs-page";
import { Lines } from "../_parts/lines";
import { Prose } from "../_parts/prose";
import { ReferenceTable } from "../_parts/reference-table";
import { RECIPES, REPORTS } from "./recipes";

export const metadata: Metadata = { title: "Command line" };

const OUTLINE = [
  { id: "start", label: "Start" },
  ...COMMANDS.map(({ name }) => ({ id: `command.${name}`, label: name })),
  { id: "codes", label: "Exit codes" },
  { id: "reports", label: "Reports" },
  { id: "pipelines", label: "In a pipeline" },
];

const START_RULES = [
  "It needs no server, no account and no network: the engine is the one that the service runs, and gives the same bytes.",
  "Results go to stdout, progress and complaints to stderr. `--output` writes to a file what would go to stdout.",
  "It takes larger circuits than the service, which many share; the figures stand under the limits of the language.",
] as const;

export default function PipelinePage() {
  return (
    <DocsPage
      title="Command line"
      lead="The same checks and the same proofs on files, for a terminal and for a pipeline that has to say no."
      outline={OUTLINE}
    >
      <Section id="start" title="Start">
        <Lines text={"npx sweepwright run examples/absorbance-head.swn\nnpx sweepwright run --help"} />
        <Text>
          <Prose>{FILES}</Prose> Options may stand anywhere; <code>--</code> ends them.
        </Text>
        <Points items={START_RULES.map((text) => <Prose key={text}>{text}</Prose>)} />
        <Text>
          <Link href="/docs/language#limits" className="link">
            Limits of the language
          </Link>
        </Text>
      </Section>
      {COMMANDS.map((command) => (
        <CommandSection key={command.name} command={command} />
      ))}
      <Section id="codes" title="Exit codes">
        <Text>Of several files the gravest counts.</Text>
        <ReferenceTable
          caption="Exit codes"
          heads={["Code", "Means"]}
          rows={CODES.map(([code, means]) => ({
            id: `code.${code}`,
            cells: [<code key="code">{code}</code>, means],
          }))}
        />
      </Section>
      <Section id="reports" title="Reports">
        <Written all={REPORTS} />
      </Section>
      <Section id="pipelines" title="In a pipeline">
        <Written all={RECIPES} />
      </Section>
    </DocsPage>
  );
}

function CommandSection({ command: { name, about, options, notes } }: { readonly command: Command }) {
  return (
    <Section id={`command.${name}`} title={<code>{`sweepwright ${name}`}</code>}>
      <Text>{`${about[0]!.toUpperCase()}${about.slice(1)}.`}</Text>
      <ReferenceTable
        caption={`Options of ${name}`}
        heads={["Option", "Does"]}
        rows={options.map((option) => ({
          id: `option.${name}.${option.name}`,
          cells: [
            <code key="option" className="whitespace-nowrap">
              {`--${option.name}${option.takes === null ? "" : ` ${option.takes}`}`}
            </code>,
            <Prose key="about">{option.about}</Prose>,
          ],
        }))}
      />
      <Points items={notes.map((note) => <Prose key={note}>{note}</Prose>)} />
    </Section>
  );
}

interface Written {
  readonly id: string;
  readonly title: string;
  readonly says: string;
  readonly lines: string;
}

/** What one writes, or reads, each after a sentence about it. */
function Written({ all }: { readonly all: readonly Written[] }) {
  return all.map(({ id, title, says, lines }) => (
    <Entry key={id} id={id} title={title}>
      <Text>
        <Prose>{says}</Prose>
      </Text>
      <Lines text={lines} />
    </Entry>
  ));
}
