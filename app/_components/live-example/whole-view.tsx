"use client";

import { useId } from "react";
import { RequirementBars } from "@/app/_components/preview/requirement-bars";
import { Button } from "@/app/_components/ui/button";
import { counted, formatCount } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { ProgressLine } from "@/app/_components/ui/states";
import type { Verdict } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import type { Whole } from "./use-whole";
import type { WholeResult } from "./whole-plan";

interface Props {
  readonly whole: Whole;
  /** The text that stands on the page. */
  readonly text: string;
  readonly onStart: () => void;
  readonly onStop: () => void;
}

const VERDICTS: Record<Verdict, string> = {
  holds: "Everything that is required holds.",
  broken: "A requirement is broken.",
  "no data": "A requirement has no data.",
};

/** Every setting and every draw, solved in the page when asked for: what the preview above leaves out. */
export function WholeView({ whole, text, onStart, onStop }: Props) {
  const heading = useId();
  const isSolving = whole.kind === "progress";
  const isOld = "text" in whole && whole.text !== text;
  return (
    <section aria-labelledby={heading} className="mt-8 border-t pt-4">
      <h3 id={heading} className="caption">
        The whole plan <span className="ml-2 font-normal">every setting and every draw</span>
      </h3>
      <div className="mt-2 flex min-h-9 flex-wrap items-center gap-x-4 gap-y-2">
        {isSolving ? (
          <Button size="small" onClick={onStop}>
            Stop
          </Button>
        ) : (
          <Button size="small" onClick={onStart}>
            {whole.kind === "not yet" ? "Solve it here" : "Solve it again"}
          </Button>
        )}
        <p className="min-w-0 grow basis-48 text-quiet text-sm" role="status" data-whole={whole.kind}>
          {sentence(whole)}
          {isOld && !isSolving && <b className="text-nodata"> Of the text before your last change.</b>}
        </p>
      </div>
      {isSolving && (
        <ProgressLine
          label="Points of the whole plan"
          {...(whole.points > 0 ? { done: whole.done, total: whole.points } : {})}
        />
      )}
      {whole.kind === "missing" && (
        <Notice tone="caution" title="The solving has stopped">
          <p>This browser could not start it or had to end it. A queued run does not need it.</p>
        </Notice>
      )}
      {whole.kind === "result" && whole.result.frame.requirements.length > 0 && (
        <div className={isOld ? "mt-4 [&_svg]:opacity-50" : "mt-4"}>
          <RequirementBars
            requirements={whole.result.frame.requirements}
            remark="judged on the whole plan, in this page"
          />
        </div>
      )}
    </section>
  );
}

function sentence(whole: Whole): string {
  if (whole.kind === "not yet") return "The preview is one sweep at nominal values; this is all of it.";
  if (whole.kind === "missing") return "";
  if (whole.kind === "progress") {
    const { done, points } = whole;
    return points === 0 ? "Solving…" : `${formatCount(done)} of ${counted(points, "point")} solved`;
  }
  if (whole.kind === "result") return resultInWords(whole.result);
  if (whole.kind === "wrong") return `The text has ${counted(whole.errors, "error")} to mend first.`;
  return `Its ${counted(whole.points, "point")} are more than a page solves. Open it in a workspace and queue a run.`;
}

/** "1 575 points solved here in 310 ms, all proved, worst 9 pV; a preview, kept nowhere. Everything that is required holds." */
export function resultInWords({ frame, count, taken }: WholeResult): string {
  const { points, failed, proved, worst } = count;
  const left = points - failed - proved;
  const time = taken < 1000 ? `${Math.round(taken)}\u202fms` : `${(taken / 1000).toFixed(1)}\u202fs`;
  const width = worst === null ? "" : `, worst ${formatQuantity(worst, "V", 2)}`;
  const rest = failed === 0 ? "all proved" : "all others proved";
  const said = [
    `${counted(points, "point")} solved here in ${time}`,
    ...(failed === 0 ? [] : [`${formatCount(failed)} failed`]),
    ...(proved === 0 ? [] : [left === 0 ? `${rest}${width}` : `${formatCount(left)} not proved${width}`]),
  ];
  const verdict = frame.requirements.length === 0 ? "Nothing is required." : VERDICTS[frame.verdict];
  return `${said.join(", ")}; a preview, kept nowhere. ${verdict}`;
}
