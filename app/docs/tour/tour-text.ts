/** What the tour begins with, in canonical form. */
export const TOUR_TEXT = `# A first netlist. The circuit, its parts and its figures are invented for this tour.
# The amplifier holds the summing net near zero, so that nearly the whole input current runs through
# the junction, whose voltage goes with the logarithm of that current. It has a bulk resistance.

title "First tour: log converter"

knob I_in   = 1 µA
knob R_bulk = 1 Ω in 100 mΩ .. 100 Ω

model junction : diode { Is = 2 fA, Rs = R_bulk }
model amp      : opamp { gain = 1e6, bias = 20 pA }

sum -- IS : current I_in -- ground
out -- D1 : junction -- sum
A1 : amp { plus = ground, minus = sum, out = out }

sweep I_in from 1 nA to 1 mA, 20 per decade

show v_log = out.v

read slope = per_decade(v_log)
read bend  = deviation(v_log)
`;

/** The line that the third step asks for. */
export const REQUIREMENT = 'require abs(bend) <= 0.5 mV as "log conformance"';
export const DRAWS = "draws 200 seed 7";
export const TOLERANCE = "± 30 %";
/** Values of R_bulk, as the text has them: that mends the nominal curve, and that leaves room for the tolerance. */
export const MENDED = "500 mΩ";
export const ROOMY = "400 mΩ";

const KNOB = /^(knob R_bulk\s*= )([^±\n]*?)( ±[^\n]*?)?( in [^\n]*)?$/mu;

/** The text with the requirement of the third step, if it asks for nothing yet. */
export function withRequirement(text: string): string {
  return /^require /mu.test(text) ? text : `${text.trimEnd()}\n\n${REQUIREMENT}\n`;
}

/** The text with another R_bulk, its tolerance as it was. Where its line is no longer there, that of the tour itself. */
export function withBulk(text: string, value: string): string {
  const from = KNOB.test(text) ? text : TOUR_TEXT;
  return withRequirement(from).replace(KNOB, (_, name, _value, tolerance = "", range = "") => {
    return name + value + tolerance + range;
  });
}

/** The text with a tolerance on R_bulk and draws. */
export function withDraws(text: string): string {
  const from = withRequirement(KNOB.test(text) ? text : TOUR_TEXT);
  const drawn = /^draws /mu.test(from) ? from : `${from.trimEnd()}\n\n${DRAWS}\n`;
  return drawn.replace(KNOB, (line, name, value, tolerance, range = "") =>
    tolerance === undefined ? `${name}${value} ${TOLERANCE}${range}` : line,
  );
}
