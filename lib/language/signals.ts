import { AMPERE, VOLT, WATT } from "@/lib/units/dimension";
import type { Typed } from "./ast";
import { KINDS } from "./kinds";
import { Names, ownName, type PinOf } from "./names";
import type { Report } from "./report";
import type { Expression, Word } from "./syntax";
import { quote } from "./token";

/** The nets at the pins of an element. */
export type PinsOf = (element: string) => Readonly<Record<string, string>> | null;

type NameExpression = Extract<Expression, { kind: "name" }>;

/** `out.v`, `R1.v`, `R1.i`, `R1.p`, `Q.c.i`: the signal a dotted name stands for, or null and a diagnostic. */
export function resolveSignal(
  expression: NameExpression,
  allowed: boolean,
  names: Names,
  pinsOf: PinsOf,
  report: Report,
): Typed | null {
  const [head, second, third, ...rest] = expression.path as [Word, Word, Word?, ...Word[]];
  const whole = expression.path.map((word) => word.text).join(".");
  if (expression.path.some((word) => word.text === "")) return null;
  const meaning = names.meaningOf(head.text);
  if (meaning === null) names.unknown(head, ["net", "element"]);
  if (meaning === null || meaning === "unread") return null;
  const wrong = (message: string, text?: string): null => {
    const fix =
      text === undefined
        ? undefined
        : { title: `Change to ${text}`, from: expression.from, to: expression.to, text };
    report.error("NAM7", expression, message, fix);
    return null;
  };
  if (meaning === "instance") {
    const start = `The instance ${quote(ownName(head))} has nothing called ${quote(second.text)}`;
    const prefix = `${head.text}.`;
    const search = () => names.near(second.text, names.namesInside(prefix));
    report.propose("NAM7", second, start, search, "name a net, element or value of its block");
    return null;
  }
  if (meaning !== "net" && meaning !== "element") {
    return wrong(
      `${quote(head.text)} is ${Names.describe(meaning)} and has no signals; write ${quote(head.text)} alone.`,
      head.text,
    );
  }
  if (!allowed) {
    const message = `${quote(whole)} is known only once the circuit is solved; use it in ${quote("show")}, a law, a reading or a requirement.`;
    report.error("NAM4", expression, message);
    return null;
  }
  if (rest.length > 0)
    return wrong(`${quote(whole)} has too many parts; a signal reads \`out.v\`, \`R1.i\` or \`Q.c.i\`.`);
  if (meaning === "net") {
    if (third !== undefined || second.text !== "v") {
      return wrong(`A net has a voltage only; write ${quote(`${head.text}.v`)}.`, `${head.text}.v`);
    }
    if (head.text === "ground") return { op: "constant", value: 0, dimension: VOLT };
    return { op: "signal", signal: { of: "net", net: head.text }, dimension: VOLT };
  }
  const kind = names.kindOf(head.text);
  if (kind === null) return null;
  const { pins } = KINDS[kind];
  const isPin = pins.includes(second.text);
  if (third !== undefined) {
    if (!isPin)
      return wrong(`${quote(head.text)} has no pin ${quote(second.text)}; its pins are ${pins.join(", ")}.`);
    if (third.text === "i") {
      return { op: "signal", signal: { of: "pin", element: head.text, pin: second.text }, dimension: AMPERE };
    }
    const net = pinsOf(head.text)?.[second.text];
    const text = third.text === "v" && net !== undefined ? `${net}.v` : `${head.text}.${second.text}.i`;
    return wrong(`A pin has a current only, and its voltage is that of its net; write ${quote(text)}.`, text);
  }
  if (isPin) {
    const text = `${head.text}.${second.text}.i`;
    return wrong(`The current into the pin ${quote(second.text)} reads ${quote(text)}.`, text);
  }
  if (pins.length > 2) {
    const example = `${head.text}.${pins[0]}.i`;
    return wrong(
      `${quote(head.text)} has ${pins.length} pins and so no ${quote(second.text)} of its own; the current into a pin reads ${quote(example)}.`,
    );
  }
  if (second.text !== "v" && second.text !== "i" && second.text !== "p") {
    return wrong(
      `${quote(head.text)} has \`.v\`, \`.i\` and \`.p\` (voltage, current, power), but no ${quote(second.text)}.`,
    );
  }
  const dimension = { v: VOLT, i: AMPERE, p: WATT }[second.text];
  return { op: "signal", signal: { of: "element", element: head.text, quantity: second.text }, dimension };
}

/** `S.in.i`: the current into a net of a block is what flows into the pins that it leads to, each `kept` as its place wants it. */
export function currentInto(pins: readonly PinOf[], kept: (signal: Typed) => Typed): Typed {
  const currents = pins.map((pin) =>
    kept({ op: "signal", signal: { of: "pin", ...pin }, dimension: AMPERE }),
  );
  if (currents.length === 0) return { op: "constant", value: 0, dimension: AMPERE };
  return currents.reduce((left, right) => ({ op: "+", left, right, dimension: AMPERE }));
}
