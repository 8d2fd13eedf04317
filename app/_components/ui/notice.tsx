import type { ReactNode } from "react";
import { classNames } from "./class-names";
import { type MarkShape, StateMark } from "./state-mark";

type NoticeTone = "plain" | "broken" | "caution" | "holds";

const EDGES: Record<NoticeTone, string> = {
  plain: "border-rule",
  broken: "border-broken",
  caution: "border-nodata",
  holds: "border-holds",
};

const SHAPES: Record<Exclude<NoticeTone, "plain">, { shape: MarkShape; ink: string }> = {
  broken: { shape: "cross", ink: "text-broken" },
  caution: { shape: "diamond", ink: "text-nodata" },
  holds: { shape: "check", ink: "text-holds" },
};

/** A bordered remark on the page. `announce` reads it out when it appears: for answers to what the reader just did. */
export function Notice({
  tone = "plain",
  title,
  children,
  announce = false,
}: {
  readonly tone?: NoticeTone;
  readonly title?: string;
  readonly children?: ReactNode;
  readonly announce?: boolean;
}) {
  const mark = tone === "plain" ? null : SHAPES[tone];
  return (
    <div
      role={announce ? "alert" : undefined}
      className={classNames("flex gap-2.5 rounded-[2px] border bg-surface px-3 py-2.5 text-sm", EDGES[tone])}
    >
      {mark !== null && (
        <span className={classNames("mt-1", mark.ink)}>
          <StateMark shape={mark.shape} />
        </span>
      )}
      <div className="min-w-0">
        {title !== undefined && <p className="font-semibold">{title}</p>}
        {children}
      </div>
    </div>
  );
}
