import { atLeast } from "./columns";
import type { Range } from "./range";

interface Position {
  readonly place: number;
  readonly family: number;
}

/**
 * Where a key moves the cursor: left and right by a point, with Shift or by Page Up and Page Down by ten, Home and End to the
 * ends of the view, up and down to the next drawn setting. Null for a key that moves nothing. It starts at the middle of the view.
 */
export function moved(
  key: string,
  shift: boolean,
  cursor: Position | null,
  {
    x,
    families,
    view,
  }: { readonly x: Float64Array; readonly families: readonly number[]; readonly view: Range },
): Position | null {
  const first = atLeast(x, view.from - 1e-9 * Math.abs(view.from));
  const last = atLeast(x, view.to + 1e-9 * Math.abs(view.to) + Number.MIN_VALUE) - 1;
  if (last < first || families.length === 0) return null;
  const clamp = (place: number) => Math.min(last, Math.max(first, place));
  const step = shift ? 10 : 1;
  const here = cursor ?? { place: Math.floor((first + last) / 2), family: families[0]! };
  const at = Math.max(0, families.indexOf(here.family));
  const family = (next: number) => families[Math.min(families.length - 1, Math.max(0, next))]!;
  switch (key) {
    case "ArrowRight":
      return cursor === null ? here : { ...here, place: clamp(here.place + step) };
    case "ArrowLeft":
      return cursor === null ? here : { ...here, place: clamp(here.place - step) };
    case "PageUp":
      return { ...here, place: clamp(here.place + 10) };
    case "PageDown":
      return { ...here, place: clamp(here.place - 10) };
    case "Home":
      return { ...here, place: first };
    case "End":
      return { ...here, place: last };
    case "ArrowUp":
      return { ...here, family: family(at - 1) };
    case "ArrowDown":
      return { ...here, family: family(at + 1) };
    default:
      return null;
  }
}
