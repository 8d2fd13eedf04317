import UPlot from "uplot";
import "uplot/dist/uPlot.min.css";
import { FEW_POINTS, type LineStyle } from "./line-style";
import type { Range } from "./range";
import { DRAWN_WHOLE, reduceColumns } from "./reduce-columns";
import type { Colours } from "./theme-colours";
import type { Tick } from "./ticks";

/** Everything a storey's canvas shows, in places along its axes (see scale.ts). */
export interface StoreyDrawing {
  readonly x: readonly number[];
  readonly lines: readonly { readonly ys: readonly (number | null)[]; readonly style: LineStyle }[];
  readonly horizontal: Range;
  readonly vertical: Range;
  readonly horizontalTicks: readonly Tick[];
  readonly verticalTicks: readonly Tick[];
  /** Size in CSS px. */
  readonly width: number;
  readonly height: number;
  readonly colours: Colours;
}

/**
 * Draws a storey into `host` and returns what takes it away again. Places are drawn on linear scales of fixed ranges, so no
 * logarithm of zero can reach the canvas; null is a gap. `data-drawn` on the host counts the points drawn.
 */
export function drawStorey(host: HTMLElement, drawing: StoreyDrawing): () => void {
  const { horizontal, vertical, width, height, colours } = drawing;
  const whole = { x: drawing.x, ys: drawing.lines.map(({ ys }) => ys) };
  const reduced = whole.x.length * whole.ys.length > DRAWN_WHOLE;
  const columns = reduced ? reduceColumns(whole, horizontal, width) : whole;
  const count = whole.ys.reduce((sum, ys) => sum + ys.filter((y) => y !== null).length, 0);
  const plot = new UPlot(
    {
      width,
      height,
      padding: [0, 0, 0, 0],
      pxAlign: 0,
      legend: { show: false },
      cursor: { show: false },
      select: { show: false, left: 0, top: 0, width: 0, height: 0 },
      axes: [{ show: false }, { show: false }],
      scales: {
        x: { time: false, range: () => [horizontal.from, horizontal.to] },
        y: { range: () => [vertical.from, vertical.to] },
      },
      series: [
        {},
        ...drawing.lines.map(({ style }, line) => ({
          stroke: colours[style.colour],
          width: 1.75,
          dash: [...style.dash],
          pxAlign: 0,
          points: {
            show: true,
            size: 5,
            width: 1.5,
            fill: colours["--paper"],
            stroke: colours[style.colour],
            filter: () => markedPoints(columns.ys[line] ?? [], reduced),
          },
        })),
      ],
      hooks: {
        drawClear: [(u) => drawGrid(u, drawing)],
        draw: [() => host.setAttribute("data-drawn", String(count))],
      },
    },
    [columns.x, ...columns.ys] as UPlot.AlignedData,
    host,
  );
  return () => plot.destroy();
}

/** All points of a short line; of a long one those between two gaps, which a line alone would not show. */
function markedPoints(ys: readonly (number | null)[], reduced: boolean): number[] {
  const marked: number[] = [];
  if (reduced) return marked;
  const few = ys.length <= FEW_POINTS;
  for (let i = 0; i < ys.length; i++) {
    if ((ys[i] ?? null) === null) continue;
    if (few || ((ys[i - 1] ?? null) === null && (ys[i + 1] ?? null) === null)) marked.push(i);
  }
  return marked;
}

function drawGrid(u: UPlot, drawing: StoreyDrawing): void {
  const { ctx, bbox } = u;
  const { horizontal, vertical, colours } = drawing;
  const across = (place: number) =>
    bbox.left + (bbox.width * (place - horizontal.from)) / (horizontal.to - horizontal.from);
  const down = (place: number) =>
    bbox.top + (bbox.height * (vertical.to - place)) / (vertical.to - vertical.from);
  const pixel = Math.max(1, Math.round(devicePixelRatio));
  const crisp = (at: number) => Math.round(at - pixel / 2) + pixel / 2;
  ctx.save();
  ctx.lineWidth = pixel;
  const stroke = (path: Path2D, colour: string) => {
    ctx.strokeStyle = colour;
    ctx.stroke(path);
  };
  const grid = new Path2D();
  const zero = new Path2D();
  for (const { place } of drawing.horizontalTicks.filter(({ rank }) => rank === 0)) {
    grid.moveTo(crisp(across(place)), bbox.top);
    grid.lineTo(crisp(across(place)), bbox.top + bbox.height);
  }
  for (const { place, value } of drawing.verticalTicks.filter(({ labelled }) => labelled)) {
    const path = value === 0 ? zero : grid;
    path.moveTo(bbox.left, crisp(down(place)));
    path.lineTo(bbox.left + bbox.width, crisp(down(place)));
  }
  stroke(grid, colours["--grid"]);
  stroke(zero, colours["--rule"]);
  ctx.restore();
}
