import type { Layout } from "./layout";
import { FRAME_HEAD, OPENER } from "./measures";

/** What the keyboard comes to in the drawing. `x` and `y` are its middle. */
export interface Stop {
  readonly id: string;
  readonly does: "choose" | "open" | "close";
  readonly name: string;
  readonly x: number;
  readonly y: number;
}

export type Direction = "left" | "right" | "up" | "down";

/** Everything that can be pressed, row by row and then net by net. */
export function stopsOf({ chips, frames, rails }: Layout): Stop[] {
  const stops: Stop[] = [];
  for (const { box, x, y, width, height, rightPins } of chips) {
    const { name } = box;
    stops.push({ id: name, does: "choose", name, x: x + width / 2, y: y + height / 2 });
    if (box.inside !== null)
      stops.push({
        id: `open ${name}`,
        does: "open",
        name,
        x: x + width - rightPins - OPENER / 2,
        y: y + height / 2,
      });
  }
  for (const { box, x, y, width } of frames) {
    const { name } = box;
    const middle = y + FRAME_HEAD / 2;
    stops.push({ id: name, does: "choose", name, x: x + 40, y: middle });
    stops.push({ id: `close ${name}`, does: "close", name, x: x + width - OPENER / 2, y: middle });
  }
  for (const { net, x, top } of rails) stops.push({ id: net, does: "choose", name: net, x, y: top - 8 });
  return stops.sort((a, b) => a.y - b.y || a.x - b.x);
}

/** The nearest stop in a direction: what lies straight ahead counts before what lies aside. Null at the edge. */
export function nextStop(stops: readonly Stop[], from: Stop, direction: Direction): Stop | null {
  const isAcross = direction === "left" || direction === "right";
  const sign = direction === "left" || direction === "up" ? -1 : 1;
  let best: Stop | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (const stop of stops) {
    const ahead = sign * (isAcross ? stop.x - from.x : stop.y - from.y);
    const aside = Math.abs(isAcross ? stop.y - from.y : stop.x - from.x);
    const cost = ahead + 2 * aside;
    if (ahead <= 1 || cost >= least) continue;
    least = cost;
    best = stop;
  }
  return best;
}
