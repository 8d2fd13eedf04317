import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";
import { USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { figureBands } from "@/app/_components/curves/figure-bands";
import { figureScene } from "@/app/_components/curves/figure-scene";
import { sceneSvg } from "@/app/_components/curves/scene-svg";
import { THEMES } from "@/app/_components/curves/theme-values";
import { allowedBands } from "@/lib/analyses/allowed-bands";
import type { RequirementDocument } from "@/lib/analyses/result";
import type { RunState } from "../run-shapes";
import { sourceLine } from "../source-line";

/** Px; on a sheet of A4 or Letter the smallest letters are then 8 points high. */
const WIDTH = 720;
/** On paper and on a light screen; on a dark one. */
const COLOURS = { light: { ...THEMES.light, "--paper": "#FFFFFF" }, dark: THEMES.dark } as const;

/** The curves of a run as they are printed: drawings, and what they show in words. */
export interface DrawnFigure {
  readonly light: string;
  readonly dark: string;
  readonly description: string;
}

/** Draws the curves of a run; null for a run without a sweep. Reads every point, and keeps none. */
export function drawFigure(
  run: RunState,
  source: CurveSource,
  requirements: readonly RequirementDocument[],
): DrawnFigure | null {
  const set = curveSet(source);
  if (set === null) return null;
  const request = {
    set,
    view: USUAL_VIEW,
    title: run.title,
    source: sourceLine(run),
    allowed: allowedBands({ axes: run.plan.axes, requirements }),
    bands: figureBands(
      set,
      set.traces.map(({ name }) => name),
    ),
    width: WIDTH,
  };
  const light = figureScene({ ...request, colours: COLOURS.light });
  const dark = figureScene({ ...request, colours: COLOURS.dark });
  return {
    light: sceneSvg(light, "figure"),
    dark: sceneSvg(dark, "figure-dark"),
    description: light.description,
  };
}

/** The curves on white paper, on a dark screen in its colours, with their summary in words. */
export function ReportFigure({ figure }: { readonly figure: DrawnFigure }) {
  return (
    <section aria-labelledby="report-curves" data-whole className="grid grid-cols-[minmax(0,1fr)] gap-3">
      <h2 id="report-curves">Curves</h2>
      <figure>
        {(["light", "dark"] as const).map((theme) => (
          <div
            key={theme}
            data-figure={theme}
            // biome-ignore lint/security/noDangerouslySetInnerHtml: sceneSvg escapes every text that it sets
            dangerouslySetInnerHTML={{ __html: figure[theme] }}
          />
        ))}
        <figcaption className="mt-2 text-sm">{figure.description}</figcaption>
      </figure>
    </section>
  );
}
