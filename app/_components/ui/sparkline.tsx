import { DecadeRuler } from "./decade-ruler";

/** A trace in small: at most 64 points are worth giving. Unsolved points are null and leave a gap. */
export interface SparklineData {
  /** Position along the ruler from 0 to 1, ascending. */
  readonly x: readonly number[];
  readonly y: readonly (number | null)[];
  /** Decades of the logarithmic ruler under it; 0 for a linear one, which is a plain hairline. */
  readonly decades: number;
}

const WIDTH = 112;
const HEIGHT = 28;

/** A small curve over its ruler, 112 px wide. An ornament of the row that names the run, so hidden from assistive technology. */
export function Sparkline({ data }: { readonly data: SparklineData }) {
  const solved = data.y.filter((value) => value !== null);
  const low = Math.min(...solved);
  const high = Math.max(...solved);
  const down = (value: number) =>
    high === low ? HEIGHT / 2 : 1.5 + ((HEIGHT - 3) * (high - value)) / (high - low);
  let path = "";
  let pen = false;
  for (const [index, value] of data.y.entries()) {
    if (value === null) {
      pen = false;
      continue;
    }
    path += `${pen ? "L" : "M"}${((data.x[index] ?? 0) * WIDTH).toFixed(1)} ${down(value).toFixed(1)}`;
    pen = true;
  }
  return (
    <span aria-hidden="true" className="inline-grid gap-0.5" style={{ width: WIDTH }}>
      <svg aria-hidden="true" width={WIDTH} height={HEIGHT} viewBox={`0 0 ${WIDTH} ${HEIGHT}`} fill="none">
        <path d={path} stroke="var(--trace-1)" strokeWidth="1.5" strokeLinejoin="round" />
      </svg>
      <span className="text-edge">
        {data.decades >= 1 ? (
          <DecadeRuler decades={Math.round(data.decades)} width={WIDTH} height={6} />
        ) : (
          <span className="block border-edge border-t" />
        )}
      </span>
    </span>
  );
}
