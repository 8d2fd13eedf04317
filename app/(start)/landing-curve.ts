import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";

/** The netlist of the front page: one log converter with an amplifier's bias current and a junction's bulk resistance. */
export const LANDING_NETLIST = `title "Log converter"

knob I_in = 1 µA

model junction : diode { Is = 2 fA, Rs = 2 Ω }
model amp : opamp { gain = 1e6, bias = 20 pA }

sum -- IS : current I_in -- ground
out -- D1 : junction -- sum
A1 : amp { plus = ground, minus = sum, out = out }

sweep I_in from 1 nA to 1 mA, 20 per decade
sweep temperature over 10 °C, 25 °C, 40 °C

show v_log = out.v
`;

export interface LandingStrand {
  /** Ambient temperature, K. */
  readonly kelvin: number;
  /** Output at each current, V. */
  readonly volts: readonly number[];
  /** Output minus the best straight line over log10 of the current, V. */
  readonly bend: readonly number[];
  /** Slope of that line, V per decade. */
  readonly perDecade: number;
}

export interface LandingCurve {
  /** The swept current, A. */
  readonly amperes: readonly number[];
  readonly strands: readonly LandingStrand[];
}

/** Slope and intercept of the least-squares line over the points [from, to) of x and y. */
function bestLine(x: readonly number[], y: readonly number[], from: number, to: number) {
  const n = to - from;
  let sx = 0;
  let sy = 0;
  let sxx = 0;
  let sxy = 0;
  for (let i = from; i < to; i++) {
    const xi = x[i] ?? 0;
    const yi = y[i] ?? 0;
    sx += xi;
    sy += yi;
    sxx += xi * xi;
    sxy += xi * yi;
  }
  const slope = (n * sxy - sx * sy) / (n * sxx - sx * sx);
  return { slope, intercept: (sy - slope * sx) / n };
}

let solved: LandingCurve | null = null;

/** Solves the front page's netlist with the engine, once a process. The line is fitted from 10 nA to 100 µA. */
export function landingCurve(): LandingCurve {
  if (solved !== null) return solved;
  const { job } = compile(LANDING_NETLIST);
  if (job === null) throw new Error("The netlist of the front page does not compile.");
  const [current, temperature] = job.plan.axes;
  const amperes = current?.values ?? [];
  const trace = solveRange(job, 0, job.plan.points).traces[0] ?? new Float64Array();
  const decades = amperes.map((value) => Math.log10(value));
  const from = amperes.findIndex((value) => value > 0.99e-8);
  const to = amperes.findLastIndex((value) => value < 1.01e-4) + 1;
  const strands = (temperature?.values ?? []).map((kelvin, index) => {
    const volts = [...trace.subarray(index * amperes.length, (index + 1) * amperes.length)];
    const { slope, intercept } = bestLine(decades, volts, from, to);
    const bend = volts.map((value, i) => value - (slope * (decades[i] ?? 0) + intercept));
    return { kelvin, volts, bend, perDecade: slope };
  });
  solved = { amperes, strands };
  return solved;
}
