import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { counted } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import type { PowerPeak } from "@/lib/analyses/power-peak";
import { formatQuantity } from "@/lib/units/quantity";

export interface VoltageSpan {
  readonly low: { readonly net: string; readonly volts: number };
  readonly high: { readonly net: string; readonly volts: number };
}

/** Direct voltage above which a circuit is dangerous to touch, V: common practice for dry places (extra-low voltage). */
const HAZARDOUS = 60;
/** Power above which a small part needs a thought for its heat, W: common practice, what an ordinary small resistor stands. */
const HOT = 0.25;

const ADVICE =
  "Follow local codes and have a licensed engineer look at it before anything is built or touched. These results are no proof of safety.";

interface Props {
  readonly span: VoltageSpan | null;
  /** The part that dissipates most, once that is known. */
  readonly power: PowerPeak | null;
  /** Random draws of the run beside the nominal design. */
  readonly draws: number;
}

/** What the models leave out, and a warning where nets stand dangerously far apart or a part becomes hot. */
export function Cautions({ span, power, draws }: Props) {
  return (
    <section aria-labelledby="cautions" className="grid gap-3">
      <h2 id="cautions" className="caption">
        Cautions
      </h2>
      {span !== null && apart(span) > HAZARDOUS && (
        <Notice tone="caution" title="Hazardous voltage">
          <p>
            {reach(span)}, more than {HAZARDOUS}&#8239;V DC. {ADVICE}
          </p>
        </Notice>
      )}
      {power !== null && power.watts > HOT && (
        <Notice tone="caution" title="Heat">
          <p>
            {power.element} dissipates {formatQuantity(power.watts, "W", 3)}
            {placeOf(power)} in the nominal design, more than the {formatQuantity(HOT, "W", 3)} that an
            ordinary small part stands; no model here knows how hot it becomes. Check it, and every other
            part, against its stated power. {ADVICE}
          </p>
        </Notice>
      )}
      <p className="max-w-prose text-quiet text-sm">
        These are direct-current operating points of the models in the netlist,{" "}
        {draws === 0
          ? "at nominal values"
          : `at nominal values and in ${counted(draws, "random draw")} of the tolerances that the netlist states`}
        . They leave out dynamics and bandwidth, noise, self-heating, and whatever the netlist does not give,
        such as the breakdown of a junction or the leakage of a board. Results are no proof of safety.
      </p>
    </section>
  );
}

function placeOf({ at }: PowerPeak): string {
  const words = at.map((one) => `${one.knob} ${formatKnob(one, one.value, 4)}`).join(", ");
  return words === "" ? "" : ` at ${words}`;
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
