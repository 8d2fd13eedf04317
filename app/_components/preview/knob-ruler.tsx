import type { KnobScale } from "./knob-scale";

const LENGTHS = [13, 9, 5] as const;
const HEIGHT = 14;

/** The engraving that a knob's pointer stands on. Drawn in percent, so that it is as wide as its place. */
export function KnobRuler({ scale }: { readonly scale: KnobScale }) {
  return (
    <svg width="100%" height={HEIGHT} aria-hidden="true" className="overflow-visible" stroke="var(--ink)">
      <line x1="0" x2="100%" y1=".5" y2=".5" />
      {scale.ticks.map(({ place, rank }) => (
        <line
          key={place}
          x1={percent(place)}
          x2={percent(place)}
          y1="0"
          y2={LENGTHS[rank]}
          strokeOpacity={rank === 2 ? 0.6 : 1}
        />
      ))}
    </svg>
  );
}

function percent(share: number): string {
  return `${(100 * share).toFixed(3)}%`;
}
