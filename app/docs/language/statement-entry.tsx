import type { ReactNode } from "react";
import { LiveExample } from "@/app/_components/live-example/live-example";
import { format } from "@/lib/language/format";
import { Entry, Points, Text } from "../_parts/docs-page";
import { Prose } from "../_parts/prose";
import { Sample, titleOf } from "../_parts/sample";
import type { StatementText } from "./statements";

/** Statements whose example is tried out rather than read. */
const LIVE: ReadonlySet<string> = new Set(["statement.sweep", "statement.require"]);

/** A statement: its forms, what it says, what it asks, and a whole netlist that uses it. */
export function StatementEntry({
  id,
  title,
  statement: { forms, says, rules, sample },
}: {
  readonly id: string;
  readonly title: ReactNode;
  readonly statement: StatementText;
}) {
  return (
    <Entry id={id} title={title}>
      <Forms forms={forms} />
      <Text>
        <Prose>{says}</Prose>
      </Text>
      <Points items={rules.map((rule) => <Prose key={rule}>{rule}</Prose>)} />
      {sample !== null &&
        (LIVE.has(id) ? (
          <LiveExample text={format(sample).trimEnd()} title={titleOf(sample)} />
        ) : (
          <Sample text={sample} />
        ))}
    </Entry>
  );
}

/** Ways to write something; capitals stand for what one fills in. */
export function Forms({ forms }: { readonly forms: readonly string[] }) {
  return (
    <p className="figures mt-2 whitespace-pre-wrap break-words border-l-2 bg-wash py-1.5 pr-3 pl-4 text-[0.8125rem] leading-6">
      {forms.join("\n")}
    </p>
  );
}
