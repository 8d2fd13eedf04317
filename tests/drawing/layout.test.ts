import { describe, expect, test } from "vitest";
import { allBoxes } from "@/app/_components/drawing/chosen";
import { type Layout, layOutConnections } from "@/app/_components/drawing/layout";
import { linesOf, railOrder } from "@/app/_components/drawing/rail-order";
import { nextStop, stopsOf } from "@/app/_components/drawing/stops";
import { EXAMPLES } from "../language/texts";
import { connected, ladderText } from "./netlists";

function drawn(text: string, open: readonly string[] = []): Layout {
  return layOutConnections(connected(text).rows, new Set(open));
}

function blocksOf(text: string): string[] {
  return allBoxes(connected(text).rows).flatMap(({ name, inside }) => (inside === null ? [] : [name]));
}

/** Pairs of chips that cover each other. */
function overlaps({ chips }: Layout): string[] {
  return chips.flatMap((a, k) =>
    chips
      .slice(k + 1)
      .filter(
        (b) => a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height,
      )
      .map((b) => `${a.box.name} ${b.box.name}`),
  );
}

const DRAWINGS = EXAMPLES.flatMap(([name, text]) => [
  [`${name}, closed`, text, drawn(text)] as const,
  [`${name}, open`, text, drawn(text, blocksOf(text))] as const,
]);

describe.each(DRAWINGS)("%s", (_, __, layout) => {
  test("no chip covers another, and all is within the paper", () => {
    expect(overlaps(layout)).toEqual([]);
    for (const { x, y, width, height } of [...layout.chips, ...layout.frames]) {
      expect(x).toBeGreaterThanOrEqual(0);
      expect(y).toBeGreaterThanOrEqual(0);
      expect(x + width).toBeLessThanOrEqual(layout.width);
      expect(y + height).toBeLessThanOrEqual(layout.height);
    }
  });

  test("every wire ends at the rail of its net, and none runs through another chip", () => {
    const rails = new Map(layout.rails.map((rail) => [rail.net, rail]));
    for (const { net, to, y, x, box } of layout.wires) {
      const rail = net === null ? undefined : rails.get(net);
      if (rail === undefined) expect(Math.abs(to - x)).toBeLessThan(30);
      else {
        expect(to).toBe(rail.x);
        expect(y).toBeGreaterThanOrEqual(rail.top);
        expect(y).toBeLessThanOrEqual(rail.bottom);
      }
      const [from, end] = [Math.min(x, to), Math.max(x, to)];
      const crossed = layout.chips.filter(
        (chip) =>
          chip.box.name !== box &&
          chip.y < y &&
          y < chip.y + chip.height &&
          chip.x < end &&
          from < chip.x + chip.width,
      );
      expect(crossed.map((chip) => chip.box.name)).toEqual([]);
    }
  });

  test("no rail runs through a chip, and no two stand at one place", () => {
    for (const { x, top, bottom } of layout.rails) {
      const through = layout.chips.filter(
        (chip) => chip.x < x && x < chip.x + chip.width && chip.y < bottom && top < chip.y + chip.height,
      );
      expect(through.map((chip) => chip.box.name)).toEqual([]);
    }
    expect(new Set(layout.rails.map(({ x }) => x)).size).toBe(layout.rails.length);
  });
});

describe("the drawing", () => {
  test("reads as the text: a path is one row from left to right", () => {
    const { chips } = drawn(
      "a -- R1 : resistor 1 Ω -- b -- R2 : resistor 1 Ω -- c\nc -- R3 : resistor 1 Ω -- a\n",
    );
    const [one, two, three] = chips;
    expect(two!.y).toBe(one!.y);
    expect(two!.x).toBeGreaterThan(one!.x + one!.width);
    expect(three!.y).toBeGreaterThan(one!.y);
  });

  test("is the same each time", () => {
    const [, text] = EXAMPLES[0]!;
    expect(drawn(text, blocksOf(text))).toEqual(drawn(text, blocksOf(text)));
  });

  test("a net stands beside the one through which the text comes to it", () => {
    const text =
      "a -- R1 : resistor 1 Ω -- b\nb -- R2 : resistor 1 Ω -- c\na -- R3 : resistor 1 Ω -- d\nz -- R4 : resistor 1 Ω -- c\n";
    expect(railOrder(linesOf(connected(text).rows, new Set()))).toEqual(["a", "d", "b", "z", "c"]);
  });

  test("a line more leaves the order of all rails as it is", () => {
    const before = ladderText(60);
    const after = before.replace("n9 -- R9", "n9 -- RX : resistor 1 Ω -- extra\nn9 -- R9");
    const [one, other] = [before, after].map((text) => railOrder(linesOf(connected(text).rows, new Set())));
    expect(other!.filter((net) => net !== "extra")).toEqual(one);
    expect(other).toContain("extra");
  });

  test("an open block is a frame round its parts, and nothing else is in it", () => {
    const text = EXAMPLES.find(([name]) => name === "absorbance-head.swn")![1];
    const layout = drawn(text, ["S"]);
    const [frame] = layout.frames;
    expect(frame!.box.name).toBe("S");
    const inside = layout.chips.filter(
      ({ x, y }) =>
        x >= frame!.x && y >= frame!.y && y < frame!.y + frame!.height && x < frame!.x + frame!.width,
    );
    expect(inside.map(({ box }) => box.name)).toEqual(["S.Q", "S.A"]);
  });

  test("an empty text gives an empty paper", () => {
    expect(drawn("")).toMatchObject({ chips: [], wires: [], rails: [], frames: [] });
  });

  test("2,000 elements have a place each", () => {
    expect(drawn(ladderText(2000)).chips).toHaveLength(2000);
  });
});

describe("keys in the drawing", () => {
  const layout = drawn(
    "a -- R1 : resistor 1 Ω -- b -- R2 : resistor 1 Ω -- c\nc -- R3 : resistor 1 Ω -- a\n",
  );
  const stops = stopsOf(layout);
  const stop = (id: string) => stops.find((one) => one.id === id)!;

  test("arrows go to what lies straight ahead, and stop at the edge", () => {
    expect(nextStop(stops, stop("R1"), "right")!.id).toBe("b");
    expect(nextStop(stops, stop("b"), "right")!.id).toBe("R2");
    expect(nextStop(stops, stop("R2"), "left")!.id).toBe("b");
    expect(nextStop(stops, stop("R1"), "down")!.id).toBe("R3");
    expect(nextStop(stops, stop("R3"), "down")).toBeNull();
  });

  test("every box, net and block that can be turned is a stop", () => {
    const text = EXAMPLES.find(([name]) => name === "absorbance-head.swn")![1];
    const ids = stopsOf(drawn(text, ["S"])).map(({ id }) => id);
    expect(ids).toEqual(expect.arrayContaining(["S", "close S", "S.Q", "R", "open R", "ls", "R1"]));
    expect(new Set(ids).size).toBe(ids.length);
  });
});
