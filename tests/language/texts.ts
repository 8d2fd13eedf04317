import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import fc from "fast-check";

const FOLDER = join(import.meta.dirname, "../../examples");

/** The example netlists, by file name. */
export const EXAMPLES: readonly (readonly [string, string])[] = readdirSync(FOLDER)
  .filter((name) => name.endsWith(".swn"))
  .map((name) => [name, readFileSync(join(FOLDER, name), "utf8")]);

const FRAGMENTS = [
  ..."+-*/^=<>(){},:.#\"'\\\n ±·µΩ°%",
  ...["--", "+-", "..", "<=", ">=", "\n", "\n\n", "\r\n", "\t", " ", "  ", "\u00a0", "# note\n"],
  ...["title", "use", "let", "knob", "model", "block", "sweep", "draws", "seek", "show", "read", "require"],
  ...[
    "from",
    "to",
    "over",
    "per",
    "decade",
    "points",
    "step",
    "in",
    "uniform",
    "normal",
    "sigma",
    "track",
    "within",
  ],
  ...["resistor", "voltage", "current", "diode", "npn", "pnp", "opamp", "law", "ground", "temperature"],
  ...[
    "a",
    "b",
    "out",
    "R1",
    "Q1",
    "left",
    "plus",
    "c",
    "v",
    "i",
    "Is",
    "drift",
    "value",
    "constructor",
    "__proto__",
  ],
  ...[
    "1",
    "2.5",
    "1e-3",
    ".5",
    "0",
    "1e999",
    "25 °C",
    "10 kΩ",
    "10k",
    "1 V",
    "3 mV/K",
    "50 ppm/K",
    "1 %",
    "2 V²",
  ],
  ...["block b(a) {\n", "block b(a) {", "\n}\n", "X : b { a = a }", "X.a.v", "X.R", 'use "b" revision 3'],
  ...[
    "gain { plus = a, minus = b, out = c, ratio = 2 }",
    "law { amps = 1 mS * a.v }",
    "volts",
    "amps",
    "ratio",
  ],
  ...["seed", "revision", "draws 3 seed 1", "seek 2", "as", "of", "and", "for", "at", "rising", "between"],
  ...["exp", "ln", "sqrt", "if", "min", "V_T", "pi", "mean", '"text"', '"open', "§", "😀", "é", "\ud800"],
];

/** Words of the language in no order, with spaces between or without. */
export const tokenSoup = fc
  .array(fc.tuple(fc.constantFrom(...FRAGMENTS), fc.constantFrom("", " ", " ", "\n")), { maxLength: 120 })
  .map((parts) => parts.map(([fragment, gap]) => fragment + gap).join(""));

/** An example with a few stretches cut out, doubled, or replaced by something of the language. */
export const mutatedExample = fc
  .tuple(
    fc.constantFrom(...EXAMPLES.map(([, text]) => text)),
    fc.array(fc.tuple(fc.nat(), fc.nat(30), fc.option(fc.constantFrom(...FRAGMENTS))), {
      minLength: 1,
      maxLength: 8,
    }),
  )
  .map(([text, edits]) =>
    edits.reduce((draft, [place, length, insert]) => {
      const at = place % (draft.length + 1);
      return (
        draft.slice(0, at) +
        (insert ?? draft.slice(at, at + length)) +
        draft.slice(at + (insert === null ? 0 : length))
      );
    }, text),
  );

export const anyText = fc.oneof(
  fc.string({ unit: "binary", maxLength: 300 }),
  fc.string({ unit: "grapheme", maxLength: 300 }),
  tokenSoup,
  mutatedExample,
);

const ident = fc.constantFrom("a", "b", "V_x", "R_in", "gain2", "µ_0", "Ω_1");
const literal = fc.constantFrom("1", "2.50", "1e-3", "10 kohm", "4.7uA", "25 degC", "1%", "3 mV/K", "2 A/V²");
const expression = fc.letrec<{ any: string }>((tie) => ({
  any: fc.oneof(
    { maxDepth: 4, withCrossShrink: true },
    literal,
    ident,
    fc
      .tuple(tie("any"), fc.constantFrom("+", "- ", " *", "/ ", "^", " - -", "+ -"), tie("any"))
      .map((parts) => parts.join("")),
    tie("any").map((inner) => `( ${inner})`),
    tie("any").map((inner) => `- ${inner}`),
    fc.tuple(tie("any"), tie("any")).map(([x, y]) => `min(${x} ,${y})`),
    ident.map((name) => `${name} . v`),
  ),
})).any;

const clause = fc.oneof(
  fc.constant(""),
  fc.tuple(ident, expression).map(([a, x]) => ` at  ${a}=${x}`),
  fc.tuple(ident, expression, expression).map(([a, x, y]) => ` for ${a} in ${x}..${y}`),
);
const relation = fc.oneof(
  fc.constantFrom(" rising", "   falling"),
  fc.tuple(fc.constantFrom("<=", " >", "≥"), expression).map((parts) => parts.join("")),
  fc.tuple(expression, expression).map(([x, y]) => ` within ${x}+-${y}`),
  fc.tuple(expression, expression).map(([x, y]) => ` between ${x}  and ${y}`),
);
const tail = fc.constantFrom("", "# why", '  as  "so"', " in 95% of draws", ' in 5 % of draws as "so" # why');

/** Readings and requirements, with and without every clause that neighbours are aligned by. */
const contract = fc.oneof(
  fc
    .tuple(expression, relation, clause, clause, tail)
    .map(([x, holds, one, two, end]) => `require ${x}${holds}${one}${two}${end}`),
  fc
    .tuple(ident, expression, clause, fc.constantFrom("", "  # why"))
    .map(([a, x, one, end]) => `read ${a}=highest( ${x} )${one}${end}`),
);

const statement = fc.oneof(
  fc
    .tuple(fc.constantFrom("let", "knob"), ident, expression)
    .map(([word, name, value]) => `${word}  ${name}=${value}`),
  fc.tuple(ident, expression).map(([name, value]) => `show ${name}   =${value} ,\n  ${value}`),
  fc.tuple(ident, expression).map(([name, value]) => `model ${name}:diode{Is=${value} , # note\n\nn = 1}`),
  fc.tuple(ident, ident, expression).map(([a, b, value]) => `${a}--R : resistor ${value}±1%--${b}`),
  fc.tuple(ident, expression).map(([a, value]) => `sweep ${a} over ${value},\n# between\n ${value}`),
  fc.tuple(ident, ident, expression).map(([a, b, value]) => `L1:law{plus=${a},minus=${b} ,volts=${value}}`),
  fc.tuple(ident, expression).map(([a, value]) => `X : part{p=${a},\n R=${value}±1%}`),
  contract,
  fc.constantFrom("draws  10 seed 7", "seek 3", 'use  "shelf" revision 2'),
  fc.constantFrom("", "# alone", "   # indented", "\t"),
);

const block = fc
  .tuple(
    fc.constantFrom("part", "stage"),
    fc.array(statement, { maxLength: 5 }),
    fc.constantFrom("", "# end"),
  )
  .map(([name, inner, end]) => `block ${name} (p,q){ # head\n${inner.join("\n")}\n   } ${end}`);

const nestedBlock = fc
  .tuple(fc.array(fc.oneof(statement, block), { maxLength: 4 }))
  .map(([inner]) => `block outer(p){\n${inner.join("\n")}\n}`);

/** Statements of good form, badly spaced; their names and units may not be right. */
export const wellFormed = fc
  .array(fc.oneof({ weight: 8, arbitrary: statement }, block, nestedBlock), { maxLength: 12 })
  .map((statements) => statements.join("\n"));
