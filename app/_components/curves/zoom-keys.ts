import type { Zoom } from "./use-zoom";

/** A step along the ruler, as a share of the view, and a step closer. */
export const STEP = 0.25;
export const CLOSER = 0.5;

/**
 * Brings another part of the sweep into view by a key; false for a key that does not. Plus and minus about the cursor's place, `at`,
 * comma and full stop along the ruler, 0 for the whole of it, Backspace for the view before.
 */
export function zoomByKey(key: string, at: number | undefined, zoom: Zoom): boolean {
  switch (key) {
    case "+":
    case "=":
      zoom.stretch(CLOSER, at);
      return true;
    case "-":
    case "\u2212":
      zoom.stretch(1 / CLOSER, at);
      return true;
    case ",":
      zoom.pan(-STEP);
      return true;
    case ".":
      zoom.pan(STEP);
      return true;
    case "0":
      zoom.show(null);
      return true;
    case "Backspace":
      zoom.back();
      return true;
    default:
      return false;
  }
}
