import Link from "next/link";
import { formatCount } from "@/app/_components/ui/count";
import { spanInWords } from "@/app/_components/ui/one-prefix";
import type { Budget, BudgetPart } from "@/lib/analyses/budget";
import { formatQuantity } from "@/lib/units/quantity";
import type { TextLinks } from "../text-links";

interface Props {
  readonly budget: Budget;
  readonly links: TextLinks;
}

/** Parts that are named one by one, and the share of the variance below which none is. */
const NAMED = 10;
const LEAST = 0.005;
/** Shares that differ by less than their hundredth part are the same. */
const EQUAL = 0.99;

/** What costs a value its accuracy, the costliest first: each part with its share, its effect and the line that gives its tolerance. */
export function BudgetBars({ budget, links }: Props) {
  const { parts, unit, sigma, nominal, low, high } = budget;
  const named = parts.slice(0, NAMED).filter(({ share }) => share >= LEAST);
  const rest = parts.slice(named.length).reduce((sum, { share }) => sum + share, 0);
  const [first] = named;
  const show = (value: number, digits = 3) => formatQuantity(value, unit, digits);
  if (first === undefined)
    return <p className="text-quiet text-sm">No tolerance moves it, to first order.</p>;
  const most = first.share;
  const equal = named.slice(1).filter(({ share }) => share > EQUAL * most);
  return (
    <div className="grid gap-3">
      <p className="text-sm" data-improve={nameOf(first)}>
        {equal.length === 0 ? (
          <>
            Improve <strong className="figures">{nameOf(first)}</strong> first: with half its tolerance
          </>
        ) : (
          <>
            <strong className="figures">{[first, ...equal].map(nameOf).join(", ")}</strong> cost the same, and
            the most: with half the tolerance of each
          </>
        )}{" "}
        the standard deviation falls from {show(sigma)} to{" "}
        {show(sigma * Math.sqrt(1 - 0.75 * (1 + equal.length) * first.share))}.
        <SheetLink part={first} links={links} />
      </p>
      <ol className="grid gap-1.5" aria-label="Parts by their share of the variance">
        {named.map((part) => (
          <li
            key={nameOf(part)}
            className="grid grid-cols-[minmax(6rem,11rem)_minmax(3rem,1fr)_3rem_auto] items-center gap-x-3"
          >
            <PartName part={part} links={links} />
            <span aria-hidden="true" className="h-3">
              <span
                className="block h-full bg-trace-1"
                style={{
                  width: `${(100 * part.share) / most}%`,
                  background: "var(--trace-1)",
                  opacity: part === first ? 1 : 0.5,
                }}
              />
            </span>
            <span className="figures text-right text-xs">{percent(part.share)}</span>
            <span className="figures text-right text-quiet text-xs">
              {part.effect < 0 ? "∓" : "±"}
              {show(Math.abs(part.effect))}
            </span>
          </li>
        ))}
      </ol>
      <p className="text-quiet text-xs">
        Share of the variance, and the change from the upper end of each tolerance.
        {rest >= LEAST && ` ${formatCount(parts.length - named.length)} more parts share ${percent(rest)}.`}
      </p>
      <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-0.5 border-t pt-2 text-xs">
        <Sum name="nominal">{show(nominal, 5)}</Sum>
        <Sum name="standard deviation">{show(sigma)}</Sum>
        <Sum name="worst case, every tolerance at its end">{spanInWords(low, high, unit, 5)}</Sum>
      </dl>
    </div>
  );
}

/** The way to mend the part, where the sheet still has the text of the run. */
function SheetLink({ part, links }: { readonly part: BudgetPart; readonly links: TextLinks }) {
  const line = links.toleranceLines[`${part.part} ${part.parameter}`];
  const href = line === undefined ? null : links.sheetHref(line);
  if (href === null) return null;
  return (
    <>
      {" "}
      <Link className="link" href={href} prefetch={false}>
        Go to {nameOf(part)} in the sheet
      </Link>
    </>
  );
}

function PartName({ part, links }: { readonly part: BudgetPart; readonly links: TextLinks }) {
  const line = links.toleranceLines[`${part.part} ${part.parameter}`];
  const name = <span className="figures break-words text-xs">{nameOf(part)}</span>;
  if (line === undefined) return name;
  return (
    <Link
      href={links.lineHref(line)}
      prefetch={false}
      title={`Line ${line} of the netlist`}
      aria-label={`${nameOf(part)}, line ${line} of the netlist`}
      className="inline-flex min-h-6 min-w-0 items-center underline decoration-edge underline-offset-3 hover:decoration-ink"
    >
      {name}
    </Link>
  );
}

function Sum({ name, children }: { readonly name: string; readonly children: React.ReactNode }) {
  return (
    <>
      <dt className="text-quiet">{name}</dt>
      <dd className="figures text-right text-xs">{children}</dd>
    </>
  );
}

/** "R1", "AD offset", "track pair": the value of a part is the part itself to its reader. */
export function nameOf({ part, parameter }: BudgetPart): string {
  return parameter === "" || parameter === "value" ? part : `${part} ${parameter}`;
}

function percent(share: number): string {
  return share >= 0.0995 ? `${Math.round(100 * share)}\u202f%` : `${(100 * share).toFixed(1)}\u202f%`;
}
