import { formatQuantity } from "@/lib/units/quantity";
import { landingCurve } from "./landing-curve";
import { RulerAxis, Storey, type StoreyLine } from "./landing-storey";

const STYLES = [
  { stroke: "var(--trace-3)", dash: "6 4" },
  { stroke: "var(--trace-1)", dash: "none" },
  { stroke: "var(--trace-2)", dash: "2 3" },
] as const;

/** Least and greatest of the ticks, in the unit of the storey. */
const UPPER = { from: 0.2, to: 0.8, ticks: [0.2, 0.4, 0.6, 0.8] };
const LOWER = { from: -2e-3, to: 2e-3, ticks: [-2e-3, -1e-3, 0, 1e-3, 2e-3] };

/** The two storeys of the front page: the trace above, its error from the best straight line below, on one ruler. */
export function LandingPlot() {
  const { amperes, strands } = landingCurve();
  const decades = amperes.map((value) => Math.log10(value));
  const lines = (of: (index: number) => readonly number[], labelled: boolean): StoreyLine[] =>
    strands.map(({ kelvin }, index) => ({
      values: of(index),
      ...(STYLES[index] ?? STYLES[1]),
      label: labelled ? formatCelsius(kelvin) : "",
    }));
  const nominal = strands[1];
  return (
    <figure>
      <Storey
        name="v_log"
        unit="V"
        height={232}
        range={UPPER}
        x={decades}
        lines={lines((index) => strands[index]?.volts ?? [], true)}
      />
      <Storey
        name="bend"
        unit="mV from the best line, 10 nA to 100 µA"
        scale={1e3}
        height={120}
        range={LOWER}
        x={decades}
        lines={lines((index) => strands[index]?.bend ?? [], false)}
        band={{ from: -8, to: -4, low: -0.5e-3, high: 0.5e-3 }}
      />
      <RulerAxis labels={["1 nA", "10 nA", "100 nA", "1 µA", "10 µA", "100 µA", "1 mA"]} />
      <figcaption className="mt-4 max-w-prose text-quiet text-sm">
        Solved by the engine on this server from the netlist beside it: at 25 °C the slope is{" "}
        {formatQuantity(nominal?.perDecade ?? Number.NaN, "V", 4)} per decade. Bias current bends the low end,
        bulk resistance the high one.
      </figcaption>
    </figure>
  );
}

function formatCelsius(kelvin: number): string {
  return `${Math.round(kelvin - 273.15)}\u202f°C`;
}
