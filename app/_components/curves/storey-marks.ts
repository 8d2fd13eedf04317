import type { Axis } from "./axes";
import { lineEnds } from "./direct-places";
import { acrossField, type Course, downField, drawLine, type Field, markedPoints } from "./line-path";
import { FEW_POINTS, inkOf, type LineStyle } from "./line-style";
import { placeOf } from "./scale";
import { boxStretch, type Mark, path, Stretches, text } from "./scene";
import { outlineBand, shadeBox } from "./storey-layers";
import type { StoreyView } from "./storey-views";
import type { Colours } from "./theme-colours";

interface Frame {
  readonly x: Float64Array;
  readonly ruler: Axis;
  readonly field: Field;
  readonly colours: Colours;
  readonly labelled: boolean;
}

/** One storey as marks: what is allowed, the bands, the grid, the lines, the figures of its axis and the names of its lines. */
export function storeyMarks(storey: StoreyView, frame: Frame): Mark[] {
  return [...behind(storey, frame), ...lines(storey, frame), ...words(storey, frame)];
}

function behind({ axis, bands, allowed }: StoreyView, { x, ruler, field, colours }: Frame): Mark[] {
  const { left, top, width, height } = field;
  const clip = { left, top, width, height };
  const marks: Mark[] = bands.map(({ low, high, style }) => {
    const pen = new Stretches();
    const course = (values: Float64Array) => ({ x, values, mapping: axis.mapping, absent: null });
    outlineBand(pen, course(low), course(high), field);
    const alpha = bands.length > 1 ? 0.1 : 0.16;
    return path(pen.all, { closed: true, fill: inkOf(style, colours), alpha, clip });
  });
  const across = ruler.ticks.filter(({ rank }) => rank === 0).map(({ place }) => acrossField(field, place));
  const down = axis.ticks.filter(({ labelled }) => labelled).map(({ place }) => downField(field, place));
  marks.push(
    path(
      [
        ...across.map((at): [number, number][] => [
          [at, top],
          [at, top + height],
        ]),
        ...down.map((at): [number, number][] => [
          [left, at],
          [left + width, at],
        ]),
      ],
      { stroke: colours["--grid"] },
    ),
    path(
      [
        [
          [left, top],
          [left, top + height],
        ],
      ],
      { stroke: colours["--edge"] },
    ),
  );
  for (const shade of allowed) {
    const box = boxStretch(shadeBox(shade, field, 1));
    marks.push(
      path([box], { closed: true, fill: colours["--holds"], alpha: 0.09, clip }),
      path([box], { closed: true, stroke: colours["--holds"], dash: [4, 3], alpha: 0.7, clip }),
    );
  }
  return marks;
}

function lines(storey: StoreyView, { x, field, colours }: Frame): Mark[] {
  const { axis, worst, branches } = storey;
  const { left, top, width, height } = field;
  const clip = { left, top, width, height };
  const one = (course: Course, style: LineStyle, stroke: number) => {
    const pen = new Stretches();
    drawLine(pen, course, field);
    return path(pen.all, { stroke: inkOf(style, colours), width: stroke, dash: style.dash, clip });
  };
  const mapping = axis.mapping;
  const marks: Mark[] = [
    ...branches.map(({ x: own, values, isStable, style }) =>
      one(
        { x: own, values, mapping, absent: null },
        { ...style, dash: isStable ? [] : [5, 4] },
        isStable ? 1.75 : 1.25,
      ),
    ),
    ...worst.map(({ values, absent, style }) =>
      one({ x, values, mapping, absent }, { ...style, dash: [1.5, 2.5] }, 1.25),
    ),
  ];
  for (const { values, absent, style } of storey.swept) {
    const course = { x, values, mapping, absent };
    marks.push(one(course, style, 1.75));
    const rings = markedPoints(course, field, FEW_POINTS).map(({ x: at, y }) => ring(at, y, 2.5));
    if (rings.length > 0) {
      marks.push(
        path(rings, { closed: true, fill: colours["--paper"], stroke: inkOf(style, colours), width: 1.5 }),
      );
    }
  }
  return marks;
}

function words(storey: StoreyView, { x, ruler, field, colours, labelled }: Frame): Mark[] {
  const { axis, traces, folds } = storey;
  const quiet = colours["--quiet"];
  const unit = axis.labels.unit === "1" ? "" : `  ${axis.labels.unit}`;
  const marks: Mark[] = [
    text(field.left + 8, field.top + 16, `${traces.join(", ")}${unit}`, { fill: colours["--ink"] }),
  ];
  for (const tick of axis.ticks) {
    const label = axis.labels.texts.get(tick);
    if (label === undefined) continue;
    const y = downField(field, tick.place) + 4;
    marks.push(text(field.left - 12, y, label, { face: "figures", fill: quiet, anchor: "end" }));
  }
  for (const { across, value, label } of folds) {
    const place = placeOf(axis.mapping, value);
    if (place === null) continue;
    const [at, down] = [acrossField(field, across), downField(field, place)];
    marks.push(
      path([diamond(at, down, 5)], {
        closed: true,
        fill: colours["--paper"],
        stroke: colours["--ink"],
        width: 1.5,
      }),
    );
    if (label === "") continue;
    const y = down < field.top + 20 ? down + 18 : down - 6;
    marks.push(text(at + 8, y, `fold ${label}`, { face: "figures", fill: colours["--ink"] }));
  }
  if (!labelled) return marks;
  for (const { line, at } of lineEnds(storey, ruler, x, null)) {
    const [from, y] = [field.left + field.width + 6, field.top + at];
    marks.push(
      path(
        [
          [
            [from, y],
            [from + 14, y],
          ],
        ],
        { stroke: inkOf(line.style, colours), width: 2, dash: line.style.dash },
      ),
      text(from + 20, y + 4, line.label, { face: "figures", fill: colours["--ink"] }),
    );
  }
  return marks;
}

function ring(x: number, y: number, radius: number): [number, number][] {
  return Array.from({ length: 12 }, (_, i) => {
    const angle = (2 * Math.PI * i) / 12;
    return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
  });
}

function diamond(x: number, y: number, half: number): [number, number][] {
  return [
    [x, y - half],
    [x + half, y],
    [x, y + half],
    [x - half, y],
  ];
}
