import type { RequirementDocument, Verdict } from "@/lib/analyses/result";
import { classNames } from "./class-names";
import { type MarginPlaces, marginPlaces } from "./margin-scale";
import { marginSentence } from "./margin-words";

const INKS: Record<Verdict, string> = {
  holds: "text-holds",
  broken: "text-broken",
  "no data": "text-nodata",
};

/** Heights in px: the whole bar, the allowed band, the spread within it. */
const HEIGHT = 18;
const BAND = 14;
const SPREAD = 6;
const MIDDLE = HEIGHT / 2;

/**
 * One horizontal bar for a requirement: the allowed band, open where it has no limit; the spread of what is compared over points and
 * draws; the nominal value as a notch; the worst as a line across, with a cross on it where it lies outside. As wide as its place.
 * The sentence it is read as stands in `marginSentence`; give `decorative` where the page writes the same beside it.
 */
export function MarginBar({
  requirement,
  decorative = false,
  className,
}: {
  readonly requirement: RequirementDocument;
  readonly decorative?: boolean;
  readonly className?: string;
}) {
  // Documents of an earlier form have neither.
  const known = requirement.allowed !== undefined && requirement.value !== undefined;
  const places = known ? marginPlaces(requirement) : null;
  const sentence = known ? marginSentence(requirement) : requirement.label;
  return (
    <svg
      role="img"
      aria-label={decorative ? undefined : sentence}
      aria-hidden={decorative || undefined}
      height={HEIGHT}
      width="100%"
      className={classNames("block min-w-16 overflow-visible", className)}
      data-verdict={requirement.verdict}
    >
      <line x1="0" x2="100%" y1={MIDDLE} y2={MIDDLE} stroke="var(--rule)" />
      {places !== null && <Marks places={places} verdict={requirement.verdict} />}
    </svg>
  );
}

function Marks({ places, verdict }: { readonly places: MarginPlaces; readonly verdict: Verdict }) {
  const { allowed, isOpen, spread, worst, nominal, beyond } = places;
  const top = MIDDLE - BAND / 2;
  const known = worst !== null;
  const edge = { stroke: "var(--holds)", strokeWidth: 1, strokeDasharray: known ? undefined : "2 2" };
  return (
    <>
      <rect
        x={percent(allowed.from)}
        width={percent(allowed.to - allowed.from)}
        y={top}
        height={BAND}
        fill="var(--holds)"
        fillOpacity="0.1"
      />
      {[top, top + BAND].map((y) => (
        <line key={y} x1={percent(allowed.from)} x2={percent(allowed.to)} y1={y} y2={y} {...edge} />
      ))}
      {!isOpen.low && (
        <line x1={percent(allowed.from)} x2={percent(allowed.from)} y1={top} y2={top + BAND} {...edge} />
      )}
      {!isOpen.high && (
        <line x1={percent(allowed.to)} x2={percent(allowed.to)} y1={top} y2={top + BAND} {...edge} />
      )}
      <g className={INKS[verdict]} stroke="currentColor">
        {spread !== null && (
          <rect
            x={percent(spread.from)}
            width={percent(spread.to - spread.from)}
            y={MIDDLE - SPREAD / 2}
            height={SPREAD}
            fill="currentColor"
            fillOpacity="0.45"
            stroke="none"
          />
        )}
        {nominal !== null && nominal !== worst && (
          <line x1={percent(nominal)} x2={percent(nominal)} y1={MIDDLE - 3} y2={MIDDLE + 3} strokeWidth="1" />
        )}
        {beyond.low && <Arrow at="0%" points="6,-4 0,0 6,4" />}
        {beyond.high && <Arrow at="100%" points="-6,-4 0,0 -6,4" />}
        {worst !== null && (
          <line x1={percent(worst)} x2={percent(worst)} y1={0} y2={HEIGHT} strokeWidth="2" />
        )}
        {worst !== null && verdict === "broken" && (
          <svg x={percent(worst)} y={MIDDLE} overflow="visible" aria-hidden="true">
            <path d="M-4 -4 4 4M-4 4 4 -4" strokeWidth="1.5" fill="none" />
          </svg>
        )}
      </g>
    </>
  );
}

/** The values go on beyond the end of the bar. */
function Arrow({ at, points }: { readonly at: string; readonly points: string }) {
  return (
    <svg x={at} y={MIDDLE} overflow="visible" aria-hidden="true">
      <polyline points={points} strokeWidth="1.5" fill="none" />
    </svg>
  );
}

function percent(share: number): string {
  return `${(100 * share).toFixed(2)}%`;
}
