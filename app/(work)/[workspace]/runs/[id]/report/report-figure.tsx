import { curveSet } from "@/app/_components/curves/curve-set";
import { USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { figureBands } from "@/app/_components/curves/figure-bands";
import { figureScene } from "@/app/_components/curves/figure-scene";
import { sceneSvg } from "@/app/_components/curves/scene-svg";
import { THEMES } from "@/app/_components/curves/theme-values";
import { allowedBands } from "@/lib/analyses/allowed-bands";
import type { RunDocument } from "@/lib/analyses/result";
import type { RunState } from "../run-shapes";
import { sourceLine } from "../source-line";

/** Px; on a sheet of A4 or Letter the smallest letters are then 8 points high. */
const WIDTH = 720;
const COLOURS = { ...THEMES.light, "--paper": "#FFFFFF" };

/** The curves of a run on white paper, with their summary in words; nothing for a run without a sweep. */
export function ReportFigure({ run, document }: { readonly run: RunState; readonly document: RunDocument }) {
  const set = curveSet(document);
  if (set === null) return null;
  const scene = figureScene({
    set,
    view: USUAL_VIEW,
    colours: COLOURS,
    title: run.title,
    source: sourceLine(run),
    allowed: allowedBands(document),
    bands: figureBands(
      set,
      set.traces.map(({ name }) => name),
    ),
    width: WIDTH,
  });
  return (
    <section aria-labelledby="report-curves" data-whole className="grid gap-3">
      <h2 id="report-curves">Curves</h2>
      <figure>
        {/* biome-ignore lint/security/noDangerouslySetInnerHtml: sceneSvg escapes every text that it sets */}
        <div dangerouslySetInnerHTML={{ __html: sceneSvg(scene) }} />
        <figcaption className="mt-2 text-sm">{scene.description}</figcaption>
      </figure>
    </section>
  );
}
