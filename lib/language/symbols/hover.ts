import { thermalVoltage, ZERO_CELSIUS } from "@/lib/units/constants";
import { formatQuantity, unitOf } from "@/lib/units/quantity";
import { parseUnit } from "@/lib/units/unit";
import type { Design, Typed } from "../ast";
import type { Checked } from "../checker";
import { evaluate } from "../evaluate";
import { isFunctionName } from "../functions";
import { KINDS } from "../kinds";
import { tokenize } from "../lexer";
import { isReductionName, REDUCTIONS } from "../reductions";
import { Report } from "../report";
import { isKind } from "../scope";
import type { Span } from "../span";
import type { Token } from "../token";
import { describeSymbol } from "./describe";
import {
  CLAUSE_MEANINGS,
  CONSTANT_MEANINGS,
  FUNCTION_MEANINGS,
  SIGNAL_MEANINGS,
  STATEMENT_MEANINGS,
} from "./meanings";
import { settingAt } from "./settings";
import type { NamedSymbol } from "./symbol";
import { symbolsOf } from "./symbols";

/** What is under the pointer, line by line: what it is first, then its value and what it belongs to. Plain text. */
export interface Hover extends Span {
  readonly lines: readonly string[];
}

/** What stands at an offset of a text, null where there is nothing to say. Works with a text that has errors too. */
export function hoverAt(
  text: string,
  checked: Pick<Checked, "netlist" | "design">,
  offset: number,
  symbols = symbolsOf(checked.netlist, text),
): Hover | null {
  const found = symbols.at(offset);
  if (found !== null) {
    const { symbol, from, to } = found;
    return { from, to, lines: [...describeSymbol(symbol), ...valueLines(symbol, checked.design)] };
  }
  const tokens = tokenize(text, new Report());
  const at = tokens.findIndex((token) => token.from <= offset && offset < token.to);
  const token = tokens[at];
  if (token === undefined) return null;
  const setting = settingAt(checked.netlist, symbols, offset);
  const said = setting ?? sayWord(token, tokens[at - 1]);
  return said === null ? null : { from: token.from, to: token.to, lines: [said] };
}

function sayWord({ kind, text }: Token, previous: Token | undefined): string | null {
  if (kind === "unit") return sayUnit(text);
  if (kind !== "word") return null;
  if (previous?.text === "." && previous.kind === "symbol") {
    return Object.hasOwn(SIGNAL_MEANINGS, text) ? SIGNAL_MEANINGS[text as "v" | "i" | "p"] : null;
  }
  if (isKind(text) && previous?.text === ":") return `${text}: ${KINDS[text].about}`;
  if (isFunctionName(text)) return FUNCTION_MEANINGS[text];
  if (isReductionName(text)) return REDUCTIONS[text].about;
  const known = [CONSTANT_MEANINGS, STATEMENT_MEANINGS, CLAUSE_MEANINGS].find((all) =>
    Object.hasOwn(all, text),
  );
  return known?.[text] ?? null;
}

function sayUnit(text: string): string | null {
  const unit = parseUnit(text);
  if (unit === null) return null;
  if (unit.scale === "celsius") return `degree Celsius, a point on the scale: 0 °C is ${ZERO_CELSIUS} K`;
  const coherent = unitOf(unit.dimension);
  return unit.exponent === 0 ? `the coherent unit ${coherent}` : `10^${unit.exponent} ${coherent}`;
}

/** The value of a knob or let at the defaults; of one inside a block, that in every instance. */
function valueLines({ meaning, statement, name }: NamedSymbol, design: Design | null): string[] {
  if (design === null || statement === null || (meaning !== "knob" && meaning !== "let")) return [];
  const values = new Map<string, number>();
  const scope = {
    knob: (one: string) => values.get(one) ?? Number.NaN,
    let: (one: string) => values.get(one) ?? Number.NaN,
    signal: () => Number.NaN,
    get thermalVoltage() {
      return thermalVoltage(values.get("temperature")!);
    },
  };
  const lines: string[] = [];
  for (const one of [...design.knobs, ...design.lets]) {
    values.set(one.name, evaluate(one.value, scope));
    const isInside = one.name !== name && one.name.endsWith(`.${name}`);
    if (one.from !== statement.from || (one.name !== name && !isInside)) continue;
    const value = quantity(values.get(one.name)!, one.value);
    lines.push(isInside ? `${one.name} = ${value}` : `${value} at the defaults`);
  }
  const sweep = design.sweeps.find(({ knob }) => knob === name);
  if (meaning === "knob" && sweep !== undefined) lines.push(`swept over ${sweep.values.length} values`);
  return lines;
}

function quantity(value: number, { dimension }: Typed): string {
  return formatQuantity(value, unitOf(dimension));
}
