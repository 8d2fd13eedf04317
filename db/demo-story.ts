import { format } from "@/lib/language/format";
import type { DEMO_PEOPLE } from "./demo-people";

type Email = (typeof DEMO_PEOPLE)[number]["email"];

/** A revision of the demo's story: who saved it, with which words, and what changed in the text before it. */
export interface Chapter {
  readonly by: Email;
  readonly message: string;
  readonly changes: readonly (readonly [was: string, becomes: string])[];
  /** Labels of the requirements that its run breaks. */
  readonly breaks: readonly string[];
}

const ERIK = "erik.engineer@northbench.example";
const ROSA = "rosa.reviewer@northbench.example";
const ADAM = "adam.admin@northbench.example";

/** The first draft. Invented, as everything in the demo. */
const DRAFT = `# Northbench Instruments (invented): the turbidity head, from its first draft to the one that holds. All of it is made up.
# Scattered light against transmitted light, as a logarithm: half a volt a decade, whatever the lamp and the room do.

title "Turbidity head (invented)"

knob I_scatter = 1 µA
let  R_sum     = 20 kΩ ± 0.5 %

model array : npn   { Is = 0.4 fA, beta_f = 240, Va_f = 80 V, Eg = 1.17 V, x = 3.2 }
model amp   : opamp { gain = 2e6, offset = 0 V ± 1 mV, bias = 20 pA, out_low = -12 V, out_high = 12 V }

# log stage of the scattered light
ground -- IS : current I_scatter -- s
QS : array { c = s, b = ground, e = ls }
AS : amp   { plus = ground, minus = s, out = ls }

# the transmitted light, for now a fixed voltage
ground -- VF : voltage -557 mV -- lr

# the difference
ls -- R1 : resistor R_sum -- m -- R2 : resistor R_sum -- d
lr -- R3 : resistor R_sum -- p -- R4 : resistor R_sum -- ground
AD : amp { plus = p, minus = m, out = d }

# half a volt a decade
AG : amp { plus = d, minus = g, out = out }
g -- RT : resistor 1 kΩ -- ground
out -- RG : resistor 7.45 kΩ -- g

sweep I_scatter from 1 nA to 100 µA, 5 per decade
sweep temperature over 10 °C, 25 °C, 40 °C
draws 40 seed 11

show turbidity = out.v

read scale = per_decade(turbidity)
read bend  = deviation(turbidity)

require turbidity between -50 mV and 50 mV at I_scatter = 1 µA in 95 % of draws as "zero"
require scale within 0.5 V ± 1.5 %                                              as "scale"
require bend between -10 mV and 10 mV                                           as "log conformance"
`;

/**
 * One netlist over five revisions by three people: a draft breaks two requirements, each is mended, the requirements are narrowed, and
 * better parts hold them again. So history, comparison and the trend of verdicts have something to show.
 */
export const STORY: readonly Chapter[] = [
  {
    by: ERIK,
    message:
      "First draft of the turbidity head: a fixed voltage in place of the transmitted light (invented)",
    changes: [["", DRAFT]],
    breaks: ["zero", "scale"],
  },
  {
    by: ERIK,
    message: "A log stage for the transmitted light: the drift of the zero drops out",
    changes: [
      ["let  R_sum     =", "let  I_direct  = 1 µA\nlet  R_sum     ="],
      [
        "# the transmitted light, for now a fixed voltage\nground -- VF : voltage -557 mV -- lr\n",
        `# log stage of the transmitted light
ground -- IR : current I_direct -- r
QR : array { c = r, b = ground, e = lr }
AR : amp   { plus = ground, minus = r, out = lr }
`,
      ],
    ],
    breaks: ["scale"],
  },
  {
    by: ROSA,
    message: "A gain that falls as the temperature rises holds the scale",
    changes: [
      ["# half a volt a decade\n", "# half a volt a decade: a gain that falls as the temperature rises\n"],
      ["RT : resistor 1 kΩ --", "RT : resistor 1 kΩ { drift = 3570 ppm/K } --"],
    ],
    breaks: [],
  },
  {
    by: ADAM,
    message: "What the flow group asks for: half the zero, and the scale within 1 %",
    changes: [
      ["between -50 mV and 50 mV", "between -25 mV and 25 mV"],
      ["0.5 V ± 1.5 % ", "0.5 V ± 1 %   "],
    ],
    breaks: ["zero", "scale"],
  },
  {
    by: ERIK,
    message: "Better matched resistors and amplifiers of less offset, where the budget put the cost",
    changes: [
      ["20 kΩ ± 0.5 %", "20 kΩ ± 0.1 %"],
      ["offset = 0 V ± 1 mV", "offset = 0 V ± 150 µV"],
    ],
    breaks: [],
  },
];

/** The texts of the story's revisions, in order, each in the canonical form. */
export function textsOf(story: readonly Chapter[]): string[] {
  let text = "";
  return story.map(({ changes }) => {
    for (const [was, becomes] of changes) text = text.replace(was, () => becomes);
    text = format(text);
    return text;
  });
}
