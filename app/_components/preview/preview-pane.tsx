"use client";

import { memo, useCallback, useId } from "react";
import { classNames } from "@/app/_components/ui/class-names";
import { ProgressLine } from "@/app/_components/ui/states";
import { KnobList } from "./knob-list";
import type { Outline, Row } from "./messages";
import { PreviewCurves } from "./preview-curves";
import { PreviewRemark } from "./preview-remark";
import type { Previewing } from "./previewing";
import { ReadingRows } from "./reading-rows";
import { RequirementBars } from "./requirement-bars";
import { countInWords, rowInWords } from "./row-words";
import { SettingChoice } from "./setting-choice";
import { SpokenPreview } from "./spoken-preview";
import { useLate } from "./use-late";
import { usePreview } from "./use-preview";
import type { WrittenKnob } from "./write-knobs";

interface Props {
  readonly previewing: Previewing;
  /** Puts values of knobs into the text; absent where it may not be changed. */
  readonly onWrite?: ((knobs: readonly WrittenKnob[]) => void) | undefined;
  /** Leaves the knobs out: for a few lines of text that are there to be read. */
  readonly isBrief?: boolean;
}

/** On a window that is high enough the curves stay in view while what is below them is scrolled: a knob is turned with the eye on them. */
const STAYS =
  "z-30 pb-1 has-[details[open]]:static [@media(min-width:64rem)_and_(min-height:52rem)]:sticky top-0";

/** What is focused below is scrolled to where the curves that stay, two storeys at most as a rule, do not hide it. */
const CLEARS =
  "[@media(min-width:64rem)_and_(min-height:52rem)]:[&_:is(input,select,button,a)]:scroll-mt-[31rem]";

/** Before the first curves the room that they will take is kept, so that what stands below is not pushed about. */
const BRIEF_ROOM = "min-h-[432px]";
const ROOM = "min-h-[432px] lg:min-h-[calc(100dvh-200px)]";

/** Old curves and bars are faded; words and figures keep the contrast that reading takes. */
const FADED = "[&_canvas]:opacity-50 [&_svg]:opacity-50";

/** What a run of the text would show, solved in the browser as one types: one sweep, nominal, kept nowhere. */
export const PreviewPane = memo(function PreviewPane({ previewing, onWrite, isBrief = false }: Props) {
  const heading = useId();
  const preview = usePreview(previewing, (all) => all);
  const { outline, row, isStale, state, turned, place } = preview;
  const turn = useCallback(
    (knob: string, value: number | null) => previewing.turn(knob, value),
    [previewing],
  );
  const reset = useCallback(() => previewing.reset(), [previewing]);
  const first = outline?.axes[0];
  const stand = useCallback(
    (next: number) => {
      if (first !== undefined) previewing.turn(first.knob, first.values[next]!);
    },
    [previewing, first],
  );
  const isOld = useLate(isStale && state !== "solving");
  const isSlow = useLate(state === "solving");
  const isFirst = row === null && state === "solving";
  const faded = isOld ? FADED : undefined;
  return (
    <section
      aria-labelledby={heading}
      className={classNames("grid min-w-0 content-start gap-6", isFirst && (isBrief ? BRIEF_ROOM : ROOM))}
    >
      <div className={classNames("grid min-w-0 gap-1 bg-paper", STAYS)}>
        <div className="flex min-h-7 flex-wrap items-center justify-between gap-x-6 gap-y-1">
          <h2 id={heading} className="caption">
            Preview{" "}
            <span className="ml-2 font-normal">
              {row !== null && (isOld ? countInWords(row) : rowInWords(row))}
              {isOld && <b className="text-nodata"> · of the text before its errors</b>}
            </span>
          </h2>
          {outline !== null && row !== null && outline.axes.length > 1 && (
            <div className="flex flex-wrap gap-x-4 gap-y-1">
              {outline.axes.slice(1).map((axis) => (
                <SettingChoice
                  key={axis.knob}
                  axis={axis}
                  value={settingOf(axis.knob, turned, row, outline)}
                  onTurn={turn}
                />
              ))}
            </div>
          )}
        </div>
        <div className="h-0.5" aria-hidden="true">
          {isSlow && <ProgressLine />}
        </div>
        <PreviewRemark preview={preview} />
        {row !== null && outline !== null && (
          <div
            data-preview={isStale ? "stale" : row.stage}
            aria-busy={state === "solving"}
            className={classNames("min-w-0", faded)}
          >
            <PreviewCurves outline={outline} row={row} place={place} onPlace={stand} />
          </div>
        )}
      </div>
      <div className={classNames("grid min-w-0 content-start gap-6 empty:hidden", CLEARS)}>
        {row !== null && (row.requirements.length > 0 || row.elsewhere.length > 0) && (
          <div className={faded}>
            <RequirementBars requirements={row.requirements} elsewhere={row.elsewhere} />
          </div>
        )}
        {row !== null && (
          <div className={classNames("empty:hidden", faded)}>
            <ReadingRows readings={row.readings} />
          </div>
        )}
        {outline !== null && !isFirst && !isBrief && (
          <KnobList
            outline={outline}
            turned={turned}
            place={place}
            onTurn={turn}
            onReset={reset}
            onWrite={isOld ? undefined : onWrite}
          />
        )}
      </div>
      <SpokenPreview preview={preview} />
    </section>
  );
});

/** What an outer sweep is set to: what was asked for, else what the row stands at. */
function settingOf(knob: string, turned: ReadonlyMap<string, number>, row: Row, { axes }: Outline): number {
  const asked = turned.get(knob);
  if (asked !== undefined) return asked;
  return (
    row.axes.find((axis) => axis.knob === knob)?.values[0] ??
    axes.find((axis) => axis.knob === knob)!.values[0]!
  );
}
