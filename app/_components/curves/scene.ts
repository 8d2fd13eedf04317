import type { Pen } from "./line-path";

export interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** A path in px; `clip` is the part of the scene that it may show in. */
export interface PathMark {
  readonly kind: "path";
  /** Stretches of points; each begins anew. */
  readonly stretches: readonly (readonly (readonly [number, number])[])[];
  readonly closed: boolean;
  readonly stroke: string | null;
  readonly fill: string | null;
  readonly width: number;
  readonly dash: readonly number[];
  readonly alpha: number;
  readonly clip: Box | null;
}

export interface TextMark {
  readonly kind: "text";
  readonly x: number;
  /** Of the base line. */
  readonly y: number;
  readonly text: string;
  /** Px. */
  readonly size: number;
  readonly face: "text" | "figures";
  readonly bold: boolean;
  readonly fill: string;
  readonly anchor: "start" | "middle" | "end";
}

export type Mark = PathMark | TextMark;

/** A picture as marks, to be written as SVG or painted on a canvas. */
export interface Scene {
  readonly width: number;
  readonly height: number;
  readonly background: string;
  /** What it is and what it shows, for those who do not see it. */
  readonly title: string;
  readonly description: string;
  readonly marks: readonly Mark[];
}

export const FACES = {
  text: "'Instrument Sans Variable', 'Instrument Sans', 'Helvetica Neue', Arial, sans-serif",
  figures: "'Spline Sans Mono Variable', 'Spline Sans Mono', 'DejaVu Sans Mono', Menlo, monospace",
} as const;

/** A pen that keeps what it is told. */
export class Stretches implements Pen {
  readonly all: [number, number][][] = [];

  moveTo(x: number, y: number): void {
    this.all.push([[x, y]]);
  }

  lineTo(x: number, y: number): void {
    this.all.at(-1)!.push([x, y]);
  }

  closePath(): void {
    // A stretch is closed by its mark.
  }
}

export function path(
  stretches: PathMark["stretches"],
  look: Partial<Omit<PathMark, "kind" | "stretches">>,
): PathMark {
  const usual = { closed: false, stroke: null, fill: null, width: 1, dash: [], alpha: 1, clip: null };
  return { kind: "path", stretches, ...usual, ...look };
}

export function text(
  x: number,
  y: number,
  words: string,
  look: Partial<Omit<TextMark, "kind" | "text">> & { readonly fill: string },
): TextMark {
  return { kind: "text", x, y, text: words, size: 12, face: "text", bold: false, anchor: "start", ...look };
}

export function boxStretch({ left, top, width, height }: Box): [number, number][] {
  const [right, bottom] = [left + width, top + height];
  return [
    [left, top],
    [right, top],
    [right, bottom],
    [left, bottom],
  ];
}
