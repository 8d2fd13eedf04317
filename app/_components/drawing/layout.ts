import type { Box, Row } from "@/lib/language/symbols/connections";
import {
  chipHeight,
  chipWidth,
  FRAME_HEAD,
  FRAME_PAD,
  GROUND_STUB,
  LABEL_HEIGHT,
  LEAD,
  labelWidth,
  MARGIN,
  PIN_STEP,
  pinsWidth,
  ROW_GAP,
} from "./measures";
import { type Placed, type PlacedLine, placeChips } from "./place-chips";
import { linesOf, railOrder } from "./rail-order";

/** A box as it is drawn. Lengths in the drawing's own units, from its left upper corner. */
export interface Chip {
  readonly box: Box;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  /** Widths of the columns in which the names of pins stand. */
  readonly leftPins: number;
  readonly rightPins: number;
}

/** From a pin at the edge of a chip, at `x`, to a rail, a piece of the ground rail or nowhere, at `to`. */
export interface Wire {
  readonly box: string;
  readonly pin: string;
  readonly side: "left" | "right";
  /** Null where the pin is open. */
  readonly net: string | null;
  readonly x: number;
  readonly to: number;
  readonly y: number;
}

/** A net as an upright line; its name stands over its upper end. */
export interface Rail {
  readonly net: string;
  readonly x: number;
  readonly top: number;
  readonly bottom: number;
}

/** The border round what stands inside an open block. */
export interface Frame {
  readonly box: Box;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

export interface Layout {
  readonly width: number;
  readonly height: number;
  readonly chips: readonly Chip[];
  readonly wires: readonly Wire[];
  readonly rails: readonly Rail[];
  /** The outer before the inner. */
  readonly frames: readonly Frame[];
}

/**
 * Draws connections: every net but ground is a rail, every box a chip on the row of its statement, in the order of the text. The
 * same connections give the same drawing; a change of a line moves what is below and beside it, and turns nothing round.
 */
export function layOutConnections(rows: readonly Row[], open: ReadonlySet<string>): Layout {
  const lines = linesOf(rows, open);
  const order = railOrder(lines);
  const rails = new Map(order.map((net, index) => [net, index]));
  const placed = placeChips(lines, rails);
  const { gaps, xs } = columns(placed, order);
  const drawing = new Drawing(rails, xs, gaps);
  for (const line of placed) drawing.add(line);
  return drawing.finish(order);
}

interface Column {
  readonly x: number;
  readonly width: number;
}

/** The gaps with room for their widest chip, and the places of the rails between them. */
function columns(placed: readonly PlacedLine[], order: readonly string[]): { gaps: Column[]; xs: number[] } {
  const widths = new Array<number>(order.length + 1).fill(0);
  for (const line of placed) {
    if (line.kind !== "row") continue;
    for (const chip of line.chips) {
      widths[chip.gap] = Math.max(widths[chip.gap]!, widthOf(chip) + 2 * LEAD);
    }
  }
  const half = order.map((net) => labelWidth(net) / 2);
  const gaps: Column[] = [];
  const xs: number[] = [];
  let x = MARGIN;
  for (let gap = 0; gap <= order.length; gap += 1) {
    const width = Math.max(widths[gap]!, (half[gap - 1] ?? 0) + (half[gap] ?? 0) + 4);
    gaps.push({ x, width });
    x += width;
    if (gap < order.length) xs.push(x);
  }
  return { gaps, xs };
}

function widthOf({ box, left, right }: Placed): number {
  return chipWidth(box, namesAt(box, left, "left"), namesAt(box, right, "right"));
}

/** Names of pins that are written at a side of a chip. */
function namesAt(box: Box, joints: readonly { readonly pin: string }[], side: "left" | "right"): string[] {
  return joints.map(({ pin }) => pin).filter((pin) => pinIsNamed({ pin, side }, box));
}

/** Whether a pin's name is written: that of an end called left or right only where it stands on the other side. */
export function pinIsNamed({ pin, side }: Pick<Wire, "pin" | "side">, { joints }: Box): boolean {
  return joints.length !== 2 || pin !== side;
}

class Drawing {
  private readonly chips: Chip[] = [];
  private readonly wires: Wire[] = [];
  private readonly frames: Frame[] = [];
  private readonly opened: { box: Box; y: number; first: number; at: number }[] = [];
  private readonly extent = new Map<string, { top: number; bottom: number }>();
  private y = MARGIN;

