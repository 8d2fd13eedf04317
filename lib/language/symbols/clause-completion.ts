import type { Token } from "../token";
import { CLAUSE_MEANINGS } from "./meanings";
import type { NameScope } from "./symbol";

/** A clause that can follow a value, with what is put in; its places as in snippets.ts. */
export interface ClauseOffer {
  readonly text: string;
  readonly about: string;
  readonly snippet: string;
}

const RELATIONS = ["within", "between", "rising", "falling"];
const COMPARISONS: ReadonlySet<string> = new Set(["<=", ">=", "<", ">"]);

const SNIPPETS: Readonly<Record<string, string>> = {
  uniform: "uniform",
  normal: "normal ‹3› sigma",
  track: "track ‹GROUP› within ‹0.05 %›",
  to: "to ",
  "per decade": "per decade",
  points: "points",
  seed: "seed ‹1›",
  revision: "revision ‹1›",
  within: "within ",
  between: "between ",
  rising: "rising",
  falling: "falling",
  for: "for ",
  at: "at ",
  in: "in ‹95› % of draws",
  as: 'as "‹label›"',
};

/** What can follow the value that has just ended in a statement, of which `before` are the tokens so far. */
export function clausesAfter(statement: string, before: readonly Token[], scope: NameScope): ClauseOffer[] {
  const words = new Set(before.map((token) => token.text));
  switch (statement) {
    case "let":
    case "knob":
      return [...tolerance(before, words), ...(statement === "knob" && !words.has("in") ? [range()] : [])];
    case "sweep":
      return sweep(before, words, scope);
    case "draws":
      return words.has("seed") ? [] : plain("seed");
    case "use":
      return words.has("revision") ? [] : plain("revision");
    case "read":
      return plain("for", "at");
    case "require":
      return requirement(words);
    default:
      return tolerance(before, words);
  }
}

function plain(...words: readonly string[]): ClauseOffer[] {
  return words.map((word) => ({ text: word, about: CLAUSE_MEANINGS[word]!, snippet: SNIPPETS[word]! }));
}

/** After a number with its unit: `±`, and what may follow it. */
function tolerance(before: readonly Token[], words: ReadonlySet<string>): ClauseOffer[] {
  const sign = before.findLastIndex(({ text }) => text === "±");
  const start = before.findLastIndex(({ text }) => text === "=" || text === ":" || text === ",");
  if (sign <= start) {
    const isValue = before.length > start + 2 && before.at(-1)!.text !== "}";
    return isValue && start !== -1 ? [{ text: "±", about: CLAUSE_MEANINGS["±"]!, snippet: "± ‹1 %›" }] : [];
  }
  const law = words.has("uniform") || words.has("normal") ? [] : ["uniform", "normal"];
  return plain(...law, ...(words.has("track") ? [] : ["track"]));
}

function range(): ClauseOffer {
  return { text: "in", about: CLAUSE_MEANINGS.in!, snippet: "in " };
}

function sweep(before: readonly Token[], words: ReadonlySet<string>, scope: NameScope): ClauseOffer[] {
  if (words.has("over")) return [];
  const comma = before.findLastIndex(({ text }) => text === ",");
  if (comma !== -1) return comma === before.length - 2 ? plain("per decade", "points") : [];
  if (words.has("to")) return [];
  if (words.has("from")) return plain("to");
  const [low, high, steps] = spanOf(before[1]?.text ?? "", scope);
  return [
    {
      text: "from",
      about: CLAUSE_MEANINGS.from!,
      snippet: `from ‹${low}› to ‹${high}›, ‹${steps}›`,
    },
    { text: "over", about: CLAUSE_MEANINGS.over!, snippet: `over ‹${low}›, ‹${high}›` },
  ];
}

/** A span that a knob could be swept over: ten times its default at the other end, in its own unit. */
function spanOf(name: string, scope: NameScope): readonly [string, string, string] {
  const statement = scope.find(name)?.statement;
  const value = statement?.kind === "knob" ? statement.value : null;
  if (value?.kind === "number" && value.unit !== null && value.value > 0 && value.unit.text !== "°C") {
    const { text } = value.unit;
    return [`1 ${text}`, `100 ${text}`, "10 per decade"];
  }
  return name === "temperature" ? ["10 °C", "40 °C", "4 points"] : ["1 V", "2 V", "11 points"];
}

function requirement(words: ReadonlySet<string>): ClauseOffer[] {
  const isRelated = RELATIONS.some((one) => words.has(one)) || [...COMPARISONS].some((one) => words.has(one));
  if (!isRelated) return plain(...RELATIONS);
  return plain("for", "at", ...(words.has("as") ? [] : ["in", "as"]));
}
