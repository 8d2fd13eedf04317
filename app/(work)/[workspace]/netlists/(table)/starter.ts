/** The text a new netlist begins with: small, commented, and it runs as it stands. */
export function starterText(title: string): string {
  const name = title.replaceAll('"', "'").replaceAll(/\s+/g, " ").trim();
  return `title "${name}"

knob I_in = 1 µA                     # what the sweep turns

model junction : diode { Is = 2 fA, n = 1.05 }
model amp : opamp { }                # an ideal amplifier

# A current into the summing net leaves through the junction: out falls by 62 mV with every decade.
ground -- IS : current I_in -- s
s -- D1 : junction -- out
A1 : amp { plus = ground, minus = s, out = out }

sweep I_in from 1 nA to 1 mA, 10 per decade

show v_log = out.v
`;
}
