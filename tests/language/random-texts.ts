import { checkWiring } from "@/lib/circuit/wiring";
import { CATALOGUE } from "@/lib/language/catalogue";
import { check } from "@/lib/language/checker";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { format } from "@/lib/language/format";
import { highlight } from "@/lib/language/highlight";

/** Repeatable numbers in [0, 1): SplitMix32, common practice. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x21f0aaad);
    z = Math.imul(z ^ (z >>> 15), 0x735a2d97);
    return ((z ^ (z >>> 15)) >>> 0) / 4_294_967_296;
  };
}

/** Pieces of the language and of what does not belong to it. */
const PIECES = (
  "+ - * / ^ = < > ( ) { } , : . # \" ' \\ ± · µ Ω ° % -- +- .. <= >= § é 😀 ≤ − × ² " +
  "title use let knob model block sweep draws seek show read require from to over per decade points step in uniform normal " +
  "sigma track within for at of as and between rising falling seed revision resistor voltage current diode npn pnp opamp law " +
  "gain ground temperature a b out R1 Q1 X left right plus minus c e v i p Is drift value volts amps ratio n Rs T0 R " +
  "constructor __proto__ 1 2.5 1e-3 .5 0 1e999 25_°C 10_kΩ 10k 1_V 3_mV/K 50_ppm/K 1_% 2_V² 1_A exp ln sqrt if min max abs " +
  'tanh V_T pi q_e mean per_decade highest at_k "text" "open block_b(a){ }'
)
  .split(" ")
  .map((piece) => piece.replaceAll("_", piece.includes("__") ? "_" : " "));

/** Lines of good form whose names fit together often enough to reach the later phases. */
const LINES = [
  "knob k = 1 V in 0 V .. 5 V",
  "let g = 2 * k ± 1 % normal 3 sigma track pair within 0.1 %",
  "model d : diode { Is = 1 fA, Rs = 2 Ω, photocurrent = 1 nA }",
  "model q : npn { Is = 0.4 fA, beta_f = 240, Va_f = 80 V, I_leak_e = 1 aA }",
  "model o : opamp { gain = 1e6, out_low = -12 V, out_high = 12 V }",
  "ground -- V1 : voltage k -- a -- R1 : resistor 1 kΩ ± 1 % -- b -- D1 : diode d -- ground",
  "Q1 : q { c = a, b = b, e = ground }",
  "A1 : o { plus = ground, minus = b, out = out }",
  "out -- R2 : resistor 10 kΩ { drift = 50 ppm/K } -- b",
  "L1 : law { plus = c, minus = ground, volts = a.v * b.v / 10 V }",
  "c -- L2 : law { amps = 1 mA * tanh(L2.v / 1 V) } -- ground",
  "G1 : gain { plus = a, minus = b, out = x, ratio = 2 }",
  "block stage(in, to) {\n  knob R = 1 kΩ\n  in -- R1 : resistor R -- m\n  m -- D1 : d -- to\n}",
  "S : stage { in = a, to = out, R = 2 kΩ ± 1 % }",
  "block pair(a, b) { S : stage { in = a, to = b } }",
  "P : pair { a = out, b = ground }",
  "sweep k from 0 V to 5 V, 11 points",
  "sweep temperature over 10 °C, 25 °C",
  "draws 40 seed 7",
  "seek 2",
  "show out.v, y = b.v / 2, S.m.v, P.S.D1.i",
  "read hi = highest(y) for k in 1 V .. 2 V at temperature = 25 °C",
  'require hi <= 1 V in 95 % of draws as "high"',
  'require out.v within 1 V ± 5 % at k = 1 V as "out"',
  "require b.v rising",
  "# a comment",
  "",
];

/** Makes texts without end from a seed: pieces in no order, lines of good form, and either of them or `samples` cut about. */
export function randomTexts(seed: number, samples: readonly string[]): () => string {
  const random = seeded(seed);
  const below = (n: number): number => Math.floor(random() * n);
  const pick = <T>(from: readonly T[]): T => from[below(from.length)]!;
  const soup = (): string => {
    let text = "";
    for (let left = 1 + below(24); left > 0; left--) text += pick(PIECES) + pick(["", " ", " ", "\n"]);
    return text;
  };
  const lines = (): string => LINES.filter(() => random() < 0.22).join("\n");
  const stretch = (): string => {
    const sample = pick(samples);
    const from = below(sample.length);
    return sample.slice(from, from + 30 + below(160));
  };
  const mutated = (text: string): string => {
    let draft = text;
    for (let left = 1 + below(5); left > 0; left--) {
      const at = below(draft.length + 1);
      const length = random() < 0.5 ? 0 : below(12);
      const insert = random() < 0.6 ? pick(PIECES) : draft.slice(at, at + below(30));
      draft = draft.slice(0, at) + insert + draft.slice(at + length);
    }
    return draft;
  };
  const noise = (): string =>
    Array.from({ length: below(40) }, () => String.fromCharCode(below(random() < 0.5 ? 128 : 65_536))).join(
      "",
    );
  return () => {
    const kind = random();
    if (kind < 0.2) return soup();
    if (kind < 0.3) return lines();
    if (kind < 0.65) return mutated(lines());
    return kind < 0.95 ? mutated(stretch()) : noise();
  };
}

/** What is wrong with the answers to a text, null where nothing is. Throws what they throw. */
export function complaintOf(text: string): string | null {
  const { design, diagnostics } = check(text);
  const unsound = diagnostics.find((one) => !isSound(one, text.length));
  if (unsound !== undefined) return `an unsound diagnostic ${JSON.stringify(unsound)}`;
  const hasErrors = diagnostics.some(({ severity }) => severity === "error");
  if ((design === null) !== hasErrors) return "a design in spite of errors, or none without them";
  if (design !== null && !checkWiring(design).every((one) => isSound(one, text.length)))
    return "unsound wiring";
  const once = format(text);
  if (format(once) !== once) return `a form that is not kept: ${JSON.stringify(once)}`;
  const again = check(once);
  if ((again.design === null) !== (design === null))
    return "a form that is right where the text is not, or the reverse";
  return highlight(text).every(({ from, to }) => from < to && to <= text.length) ? null : "an unsound colour";
}

function isSound({ code, from, to, message, fix }: Diagnostic, length: number): boolean {
  const fits = (span: { from: number; to: number }) =>
    0 <= span.from && span.from <= span.to && span.to <= length;
  return code in CATALOGUE && fits({ from, to }) && message.length < 700 && (fix === undefined || fits(fix));
}
