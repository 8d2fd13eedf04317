"use client";

import { type ReactNode, useCallback, useState } from "react";
import { LiveSheet } from "@/app/_components/live-example/live-sheet";
import { useLive } from "@/app/_components/live-example/use-live";
import { useWhole } from "@/app/_components/live-example/use-whole";
import { Button } from "@/app/_components/ui/button";
import { BEGINNING, type Progress } from "./progress";
import { RunLinks } from "./run-links";
import { StepBar } from "./step-bar";
import { StepPanel } from "./step-panel";
import { StepRow } from "./step-row";
import { STEPS, type StepName } from "./steps";
import { MENDED, ROOMY, withBulk, withDraws, withRequirement } from "./tour-text";
import { useProgress } from "./use-progress";
import { queueRun, useRuns } from "./use-runs";

const KEEPING = { until: "it is put back", name: "sweepwright tour text" } as const;
/** What the knobs are turned to by "do it for me", A and Ω. */
const TURNED = { I_in: 1e-3, R_bulk: 10 };

interface Props {
  readonly text: string;
  /** The text as the server has rendered it. */
  readonly children: ReactNode;
}

/** The first tour: seven steps that are done on a live sheet, each seen to be done by what stands there. */
export function Tour({ text, children }: Props) {
  const live = useLive(text, true, KEEPING);
  const solving = useWhole();
  const [progress, change] = useProgress();
  const [before, setBefore] = useState<Progress | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const { at, done, netlist } = progress;
  const index = STEPS.findIndex(({ name }) => name === at);
  const step = STEPS[index]!;
  const runs = useRuns(netlist, step.needsAccount && done[at] === undefined);

  const go = (name: StepName) => change((now) => ({ ...now, at: name }));
  const finish = useCallback(
    (name: StepName, says: string) => change((now) => ({ ...now, done: { ...now.done, [name]: says } })),
    [change],
  );
  const queue = (make: (text: string) => string) => {
    if (netlist === null) return;
    setProblem(null);
    void queueRun(netlist, make).then(setProblem);
  };
  const shows: Record<StepName, (() => void) | undefined> = {
    read: () => live.previewing.turn("I_in", TURNED.I_in),
    turn: () => live.previewing.turn("R_bulk", TURNED.R_bulk),
    require: () => {
      live.previewing.turn("R_bulk", null);
      live.change(withRequirement);
    },
    mend: () => {
      live.previewing.turn("R_bulk", null);
      live.change((now) => withBulk(now, MENDED));
    },
    draw: () => {
      live.change(withDraws);
      solving.start(withDraws(live.text));
    },
    queue: netlist === null ? undefined : () => queue((now) => now),
    compare: netlist === null ? undefined : () => queue((now) => withBulk(now, ROOMY)),
  };
  const count = Object.keys(done).length;

  return (
    <>
      <div className="mt-6 flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-y py-2">
        <StepRow progress={progress} onChoose={go} />
        <p className="flex items-center gap-2 text-quiet text-sm">
          {count} of {STEPS.length} done
          {count > 0 && (
            <Button
              size="small"
              tone="quiet"
              onClick={() => {
                setBefore(progress);
                change(() => BEGINNING);
                if (live.text !== text) live.putBack();
              }}
            >
              Begin again
            </Button>
          )}
          {count === 0 && before !== null && (
            <Button
              size="small"
              tone="quiet"
              onClick={() => {
                change(() => before);
                setBefore(null);
                live.takeAgain();
              }}
            >
              Take the tour back
            </Button>
          )}
        </p>
      </div>
      <StepPanel step={step} number={index + 1} count={STEPS.length}>
        {step.needsAccount && (
          <RunLinks
            name={at}
            text={live.text}
            netlist={netlist}
            runs={runs}
            problem={problem}
            onNetlist={(made) => change((now) => ({ ...now, netlist: made }))}
          />
        )}
      </StepPanel>
      <LiveSheet live={live} solving={solving}>
        {children}
      </LiveSheet>
      <StepBar
        step={step}
        number={index + 1}
        count={STEPS.length}
        live={live}
        whole={solving.whole}
        runs={runs}
        said={done[at]}
        onDone={finish}
        onShow={shows[at]}
        onGo={(by) => go(STEPS[index + by]!.name)}
      />
    </>
  );
}
