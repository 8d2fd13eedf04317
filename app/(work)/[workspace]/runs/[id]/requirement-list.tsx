import Link from "next/link";
import { Button } from "@/app/_components/ui/button";
import { formatCount } from "@/app/_components/ui/count";
import { MarginBar } from "@/app/_components/ui/margin-bar";
import { limitsInWords, marginSentence, placeInWords, worstInWords } from "@/app/_components/ui/margin-words";
import { StateBadge } from "@/app/_components/ui/state-badge";
import type { RequirementDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import type { TextLinks } from "./text-links";

interface Props {
  readonly requirements: readonly RequirementDocument[];
  readonly links: TextLinks;
  /** The run is not whole: what is judged is what it has. */
  readonly partly: "so far" | "of a part of the run" | null;
  /** Puts cursor and draw to the worst place of a requirement. */
  readonly onPlace: (worst: NonNullable<RequirementDocument["worst"]>, label: string) => void;
}

const ORDER = { broken: 0, "no data": 1, holds: 2 } as const;

/** What the netlist requires and how it came out, the broken first: verdict, margin bar, worst value with its place, yield. */
export function RequirementList({ requirements, links, partly, onPlace }: Props) {
  if (requirements.length === 0) return null;
  const numbered = requirements.map((one, index) => ({ one, index }));
  numbered.sort((a, b) => ORDER[a.one.verdict] - ORDER[b.one.verdict] || a.index - b.index);
  return (
    <section aria-labelledby="requirements" className="@container min-w-0">
      <Headline requirements={requirements} partly={partly} />
      <ul className="mt-2 border-t">
        {numbered.map(({ one, index }) => (
          <li key={index} className="grid gap-1 border-b py-2.5" data-requirement={one.verdict}>
            <p className="sr-only">{marginSentence(one)}</p>
            <div
              aria-hidden="true"
              className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-3 gap-y-1 @md:grid-cols-[4.5rem_minmax(0,1fr)_minmax(4rem,7rem)_8.5rem]"
            >
              <span className="justify-self-end @md:justify-self-start">
                <StateBadge state={one.verdict} />
              </span>
              <span className="order-first min-w-0 break-words font-semibold text-sm @md:order-none">
                {one.label}
              </span>
              <span className="min-w-0">
                <MarginBar requirement={one} decorative />
              </span>
              <span className="figures min-w-24 text-right leading-tight @md:min-w-0">
                {worstInWords(one)}
                <span className="block text-quiet text-xs">{limitsInWords(one)}</span>
              </span>
            </div>
            <p className="flex flex-wrap items-baseline gap-x-3 text-quiet text-xs @md:pl-[5.25rem]">
              <Remainder one={one} />
              {one.worst !== null && placeInWords(one) !== "" && (
                <Button
                  size="small"
                  tone="quiet"
                  className="figures min-h-6! whitespace-normal! px-0! text-left! font-normal! underline decoration-edge underline-offset-3"
                  aria-label={`Show the worst place of ${one.label}: ${placeInWords(one)}`}
                  onClick={() => onPlace(one.worst!, one.label)}
                >
                  {placeInWords(one)}
                </Button>
              )}
              <LineLink line={links.requirementLines[index]} links={links} label={one.label} />
            </p>
            {one.remark !== undefined && (
              <p className="border-nodata border-l-2 pl-2 text-xs @md:ml-[5.25rem]">{one.remark}</p>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}

/** "One requirement is broken, 3 hold", in the colour of the worst. */
function Headline({ requirements, partly }: Pick<Props, "requirements" | "partly">) {
  const count = (verdict: RequirementDocument["verdict"]) =>
    requirements.filter((one) => one.verdict === verdict).length;
  const [broken, unknown, holds] = [count("broken"), count("no data"), count("holds")];
  const held = holds === 0 ? "" : `${formatCount(holds)} ${holds === 1 ? "holds" : "hold"}`;
  const [first, ink, rest] =
    broken > 0
      ? [countedAs(broken, "is broken", "are broken"), "text-broken", held]
      : unknown > 0
        ? [countedAs(unknown, "has no data", "have no data"), "text-nodata", held]
        : [requirements.length === 1 ? "The requirement holds" : "All requirements hold", "text-holds", ""];
  const between = broken > 0 && unknown > 0 ? `${formatCount(unknown)} without data` : "";
  return (
    <h2 id="requirements" className="text-base">
      <span className={ink}>{first}</span>
      <span className="font-normal text-quiet text-sm">
        {[between, rest, partly].filter(Boolean).map((words) => ` · ${words}`)}
      </span>
    </h2>
  );
}

function countedAs(count: number, one: string, many: string): string {
  return count === 1 ? `One requirement ${one}` : `${formatCount(count)} requirements ${many}`;
}

/** Margin and yield. */
function Remainder({ one }: { readonly one: RequirementDocument }) {
  const { margin, unit, verdict, yield: found, share } = one;
  const percent = (part: number) => `${Number((100 * part).toFixed(1))}\u202f%`;
  const parts: string[] = [];
  if (margin === null)
    parts.push(verdict === "no data" ? "a point that it needs is not solved" : "without a margin");
  else if (margin < 0) parts.push(`missed by ${formatQuantity(-margin, unit, 3)}`);
  else parts.push(`margin ${formatQuantity(margin, unit, 3)}`);
  if (found !== undefined && verdict === "no data") {
    parts.push(`known to hold in ${formatCount(found.holds)} of ${formatCount(found.of)} draws`);
  } else if (found !== undefined) {
    const needed = share == null ? "" : `, ${percent(share)} needed`;
    parts.push(
      `${formatCount(found.holds)} of ${formatCount(found.of)} draws hold${needed}: ${percent(found.low)} to ${percent(found.high)} of boards (95\u202f% confidence)`,
    );
  }
  return <span>{parts.join("; ")}</span>;
}

export function LineLink({
  line,
  links,
  label,
}: {
  readonly line: number | undefined;
  readonly links: TextLinks;
  readonly label: string;
}) {
  if (line === undefined) return null;
  return (
    <Link
      href={links.lineHref(line)}
      prefetch={false}
      aria-label={`Line ${line} of the netlist, where ${label} stands`}
      className="figures inline-flex min-h-6 items-center text-xs underline decoration-edge underline-offset-3 hover:decoration-ink"
    >
      line {line}
    </Link>
  );
}
