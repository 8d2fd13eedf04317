import UPlot from "uplot";
import "uplot/dist/uPlot.min.css";
import { type Course, drawLine, type Field } from "./line-path";
import type { LineStyle } from "./line-style";
import { inkOf } from "./line-style";
import type { Range } from "./range";
import { drawBehind, drawMarks } from "./storey-layers";
import type { Shade } from "./storey-views";
import type { Colours } from "./theme-colours";
import type { Tick } from "./ticks";

/** One line on a canvas: where it goes, how it looks. */
export interface DrawnLine extends Course {
  readonly style: LineStyle;
  /** Px. */
  readonly stroke: number;
  /** Less than 1 while the reader follows another line. */
  readonly alpha: number;
  /** Whether a short line has each of its points marked. */
  readonly marked: boolean;
}

/** Everything a storey's canvas shows, in places along its axes (see scale.ts). */
export interface StoreyDrawing {
  readonly lines: readonly DrawnLine[];
  readonly bands: readonly { readonly low: Course; readonly high: Course; readonly style: LineStyle }[];
  readonly allowed: readonly Shade[];
  readonly horizontal: Range;
  readonly vertical: Range;
  readonly horizontalTicks: readonly Tick[];
  readonly verticalTicks: readonly Tick[];
  /** Size in CSS px. */
  readonly width: number;
  readonly height: number;
  readonly colours: Colours;
}

/** A line as it is cut into dashes: what looks the same keeps its series. */
function lookOf({ width, height, colours, lines }: StoreyDrawing): string {
  const looks = lines.map(({ style, stroke }) => `${inkOf(style, colours)} ${style.dash} ${stroke}`);
  return `${width} ${height} ${colours["--paper"]} ${looks.join("|")}`;
}

/**
 * The canvas of a storey. Scales, strokes and clipping are those of the plotting package; the paths are drawn by line-path.ts, since
 * lines may pass over points that are not theirs and dense ones are reduced from their pyramids. A change of view draws anew into
 * the same canvas; only lines that look different make a new one. `data-drawn` on the host counts the points drawn.
 */
export class StoreyCanvas {
  private plot: UPlot | null = null;
  private look = "";
  private drawing: StoreyDrawing | null = null;

  constructor(private readonly host: HTMLElement) {}

  show(drawing: StoreyDrawing): void {
    const look = lookOf(drawing);
    this.drawing = drawing;
    if (this.plot === null || look !== this.look) {
      this.plot?.destroy();
      this.plot = this.make(drawing);
      this.look = look;
      return;
    }
    drawing.lines.forEach(({ alpha }, i) => {
      this.plot!.series[i + 1]!.alpha = alpha;
    });
    this.plot.setData(this.data(drawing));
  }

  destroy(): void {
    this.plot?.destroy();
    this.plot = null;
  }

  /** What the package keeps to itself: the ends of the ruler, for the scale; the values stay in the columns they came in. */
  private data({ horizontal, lines }: StoreyDrawing): UPlot.AlignedData {
    return [[horizontal.from, horizontal.to], ...lines.map(() => [null, null])];
  }

  private make(drawing: StoreyDrawing): UPlot {
    const { width, height, colours } = drawing;
    let drawn = 0;
    return new UPlot(
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
          x: { time: false, range: () => [this.drawing!.horizontal.from, this.drawing!.horizontal.to] },
          y: { range: () => [this.drawing!.vertical.from, this.drawing!.vertical.to] },
        },
        series: [
          {},
          ...drawing.lines.map(({ style, stroke, alpha }, line) => ({
            stroke: inkOf(style, colours),
            width: stroke,
            dash: [...style.dash],
            alpha,
            pxAlign: 0,
            points: { show: false },
            paths: (u: UPlot) => {
              const path = new Path2D();
              drawn += drawLine(path, this.drawing!.lines[line]!, fieldOf(u, this.drawing!));
              return { stroke: path, fill: null, clip: null, band: null, gaps: [], flags: 0 };
            },
          })),
        ],
        hooks: {
          drawClear: [
            (u) => {
              drawn = 0;
              drawBehind(u.ctx, this.drawing!, fieldOf(u, this.drawing!));
            },
          ],
          draw: [
            (u) => {
              drawMarks(u.ctx, this.drawing!, fieldOf(u, this.drawing!));
              this.host.setAttribute("data-drawn", String(drawn));
            },
          ],
        },
      },
      this.data(drawing),
      this.host,
    );
  }
}

/** The plotting area in px of the canvas. */
function fieldOf({ bbox }: UPlot, { horizontal, vertical }: StoreyDrawing): Field {
  return { horizontal, vertical, left: bbox.left, top: bbox.top, width: bbox.width, height: bbox.height };
}
