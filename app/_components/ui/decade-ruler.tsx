/** Positions of the engraved ticks in a decade, as log10(2) … log10(9). */
const MINOR = [2, 3, 4, 5, 6, 7, 8, 9].map((m) => ({ m, at: Math.log10(m) }));

/**
 * A small logarithmic ruler, drawn: `decades` long, the decade ticks long, the ticks at 5 middling, the rest short.
 * In the colour of the text around it; an ornament, so hidden from assistive technology.
 */
export function DecadeRuler({
  decades,
  width,
  height = 12,
}: {
  readonly decades: number;
  readonly width: number;
  readonly height?: number;
}) {
  const span = (width - 1) / decades;
  const ticks: string[] = [`M0 0.5H${width}`];
  for (let decade = 0; decade <= decades; decade++) {
    const x = (0.5 + decade * span).toFixed(2);
    ticks.push(`M${x} 0V${height}`);
    if (decade === decades) break;
    for (const { m, at } of MINOR) {
      const length = m === 5 ? height * 0.6 : height * 0.4;
      ticks.push(`M${(0.5 + (decade + at) * span).toFixed(2)} 0V${length.toFixed(1)}`);
    }
  }
  return (
    <svg
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      stroke="currentColor"
      strokeWidth="1"
      fill="none"
      aria-hidden="true"
      className="max-w-full"
    >
      <path d={ticks.join("")} />
    </svg>
  );
}
