import type { Direction, Stop } from "./stops";

/** Pixels that Shift and an arrow move the drawing, and that are kept round what is brought into view. */
const PAN = 120;
const ROUND = 48;

/** Scrolls a window so that a stop of the drawing is in it; leaves it where it is when it shows it already. */
export function bringIntoView(box: HTMLElement, stop: Stop, zoom: number): void {
  const [x, y] = [stop.x * zoom, stop.y * zoom];
  const { scrollLeft, scrollTop, clientWidth, clientHeight } = box;
  const isSeen =
    x > scrollLeft + ROUND &&
    x < scrollLeft + clientWidth - ROUND &&
    y > scrollTop + ROUND / 2 &&
    y < scrollTop + clientHeight - ROUND / 2;
  if (!isSeen) box.scrollTo({ left: x - clientWidth / 2, top: y - clientHeight / 2 });
}

export function pan(box: HTMLElement | null, direction: Direction): void {
  const sign = direction === "left" || direction === "up" ? -PAN : PAN;
  const isAcross = direction === "left" || direction === "right";
  box?.scrollBy({ left: isAcross ? sign : 0, top: isAcross ? 0 : sign });
}
