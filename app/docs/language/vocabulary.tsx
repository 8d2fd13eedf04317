import type { ReactNode } from "react";
import { FUNCTIONS } from "@/lib/language/functions";
import { CONSTANT_MEANINGS, FUNCTION_MEANINGS, SIGNAL_MEANINGS } from "@/lib/language/symbols/meanings";
import { CONSTANTS, PRECEDENCE } from "@/lib/language/token";
import { PREFIXES } from "@/lib/units/prefix";
import { unitOf } from "@/lib/units/quantity";
import { PLAIN_UNITS, UNITS } from "@/lib/units/unit";
import { ReferenceTable } from "../_parts/reference-table";
import { UNIT_NAMES } from "./unit-names";

/** What a function asks of the units of its values, in words. */
const RULES = {
  pure: "pure number in, pure number out",
  root: "any unit; the result has its root",
  keep: "values of one unit; the result has it too",
  choose: "a comparison, then two values of one unit",
} as const;

export function UnitTable() {
  const named = [...UNITS].map(([symbol, dimension]) => ({
    symbol,
    name: UNIT_NAMES[symbol] ?? "",
    is: unitOf(dimension) === symbol ? "takes every prefix" : `is ${unitOf(dimension)}; takes every prefix`,
  }));
  const plain = [...PLAIN_UNITS].map(([symbol, power]) => ({
    symbol,
    name: UNIT_NAMES[symbol] ?? "",
    is: `10${superscript(power)} of a pure number; no prefix`,
  }));
  const celsius = {
    symbol: "°C",
    name: UNIT_NAMES["°C"] ?? "",
    is: "a point on the scale, never a difference",
  };
  return (
    <ReferenceTable
      caption="Units"
      heads={["Unit", "Name", "Remark"]}
      rows={[...named, ...plain, celsius].map(({ symbol, name, is }) => ({
        id: `unit.${symbol === "%" ? "percent" : symbol}`,
        cells: [<code key="symbol">{symbol}</code>, name, is],
      }))}
    />
  );
}

export function PrefixList() {
  return (
    <ul className="mt-3 flex max-w-2xl flex-wrap gap-x-4 gap-y-1 text-sm">
      {[...PREFIXES].map(([prefix, power]) => (
        <li key={prefix} className="whitespace-nowrap">
          <code>{prefix}</code> <span className="text-quiet">10{superscript(power)}</span>
        </li>
      ))}
    </ul>
  );
}

export function FunctionTable() {
  return (
    <ReferenceTable
      caption="Functions"
      heads={["Function", "Gives", "Values"]}
      rows={Object.entries(FUNCTIONS).map(([name, { rule, least, most }]) => ({
        id: `function.${name}`,
        cells: [
          <code key="name">{`${name}(${["a", "b", "c"].slice(0, least).join(", ")}${most > least ? ", …" : ""})`}</code>,
          FUNCTION_MEANINGS[name as keyof typeof FUNCTIONS],
          RULES[rule],
        ],
      }))}
      spare={[2]}
      small={({ cells }) => cells[2]}
    />
  );
}

export function ConstantTable() {
  return (
    <ReferenceTable
      caption="Constants"
      heads={["Constant", "Is"]}
      rows={[...CONSTANTS].map((name) => ({
        id: `constant.${name}`,
        cells: [<code key="name">{name}</code>, CONSTANT_MEANINGS[name] ?? ""],
      }))}
    />
  );
}

const SIGNALS: readonly (readonly [id: string, form: string, says: string])[] = [
  ["signal.net", "NET.v", "The voltage of a net to `ground`."],
  ["signal.v", "ELEMENT.v", SIGNAL_MEANINGS.v],
  ["signal.i", "ELEMENT.i", "The current through an element with two ends, from left to right."],
  ["signal.p", "ELEMENT.p", SIGNAL_MEANINGS.p],
  ["signal.pin", "PART.PIN.i", "The current into a pin of a part, such as `Q1.c.i`."],
  ["signal.inside", "INSTANCE.NAME…", "The same inside an instance of a block: `X.Q.c.i`, `X.sum.v`."],
  ["signal.port", "INSTANCE.NET.i", "The current into a net that joins an instance to the outside."],
];

export function SignalTable({ text }: { readonly text: (words: string) => ReactNode }) {
  return (
    <ReferenceTable
      caption="Signals"
      heads={["Signal", "Is"]}
      rows={SIGNALS.map(([id, form, says]) => ({
        id,
        cells: [<code key="form">{form}</code>, text(sentence(says))],
      }))}
    />
  );
}

export function OperatorTable() {
  const levels = [...new Set(PRECEDENCE.values())].sort((a, b) => b - a);
  const says: Readonly<Record<number, string>> = {
    4: "power, grouped from the right; of a quantity with a unit only by a plain number",
    3: "units multiply and divide",
    2: "both sides have the same unit",
    1: "a comparison: in `if`, `decades_where` and `require` alone",
  };
  return (
    <ReferenceTable
      caption="Operators, the tightest first"
      heads={["Operators", "What they ask"]}
      rows={levels.map((level) => ({
        id: `operator.${level}`,
        cells: [
          <code key="signs">
            {[...PRECEDENCE].flatMap(([sign, own]) => (own === level ? [sign] : [])).join("  ")}
          </code>,
          (says[level] ?? "").replaceAll("`", ""),
        ],
      }))}
    />
  );
}

function sentence(words: string): string {
  return `${words[0]!.toUpperCase()}${words.slice(1)}${words.endsWith(".") ? "" : "."}`;
}

function superscript(n: number): string {
  return [...String(n)].map((c) => (c === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(c)])).join("");
}
