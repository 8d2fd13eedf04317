import {
  acrossField,
  type Course,
  downField,
  drawLine,
  type Field,
  markedPoints,
  type Pen,
} from "./line-path";
import { FEW_POINTS, inkOf } from "./line-style";
import type { StoreyDrawing } from "./storey-canvas";
import type { Shade } from "./storey-views";

type Context = CanvasRenderingContext2D;

/** What lies behind the lines of a storey: what is allowed, the spread of the draws, the grid. */
export function drawBehind(ctx: Context, drawing: StoreyDrawing, field: Field): void {
  ctx.save();
  ctx.beginPath();
  ctx.rect(field.left, field.top, field.width, field.height);
  ctx.clip();
  ctx.setLineDash([]);
  for (const band of drawing.bands) {
    ctx.fillStyle = inkOf(band.style, drawing.colours);
    ctx.globalAlpha = drawing.bands.length > 1 ? 0.1 : 0.16;
    const path = new Path2D();
    outlineBand(path, band.low, band.high, field);
    ctx.fill(path);
  }
  ctx.globalAlpha = 1;
  drawGrid(ctx, drawing, field);
  for (const shade of drawing.allowed) {
    const { left, top, width, height, isGate } = shadeBox(shade, field, devicePixelRatio);
    ctx.fillStyle = drawing.colours["--holds"];
    ctx.globalAlpha = 0.09;
    ctx.fillRect(left, top, width, height);
    ctx.globalAlpha = isGate ? 0.9 : 0.6;
    ctx.strokeStyle = drawing.colours["--holds"];
    ctx.lineWidth = devicePixelRatio;
    ctx.setLineDash([4 * devicePixelRatio, 3 * devicePixelRatio]);
    ctx.strokeRect(left, top, width, height);
    ctx.setLineDash([]);
  }
  ctx.restore();
}

/** A gate for a single value of the knob is so many px wide. */
const GATE = 9;

interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
  /** A single value of the knob, which has no width of its own. */
  readonly isGate: boolean;
}

/** The box of what is allowed, in the unit of the field, of which `unit` make a px; without a limit it reaches beyond the field. */
export function shadeBox(shade: Omit<Shade, "label">, field: Field, unit: number): Box {
  const beyond = 20 * unit;
  const a = acrossField(field, shade.from);
  const b = acrossField(field, shade.to);
  const isGate = b - a < 2;
  const [left, right] = isGate ? [a - (GATE * unit) / 2, a + (GATE * unit) / 2] : [a, b];
  const top = shade.high === null ? field.top - beyond : downField(field, shade.high);
  const bottom = shade.low === null ? field.top + field.height + beyond : downField(field, shade.low);
  return { left, top, width: right - left, height: bottom - top, isGate };
}

/** The area between two lines: along the upper one, and back along the lower one, for each stretch without a gap. */
export function outlineBand(pen: Pen & { closePath(): void }, low: Course, high: Course, field: Field): void {
  const upper = stretchesOf(high, field);
  const lower = stretchesOf(low, field);
  upper.forEach((stretch, i) => {
    const back = lower[i];
    if (back === undefined) return;
    stretch.forEach(([x, y], k) => {
      if (k === 0) pen.moveTo(x, y);
      else pen.lineTo(x, y);
    });
    for (const [x, y] of back.toReversed()) pen.lineTo(x, y);
    pen.closePath();
  });
}

/** A line's points, a list for each stretch without a gap. */
function stretchesOf(course: Course, field: Field): [number, number][][] {
  const stretches: [number, number][][] = [];
  const pen: Pen = {
    moveTo: (x, y) => stretches.push([[x, y]]),
    lineTo: (x, y) => stretches.at(-1)!.push([x, y]),
  };
  drawLine(pen, course, field);
  return stretches;
}

function drawGrid(ctx: Context, drawing: StoreyDrawing, field: Field): void {
  const { left, top, width, height } = field;
  const pixel = Math.max(1, Math.round(devicePixelRatio));
  const crisp = (at: number) => Math.round(at - pixel / 2) + pixel / 2;
  ctx.lineWidth = pixel;
  const stroke = (path: Path2D, colour: string) => {
    ctx.strokeStyle = colour;
    ctx.stroke(path);
  };
  const grid = new Path2D();
  const zero = new Path2D();
  for (const { place } of drawing.horizontalTicks.filter(({ rank }) => rank === 0)) {
    grid.moveTo(crisp(acrossField(field, place)), top);
    grid.lineTo(crisp(acrossField(field, place)), top + height);
  }
  for (const { place, value } of drawing.verticalTicks.filter(({ labelled }) => labelled)) {
    const path = value === 0 ? zero : grid;
    path.moveTo(left, crisp(downField(field, place)));
    path.lineTo(left + width, crisp(downField(field, place)));
  }
  stroke(grid, drawing.colours["--grid"]);
  stroke(zero, drawing.colours["--rule"]);
}

/** A ring on each point of a short line, and on those of a longer one that a line alone would not show. */
export function drawMarks(ctx: Context, { lines, colours }: StoreyDrawing, field: Field): void {
  ctx.save();
  ctx.setLineDash([]);
  ctx.fillStyle = colours["--paper"];
  ctx.lineWidth = 1.5 * devicePixelRatio;
  for (const line of lines) {
    if (!line.marked) continue;
    ctx.strokeStyle = inkOf(line.style, colours);
    ctx.globalAlpha = line.alpha;
    for (const { x, y } of markedPoints(line, field, FEW_POINTS)) {
      ctx.beginPath();
      ctx.arc(x, y, 2.5 * devicePixelRatio, 0, 2 * Math.PI);
      ctx.fill();
      ctx.stroke();
    }
  }
  ctx.restore();
}
