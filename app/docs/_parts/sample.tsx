import { LiveWhenAsked } from "@/app/_components/live-example/live-when-asked";
import { NetlistText } from "@/app/_components/ui/netlist-text";
import { StateBadge } from "@/app/_components/ui/state-badge";
import { format } from "@/lib/language/format";
import { solved } from "./solved";

/**
 * A whole netlist of a page, or the part of it that is `shown`, and beneath it what it reads and whether it holds, solved as the page
 * is made. It can be tried in its place.
 */
export function Sample({
  text,
  shown = text,
  title = titleOf(text),
}: {
  readonly text: string;
  readonly shown?: string;
  readonly title?: string;
}) {
  const answer = solved(text);
  const hasAnswer = answer !== null && answer.readings.length + answer.requirements.length > 0;
  return (
    <LiveWhenAsked text={format(text).trimEnd()} title={title}>
      <NetlistText text={format(shown).trimEnd()} />
      {hasAnswer && (
        <dl className="flex flex-wrap gap-x-6 gap-y-1 border-y py-1.5 text-sm">
          {answer.readings.map(({ name, value }) => (
            <div key={name} className="flex gap-2">
              <dt className="text-quiet">
                <code>{name}</code>
              </dt>
              <dd className="figures">{value}</dd>
            </div>
          ))}
          {answer.requirements.map(({ label, verdict, margin }) => (
            <div key={label} className="flex gap-2">
              <dt className="text-quiet">{label}</dt>
              <dd>
                <StateBadge state={verdict} /> <span className="text-quiet">margin {margin}</span>
              </dd>
            </div>
          ))}
        </dl>
      )}
    </LiveWhenAsked>
  );
}

/** The title that a netlist gives itself. */
export function titleOf(text: string): string {
  return /^title "([^"]*)"/.exec(text)?.[1] ?? "A netlist";
}
