"use client";

import { type ReactNode, useId, useRef } from "react";
import { LINE_HEIGHT } from "@/app/_components/editor/palette";
import { LivePreview } from "./live-preview";
import { LiveText } from "./live-text";
import { useInView } from "./use-in-view";
import { useLive } from "./use-live";

/** Lines shown without scrolling, at least and at most. */
const LINES = { fewest: 9, most: 26 };

interface Props {
  readonly text: string;
  readonly title: string;
  readonly hasKnobs: boolean;
  /** The text as the server has rendered it. */
  readonly children: ReactNode;
}

/** An example in the run of a page: as wide as its place, text and curve side by side where there is room. */
export function LiveBox({ text, title, hasKnobs, children }: Props) {
  const place = useRef<HTMLElement>(null);
  const heading = useId();
  const { isNear, wasNear } = useInView(place);
  // A page may hold dozens of these: one that is scrolled far away ends its thread, and solves anew when it comes back.
  const live = useLive(text, isNear);
  const lines = Math.min(LINES.most, Math.max(LINES.fewest, text.trimEnd().split("\n").length + 1));
  return (
    <section
      ref={place}
      aria-labelledby={heading}
      data-live-example
      className="@container my-6 min-w-0 rounded-[2px] border bg-paper"
    >
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 border-b px-4 py-1.5">
        <p id={heading} className="font-semibold text-sm">
          {title}
        </p>
        <p className="text-quiet text-xs">Live: a preview, solved in this page and kept nowhere</p>
      </div>
      <div className="grid @3xl:grid-cols-2">
        <div
          className="flex min-w-0 flex-col border-b @3xl:border-r @3xl:border-b-0"
          style={{ minHeight: 36 + 16 + LINE_HEIGHT * lines }}
        >
          <LiveText live={live}>{children}</LiveText>
        </div>
        <div className="min-w-0 px-4 py-2">
          <LivePreview live={live} isSeen={wasNear} isBrief={!hasKnobs} />
        </div>
      </div>
    </section>
  );
}