  constructor(
    private readonly rails: ReadonlyMap<string, number>,
    private readonly xs: readonly number[],
    private readonly gaps: readonly Column[],
  ) {}

  add(line: PlacedLine): void {
    if (line.kind === "row") this.row(line.chips);
    else if (line.kind === "open") {
      this.opened.push({ box: line.box, y: this.y, first: this.chips.length, at: this.frames.length });
      this.y += FRAME_HEAD;
    } else this.close();
  }

  finish(order: readonly string[]): Layout {
    const rails = order.flatMap((net, index): Rail[] => {
      const extent = this.extent.get(net);
      return extent === undefined ? [] : [{ net, x: this.xs[index]!, ...extent }];
    });
    const last = this.gaps.at(-1)!;
    const width = Math.max(last.x + last.width, ...this.frames.map((one) => one.x + one.width)) + MARGIN;
    const { chips, wires, frames } = this;
    return { width, height: this.y + MARGIN - ROW_GAP, chips, wires, rails, frames };
  }

  private row(chips: readonly Placed[]): void {
    const nets = chips.flatMap(({ box }) => box.joints.map(({ net }) => net));
    const begins = nets.some((net) => net !== null && this.rails.has(net) && !this.extent.has(net));
    const top = this.y;
    const upper = top + (begins ? LABEL_HEIGHT : 0);
    let height = 0;
    for (const placed of chips) {
      const chip = this.chip(placed, upper);
      height = Math.max(height, chip.height);
      this.chips.push(chip);
      this.wire(placed, chip, "left", top);
      this.wire(placed, chip, "right", top);
    }
    this.y = upper + height + ROW_GAP;
  }

  private chip(placed: Placed, y: number): Chip {
    const { box, gap, left, right } = placed;
    const width = widthOf(placed);
    const column = this.gaps[gap]!;
    const height = chipHeight(left.length, right.length);
    const leftPins = pinsWidth(namesAt(box, left, "left"));
    const rightPins = pinsWidth(namesAt(box, right, "right"));
    return { box, x: column.x + (column.width - width) / 2, y, width, height, leftPins, rightPins };
  }

  private wire({ box, left, right }: Placed, chip: Chip, side: "left" | "right", top: number): void {
    const joints = side === "left" ? left : right;
    const x = side === "left" ? chip.x : chip.x + chip.width;
    const out = side === "left" ? -1 : 1;
    const first = chip.y + chip.height / 2 - ((joints.length - 1) * PIN_STEP) / 2;
    joints.forEach(({ pin, net }, k) => {
      const y = first + k * PIN_STEP;
      const rail = net === null ? undefined : this.rails.get(net);
      const to = rail === undefined ? x + out * GROUND_STUB : this.xs[rail]!;
      this.wires.push({ box: box.name, pin, side, net, x, to, y });
      if (net === null || rail === undefined) return;
      const extent = this.extent.get(net);
      if (extent === undefined) this.extent.set(net, { top: top + LABEL_HEIGHT - 4, bottom: y });
      else extent.bottom = Math.max(extent.bottom, y);
    });
  }

  /** A frame reaches over the chips inside it and the rails that they are joined to. */
  private close(): void {
    const { box, y, first, at } = this.opened.pop()!;
    const inside = this.chips.slice(first);
    const names = new Set(inside.map((chip) => chip.box.name));
    const ends = this.wires.filter((wire) => names.has(wire.box)).flatMap(({ x, to }) => [x, to]);
    const left = Math.min(...ends, ...inside.map((chip) => chip.x)) - FRAME_PAD;
    const right = Math.max(...ends, ...inside.map((chip) => chip.x + chip.width)) + FRAME_PAD;
    const isEmpty = inside.length === 0;
    const height = this.y - y - ROW_GAP + FRAME_PAD;
    const frame = isEmpty
      ? { x: MARGIN, width: 160, height: FRAME_HEAD }
      : { x: left, width: right - left, height };
    this.frames.splice(at, 0, { box, y, ...frame });
    this.y = y + frame.height + ROW_GAP;
  }
}
