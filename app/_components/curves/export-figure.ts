import { type FigureRequest, figureScene } from "./figure-scene";
import { scenePng } from "./scene-canvas";
import { sceneSvg } from "./scene-svg";
import { THEMES } from "./theme-values";

/** A figure to be taken along, in the colours of a theme. */
export interface FigureExport extends Omit<FigureRequest, "colours"> {
  readonly theme: keyof typeof THEMES;
}

/** The figure as the text of an SVG file; pure. */
export function figureSvg({ theme, ...request }: FigureExport): string {
  return sceneSvg(figureScene({ ...request, colours: THEMES[theme] }));
}

/** The figure as a PNG of so many pixels a px, painted by the browser with the fonts of the page. */
export function figurePng({ theme, ...request }: FigureExport, scale = 2): Promise<Blob> {
  return scenePng(figureScene({ ...request, colours: THEMES[theme] }), scale);
}
