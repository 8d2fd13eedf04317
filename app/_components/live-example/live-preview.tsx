"use client";

import dynamic from "next/dynamic";
import { useCallback } from "react";
import type { WrittenKnob } from "@/app/_components/preview/write-knobs";
import { LoadingState } from "@/app/_components/ui/states";
import { applyKnobs } from "./apply-knobs";
import type { Live } from "./use-live";

/** Px that a preview takes at least, so that what stands below it does not jump when it comes. */
const ROOM = 420;

const PreviewPane = dynamic(
  () => import("@/app/_components/preview/preview-pane").then((all) => all.PreviewPane),
  { loading: () => <LoadingState>Solving the preview…</LoadingState> },
);

interface Props {
  readonly live: Live;
  readonly isSeen: boolean;
  readonly isBrief?: boolean;
}

/** What the text gives, as soon as it is seen. Knobs can be written into the text. */
export function LivePreview({ live, isSeen, isBrief = false }: Props) {
  const { change, previewing } = live;
  const write = useCallback(
    (knobs: readonly WrittenKnob[]) => {
      void applyKnobs(knobs).then((make) => change(make));
    },
    [change],
  );
  return (
    <div style={{ minHeight: ROOM }}>
      {isSeen ? (
        <PreviewPane previewing={previewing} onWrite={write} isBrief={isBrief} />
      ) : (
        <p className="text-quiet text-sm">The curve is solved when it comes into view.</p>
      )}
    </div>
  );
}
