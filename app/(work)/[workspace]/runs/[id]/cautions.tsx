import { Notice } from "@/app/_components/ui/notice";
import { formatQuantity } from "@/lib/units/quantity";

export interface VoltageSpan {
  readonly low: { readonly net: string; readonly volts: number };
  readonly high: { readonly net: string; readonly volts: number };
}

/** Direct voltage above which a circuit is dangerous to touch, V: common practice for dry places (extra-low voltage). */
const HAZARDOUS = 60;

/** What the models leave out, and a warning where nets stand so far apart that touching them is dangerous. */
export function Cautions({ span }: { readonly span: VoltageSpan | null }) {
  return (
    <section aria-labelledby="cautions" className="grid gap-3">
      <h2 id="cautions" className="caption">
        Cautions
      </h2>
      {span !== null && apart(span) > HAZARDOUS && (
        <Notice tone="caution" title="Hazardous voltage">
          <p>
            {reach(span)}, more than {HAZARDOUS}&#8239;V DC. Follow local codes and have a licensed engineer
            look at it before anything is built or touched. These results are no proof of safety.
          </p>
        </Notice>
      )}
      <p className="max-w-prose text-quiet text-sm">
        These are direct-current operating points of the models in the netlist, at nominal values. They leave
        out dynamics and bandwidth, noise, self-heating, and whatever the netlist does not give, such as the
        breakdown of a junction or the leakage of a board. Results are no proof of safety.
      </p>
    </section>
  );
}

/** Volts between the two nets that are farthest apart over the sweep, ground counted among them. */
function apart({ low, high }: VoltageSpan): number {
  return Math.max(0, high.volts) - Math.min(0, low.volts);
}

function reach({ low, high }: VoltageSpan): string {
  const show = ({ net, volts }: VoltageSpan["low"]) =>
    `${net.replace(/\.v$/, "")} at ${formatQuantity(volts, "V")}`;
  if (low.volts >= 0) return `Net ${show(high)} stands above ground`;
  if (high.volts <= 0) return `Net ${show(low)} stands below ground`;
  return `Net ${show(low)} and net ${show(high)} stand ${formatQuantity(apart({ low, high }), "V")} apart over the sweep`;
}
