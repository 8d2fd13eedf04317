"use client";

import { useEffect } from "react";
import type { Live } from "@/app/_components/live-example/use-live";
import type { Whole } from "@/app/_components/live-example/use-whole";
import { usePreview } from "@/app/_components/preview/use-preview";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { StateMark } from "@/app/_components/ui/state-mark";
import { judgeStep } from "./judge";
import type { Step, StepName, TourRun } from "./steps";

/** Ms for which a state must last before it counts: what is passed through while typing is nobody's answer. */
const REST = 500;

interface Props {
  readonly step: Step;
  /** Its number, from 1, and how many there are. */
  readonly number: number;
  readonly count: number;
  readonly live: Live;
  readonly whole: Whole;
  readonly runs: readonly TourRun[] | null;
  /** What was said when it was done; undefined before. */
  readonly said: string | undefined;
  readonly onDone: (name: StepName, says: string) => void;
  /** Shows the change; absent where there is nothing to show it on. */
  readonly onShow: (() => void) | undefined;
  /** To the step so many further. */
  readonly onGo: (by: number) => void;
}

/** Whether the step is done, which the page sees by itself, and the ways on. It stays in view while one works on the sheet above it. */
export function StepBar(props: Props) {
  const { step, number, count, live, whole, runs, said, onDone, onShow, onGo } = props;
  const preview = usePreview(live.previewing, (all) => all);
  const { isDone, says } = judgeStep(step.name, { text: live.text, preview, whole, runs });
  useEffect(() => {
    if (said !== undefined || !isDone || says === null) return;
    const timer = setTimeout(() => onDone(step.name, says), REST);
    return () => clearTimeout(timer);
  }, [said, isDone, says, onDone, step.name]);
  const isOffered = said === undefined && onShow !== undefined;

  return (
    <section
      aria-label="How far the step is"
      className="sticky bottom-0 z-40 flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-t-2 border-ink bg-paper py-2"
    >
      <p
        role="status"
        className="flex min-h-6 min-w-0 grow basis-64 items-baseline gap-2 text-sm"
        data-step={step.name}
      >
        {said === undefined ? (
          <span>
            <b>Step {number}</b> is not done yet. {isDone ? null : says}
          </span>
        ) : (
          <>
            <span className="text-holds">
              <StateMark shape="check" />
            </span>
            <span className="min-w-0">
              <b>Done:</b> {said}
            </span>
          </>
        )}
      </p>
      <div className="flex flex-wrap items-center gap-2">
        {number > 1 && (
          <Button tone="quiet" onClick={() => onGo(-1)}>
            Back
          </Button>
        )}
        {isOffered && (
          <Button onClick={onShow} title={step.shown}>
            Do it for me
            <span className="sr-only">: {step.shown}</span>
          </Button>
        )}
        {number < count ? (
          <Button tone={said === undefined ? "plain" : "primary"} onClick={() => onGo(1)}>
            {said === undefined ? "Skip" : "Next step"}
          </Button>
        ) : (
          <ButtonLink href="/docs/examples" tone={said === undefined ? "plain" : "primary"}>
            Go on to the examples
          </ButtonLink>
        )}
      </div>
    </section>
  );
}
