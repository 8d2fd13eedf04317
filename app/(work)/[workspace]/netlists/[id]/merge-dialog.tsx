"use client";

import { useMemo, useState } from "react";
import { type Choice, conflictsIn, mergedText, mergeTexts } from "@/app/_components/diff/merge";
import { MergePlace } from "@/app/_components/diff/merge-place";
import { TextDiff } from "@/app/_components/diff/text-diff";
import { useExamination } from "@/app/_components/editor/use-examination";
import { Button } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { Dialog } from "@/app/_components/ui/dialog";
import { MergeCheck } from "./merge-check";
import type { Saved } from "./saved";
import type { SheetState } from "./use-sheet";

interface Props {
  readonly sheet: SheetState;
  readonly theirs: Saved;
  readonly onBack: () => void;
  readonly onDone: () => void;
}

/**
 * Brings the text on the sheet and a revision that was saved meanwhile together: what only one of the two changed is taken, each place
 * that both changed is chosen by the reader, and the checker reads the result before it can be saved.
 */
export function MergeDialog({ sheet, theirs, onBack, onDone }: Props) {
  const { text: mine, saved } = sheet;
  const parts = useMemo(() => mergeTexts(mine, saved.text, theirs.text), [mine, saved.text, theirs.text]);
  const conflicts = useMemo(() => conflictsIn(parts), [parts]);
  const [choices, setChoices] = useState<ReadonlyMap<number, Choice>>(new Map());
  const [form, setForm] = useState<"beside" | "inline" | null>("inline");
  const merged = mergedText(parts, choices);
  const { examined, broken } = useExamination(merged ?? theirs.text);
  const checked = merged !== null && examined?.text === merged ? examined : null;
  const errors = checked?.diagnostics.filter(({ severity }) => severity === "error") ?? [];
  const isSound = checked !== null && errors.length === 0;
  const name = `Revision ${theirs.revision}`;
  const left = conflicts.length - choices.size;

  const save = async () => {
    if (merged === null || !isSound) return;
    const leavesOut = [...choices.values()].some(({ take }) => take === "theirs" || take === "edit");
    if (await sheet.saveMerged(merged, leavesOut)) onDone();
  };
  const put = () => {
    if (merged === null) return;
    sheet.loadTheirs(merged);
    onDone();
  };

  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => !open && onBack()}
      title={`Merge your text with revision ${theirs.revision}`}
      description={told(parts, conflicts.length)}
      actions={
        <>
          <p role="status" className="mr-auto self-center text-quiet text-sm">
            {left > 0 ? `${counted(left, "place")} left to choose` : "Every place is chosen"}
          </p>
          <Button onClick={onBack}>Back</Button>
          <Button disabled={merged === null} onClick={put}>
            Put it on the sheet
          </Button>
          <Button
            tone="primary"
            disabled={!isSound}
            busy={sheet.busy === "saving"}
            onClick={() => void save()}
          >
            {sheet.busy === "saving" ? "Saving…" : `Save as revision ${theirs.revision + 1}`}
          </Button>
        </>
      }
    >
      <div className="grid grid-cols-[minmax(0,1fr)] gap-5">
        {conflicts.map((place, index) => (
          <MergePlace
            // biome-ignore lint/suspicious/noArrayIndexKey: the places of a merge never change
            key={index}
            place={place}
            number={index + 1}
            of={conflicts.length}
            theirs={name}
            choice={choices.get(index)}
            onChoice={(choice) => setChoices(new Map([...choices, [index, choice]]))}
          />
        ))}
        {merged !== null && (
          <section
            aria-labelledby="merge-result"
            className="grid grid-cols-[minmax(0,1fr)] gap-2 border-t pt-3"
          >
            <h3 id="merge-result" className="font-semibold text-sm">
              The merge, against revision {theirs.revision}
            </h3>
            <MergeCheck text={merged} checked={checked} broken={broken} />
            <TextDiff
              before={{ text: theirs.text, label: name }}
              after={{ text: merged, label: "Merge" }}
              form={form}
              onForm={setForm}
            />
          </section>
        )}
      </div>
    </Dialog>
  );
}

function told(parts: ReturnType<typeof mergeTexts>, conflicts: number): string {
  const count = (by: string) => parts.filter((part) => part.kind === "agreed" && part.by === by).length;
  const [mine, theirs, both] = [count("mine"), count("theirs"), count("both")];
  const taken = [
    ...(mine > 0 ? [`${counted(mine, "change")} of yours`] : []),
    ...(theirs > 0 ? [`${counted(theirs, "change")} of the newer revision`] : []),
    ...(both > 0 ? [`${counted(both, "change")} that you both made`] : []),
  ];
  const fits = taken.length === 0 ? "" : `Taken as they are: ${taken.join(", ")}. `;
  if (conflicts === 0) return `${fits}No place was changed by both.`;
  const places = conflicts === 1 ? "One place was" : `${conflicts} places were`;
  return `${fits}${places} changed by both: choose what to take.`;
}
