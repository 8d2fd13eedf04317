import { memo, useId } from "react";
import { MarginBar } from "@/app/_components/ui/margin-bar";
import { limitsInWords, marginSentence, worstInWords } from "@/app/_components/ui/margin-words";
import { type MarkShape, StateMark } from "@/app/_components/ui/state-mark";
import type { RequirementDocument, Verdict } from "@/lib/analyses/result";
import { yieldInWords } from "./row-words";

const MARKS: Record<Verdict, { readonly shape: MarkShape; readonly ink: string }> = {
  holds: { shape: "check", ink: "text-holds" },
  broken: { shape: "cross", ink: "text-broken" },
  "no data": { shape: "diamond", ink: "text-nodata" },
};

const NONE: readonly string[] = [];

/** Requirements as the preview sees them: nominal, at one setting. Those of other settings are named only. */
export const RequirementBars = memo(function RequirementBars({
  requirements,
  elsewhere = NONE,
  remark = "judged on the preview",
}: {
  readonly requirements: readonly RequirementDocument[];
  readonly elsewhere?: readonly string[];
  /** What they were judged on. */
  readonly remark?: string;
}) {
  // A page may show several previews, so no heading has a name of its own.
  const heading = useId();
  return (
    <section aria-labelledby={heading}>
      <h3 id={heading} className="caption">
        Requirements <span className="ml-2 font-normal">{remark}</span>
      </h3>
      {requirements.length > 0 && (
        <ul className="mt-2 border-t">
          {requirements.map((one, index) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: two may have one label
            <RequirementRow key={index} requirement={one} />
          ))}
        </ul>
      )}
      {elsewhere.length > 0 && (
        <p className="mt-2 text-quiet text-sm">At other settings: {elsewhere.join(", ")}.</p>
      )}
    </section>
  );
});

function RequirementRow({ requirement }: { readonly requirement: RequirementDocument }) {
  const { label, verdict } = requirement;
  const { shape, ink } = MARKS[verdict];
  const limits = limitsInWords(requirement);
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-3 gap-y-0.5 border-b py-1.5 sm:grid-cols-[minmax(0,10rem)_minmax(4rem,1fr)_8.5rem]">
      <span className="flex min-w-0 items-baseline gap-2 text-sm">
        <span className={ink}>
          <StateMark shape={shape} />
        </span>
        <span className="min-w-0 break-words">
          {label}
          <span className={verdict === "holds" ? "sr-only" : `ml-1.5 text-xs ${ink}`}> {verdict}</span>
          {requirement.yield !== undefined && (
            <span className="block text-quiet text-xs">{yieldInWords(requirement.yield)}</span>
          )}
        </span>
        <span className="sr-only">{marginSentence(requirement)}</span>
      </span>
      <MarginBar
        requirement={requirement}
        decorative
        className="order-last col-span-2 sm:order-none sm:col-span-1"
      />
      <span className="figures text-right text-xs" aria-hidden="true">
        {verdict === "no data" ? "no data" : worstInWords(requirement)}
        {limits !== "" && <span className="block text-quiet">{limits}</span>}
      </span>
    </li>
  );
}
