import type { RefObject } from "react";
import type { BranchesDocument } from "@/lib/analyses/branches-document";
import { drawOf } from "@/lib/analyses/plan";
import type { Failure, ReadingDocument, RequirementDocument } from "@/lib/analyses/result";
import { BranchList } from "./branch-list";
import { Cautions, type VoltageSpan } from "./cautions";
import { CursorAccount } from "./cursor-account";
import { FailedPoints } from "./failed-points";
import type { PageState } from "./page-state";
import { PointPanel } from "./point-panel";
import { ReadingList } from "./reading-list";
import { RequirementList } from "./requirement-list";
import { RunFacts } from "./run-facts";
import { isLive, type PointAccount, type RunState } from "./run-shapes";
import type { TextLinks } from "./text-links";
import { UnstablePoints } from "./unstable-points";

interface Props {
  readonly workspace: string;
  readonly run: RunState;
  readonly found: Found | null;
  readonly links: TextLinks;
  readonly span: VoltageSpan | null;
  /** The chosen point, and its account where it came with the page. */
  readonly chosen: number | null;
  readonly point: PointAccount | null;
  /** Hears of the point under the cursor of the plot. */
  readonly onCursor: RefObject<(point: number | null) => void>;
  readonly onShow: (change: Partial<PageState>) => void;
}

/** What the panels take from the document of a run, in either form. */
export interface Found {
  readonly requirements: readonly RequirementDocument[];
  readonly readings: readonly ReadingDocument[];
  readonly failures: readonly Failure[];
  readonly branches?: readonly BranchesDocument[];
  readonly unstable?: readonly { readonly from: number; readonly to: number }[];
}

/** What the netlist requires, and whether it holds: the first thing of a run, on a telephone too. */
export function RunVerdicts({
  run,
  found,
  links,
  onShow,
}: Pick<Props, "run" | "found" | "links" | "onShow">) {
  return (
    <div className="min-w-0 px-4 pt-6 md:px-6 lg:col-start-2 lg:border-l">
      <RequirementList
        requirements={found?.requirements ?? []}
        links={links}
        partly={partly(run)}
        onPlace={(worst, label) =>
          onShow({ point: pointOf(run, worst), worst: worst.draw > 0 ? label : null, tab: "curves" })
        }
      />
    </div>
  );
}

/** All that stands beside the curves below the verdicts: readings, the chosen point, operating points, failures, the run itself. */
export function RunPanels({ workspace, run, found, links, span, chosen, point, onCursor, onShow }: Props) {
  const { plan } = run;
  const ofOneDraw = plan.points / (plan.draws + 1);
  return (
    <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-8 border-t px-4 py-6 md:px-6 lg:col-start-2 lg:border-t-0 lg:border-l lg:pt-8">
      <ReadingList readings={found?.readings ?? []} axes={plan.axes} links={links} />
      {plan.axes.length > 0 && <CursorAccount run={run.id} onCursor={onCursor} />}
      <PointPanel
        run={run}
        point={chosen}
        first={point}
        choosable={plan.axes.length > 0}
        onPoint={(next) => onShow({ point: next })}
      />
      <BranchList branches={found?.branches ?? []} axes={plan.axes} search={run.search ?? null} />
      <UnstablePoints ranges={found?.unstable ?? []} axes={plan.axes} ofOneDraw={ofOneDraw} />
      <FailedPoints
        failures={found?.failures ?? []}
        axes={plan.axes}
        draws={plan.draws}
        ofOneDraw={ofOneDraw}
        onPoint={(next) => onShow({ point: next })}
        onAll={() => onShow({ tab: "numbers", failed: true, page: 1 })}
      />
      <RunFacts workspace={workspace} run={run} />
      <Cautions span={span} power={run.judgement?.power ?? null} draws={plan.draws} />
    </div>
  );
}

function partly({ status, pointsDone, points }: RunState): "so far" | "of a part of the run" | null {
  if (isLive(status)) return "so far";
  return pointsDone < points ? "of a part of the run" : null;
}

/** The flat point of a worst place; the first of its sweep where it has no place on the first knob. */
function pointOf({ plan }: RunState, { draw, at }: NonNullable<RequirementDocument["worst"]>): number {
  const { axes, draws, points } = plan;
  let stride = 1;
  let point = 0;
  for (const { knob, values } of axes) {
    const asked = at.find((one) => one.knob === knob);
    if (asked !== undefined) point += stride * Math.max(0, values.indexOf(asked.value));
    stride *= values.length;
  }
  return draw * (points / (draws + 1)) + point;
}

/** Where a flat point stands, whatever its draw: the place on the plot, which shows the nominal design. */
export function onPlot({ plan }: RunState, point: number): number {
  return point - drawOf(plan, point) * (plan.points / (plan.draws + 1));
}
