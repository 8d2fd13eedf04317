import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { StateBadge } from "@/app/_components/ui/state-badge";
import type { Budget } from "@/lib/analyses/budget";
import type { RequirementDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { Costs } from "./costs";

interface Props {
  readonly requirements: readonly RequirementDocument[];
  /** Error budgets of what the requirements are about, by their labels. */
  readonly causes: readonly Budget[];
}

/**
 * What the netlist requires and how it came out: verdict, margin, the worst place, the yield over the draws, and the parts whose
 * tolerances move it the most.
 */
export function RequirementList({ requirements, causes }: Props) {
  if (requirements.length === 0) return null;
  return (
    <section aria-labelledby="requirements">
      <h2 id="requirements" className="caption">
        Requirements
      </h2>
      <ul className="mt-2 border-t">
        {requirements.map((one, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: two may have one label; the order never changes
          <li key={index} className="grid gap-1 border-b py-2.5">
            <div className="flex flex-wrap items-baseline justify-between gap-x-4">
              <span className="min-w-0 break-words font-semibold text-sm">{one.label}</span>
              <StateBadge state={one.verdict} />
            </div>
            <p className="text-quiet text-sm">{inWords(one)}</p>
            <Costs budget={causes.find(({ reading }) => reading === one.label)} />
          </li>
        ))}
      </ul>
    </section>
  );
}

function inWords({ margin, unit, worst, verdict, yield: share }: RequirementDocument): string {
  const parts: string[] = [];
  if (margin === null) {
    parts.push(verdict === "no data" ? "A point that it needs is not solved" : "Without a margin");
  } else if (margin < 0) parts.push(`Missed by ${formatQuantity(-margin, unit)}`);
  else parts.push(`Margin ${formatQuantity(margin, unit)}`);
  if (worst !== null) {
    const at = worst.at.map((knob) => `${knob.knob} ${formatKnob(knob, knob.value, 4)}`);
    if (worst.draw > 0) at.push(`draw ${worst.draw}`);
    if (at.length > 0) parts.push(`worst at ${at.join(", ")}`);
  }
  if (share !== undefined) {
    const percent = (part: number) => `${(100 * part).toFixed(1)} %`;
    parts.push(
      `holds in ${share.holds} of ${share.of} draws, so in ${percent(share.low)} to ${percent(share.high)} of parts (95 % confidence)`,
    );
  }
  return `${parts.join("; ")}.`;
}
