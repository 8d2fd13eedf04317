import type { AllowedBand } from "@/lib/analyses/allowed-bands";
import { horizontalAxis, placesOf, type Ruler } from "./axes";
import type { CurveSet } from "./curve-set";
import { type CurveView, drawnChoice } from "./curve-view";
import { accountOf } from "./failed-spans";
import { acrossField, type Field } from "./line-path";
import { STOREY_GAP } from "./nearest-line";
import { guttersFor } from "./plot-gutters";
import { boxStretch, type Mark, path, type Scene, text } from "./scene";
import { storeyMarks } from "./storey-marks";
import { type Band, type StoreyView, storeyViews } from "./storey-views";
import { storeysOf } from "./storeys";
import { summarise } from "./summary-sentence";
import type { Colours } from "./theme-colours";
import { shownWorst } from "./worst-draw";

/** A figure to be taken along: what it shows, and what stands above and below it. */
export interface FigureRequest {
  readonly set: CurveSet;
  readonly view: CurveView;
  readonly colours: Colours;
  readonly title: string;
  /** Where it comes from: netlist, revision, run, engine. */
  readonly source: string;
  readonly allowed?: readonly AllowedBand[];
  /** By the key of a line; see draw-bands.ts. */
  readonly bands?: ReadonlyMap<string, Band>;
  /** Px. */
  readonly width?: number;
}

const MARGIN = 24;
const HEAD = 56;
/** Px under the lowest storey: the ruler with its figures and name, and the source. */
const FOOT = 84;
const TICKS = [13, 9, 5] as const;

/** The figure as it stands on its page, with a title, its axes in words and figures, and its source: a picture of its own. */
export function figureScene(request: FigureRequest): Scene {
  const { set, view, colours, title, source, allowed = [], bands = new Map(), width = 960 } = request;
  const room = width - 2 * MARGIN;
  const beside = { allowed, bands, worst: shownWorst(set, view)?.draw ?? null };
  const rough = horizontalAxis(set, view, room);
  const x = placesOf(set, rough.mapping);
  const gutters = guttersFor(room, storeyViews(set, view, rough, false, beside, x));
  const plotWidth = room - gutters.left - gutters.right;
  const ruler = horizontalAxis(set, view, plotWidth);
  const storeys = storeyViews(set, view, ruler, false, beside, x);
  const left = MARGIN + gutters.left;
  let top = HEAD + MARGIN;
  const marks: Mark[] = [
    text(MARGIN, MARGIN + 16, title, { size: 18, bold: true, fill: colours["--ink"] }),
    text(MARGIN, MARGIN + 38, subtitleOf(request, storeys), { size: 12, fill: colours["--quiet"] }),
  ];
  for (const storey of storeys) {
    const field: Field = {
      horizontal: ruler.range,
      vertical: storey.axis.range,
      left,
      top,
      width: plotWidth,
      height: storey.height,
    };
    marks.push(...storeyMarks(storey, { x, ruler, field, colours, labelled: gutters.labelled }));
    top += storey.height + STOREY_GAP;
  }
  const drawn = drawnChoice(set, view);
  const account = accountOf(set, drawn.families);
  const rulerTop = top - STOREY_GAP / 2 + (account.spans.length > 0 ? 10 : 0);
  const across = {
    horizontal: ruler.range,
    vertical: ruler.range,
    left,
    top: 0,
    width: plotWidth,
    height: 1,
  };
  marks.push(
    ...failedMarks(account.spans, x, across, rulerTop, colours),
    ...rulerMarks(set, ruler, across, rulerTop, colours),
  );
  const height = rulerTop + FOOT;
  marks.push(text(MARGIN, height - 16, source, { size: 11, fill: colours["--quiet"] }));
  const description = summarise(set, storeysOf(set, drawn), account);
  return { width, height, background: colours["--paper"], title, description, marks };
}

function subtitleOf({ set, view }: FigureRequest, storeys: readonly StoreyView[]): string {
  const worst = shownWorst(set, view);
  const parts = [
    storeys.some(({ bands }) => bands.length > 0) ? "band: 5 to 95\u202f% of the draws" : "",
    set.draws > 0 ? "line: nominal" : "",
    worst === null ? "" : `fine dots: draw ${worst.draw}, the worst of ${worst.label}`,
    storeys.some(({ allowed }) => allowed.length > 0) ? "shaded: allowed" : "",
    storeys.some(({ branches }) => branches.length > 0) ? "dashed: branches that are not stable" : "",
    set.source.note ?? "",
  ];
  return parts.filter((part) => part !== "").join("; ");
}

function rulerMarks(set: CurveSet, ruler: Ruler, field: Field, top: number, colours: Colours): Mark[] {
  const ink = colours["--ink"];
  const marks: Mark[] = [
    path(
      [
        [
          [field.left, top],
          [field.left + field.width, top],
        ],
      ],
      { stroke: ink },
    ),
    path(
      ruler.ticks.map(({ place, rank }) => {
        const at = acrossField(field, place);
        return [
          [at, top],
          [at, top + TICKS[rank]],
        ];
      }),
      { stroke: ink },
    ),
    text(field.left + field.width / 2, top + 46, set.axis.knob, { fill: ink, anchor: "middle" }),
  ];
  for (const tick of ruler.ticks) {
    const label = ruler.labels.texts.get(tick);
    if (label === undefined) continue;
    marks.push(
      text(acrossField(field, tick.place), top + 27, label, {
        face: "figures",
        fill: colours["--quiet"],
        anchor: "middle",
      }),
    );
  }
  return marks;
}

/** A bar over the ruler where points failed. */
function failedMarks(
  spans: readonly { readonly first: number; readonly last: number }[],
  x: Float64Array,
  field: Field,
  rulerTop: number,
  colours: Colours,
): Mark[] {
  if (spans.length === 0) return [];
  const clip = { left: field.left, top: rulerTop - 14, width: field.width, height: 12 };
  const boxes = spans.map(({ first, last }) => {
    const from = acrossField(field, x[first]!) - 2;
    return boxStretch({
      left: from,
      top: rulerTop - 11,
      width: acrossField(field, x[last]!) + 2 - from,
      height: 5,
    });
  });
  return [
    path(boxes, { closed: true, fill: colours["--broken"], clip }),
    text(field.left - 8, rulerTop - 5, "failed", { size: 11, fill: colours["--broken"], anchor: "end" }),
  ];
}
