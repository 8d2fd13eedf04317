import { describe, expect, test } from "vitest";
import { check } from "@/lib/language/checker";
import { KINDS, MODEL_KINDS, type ParameterKind } from "@/lib/language/kinds";
import { sameDimension } from "@/lib/units/dimension";
import { parseUnit } from "@/lib/units/unit";

const PARAMETERS = Object.entries(KINDS).flatMap(([kind, { parameters }]) =>
  Object.entries(parameters).map(([name, shape]) => ({ kind, name, shape })),
);

/** A value within the bounds of a parameter. */
function oneOf({ unit }: ParameterKind): string {
  return unit === "1" ? "1" : `1 ${unit}`;
}

/** A netlist in which a model or element of the kind has the parameter, and those that must be beside it. */
function textWith(kind: string, name: string, value: string): string {
  const { parameters, pins, follows } = KINDS[kind as keyof typeof KINDS];
  const beside = Object.entries(parameters)
    .filter(([key, { absent }]) => key !== name && (absent === null || parameters[name]!.needs === key))
    .map(([key, shape]) => `${key} = ${oneOf(shape)}`);
  const settings = [...beside, `${name} = ${value}`].join(", ");
  const head = "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground\nshow in.v\n";
  if (follows === "model") return `${head}model m : ${kind} { ${settings} }\n`;
  const nets = pins.map((pin) => `${pin} = in`).join(", ");
  const own = follows === "value" ? `, value = 1 ${KINDS[kind as keyof typeof KINDS].value!.unit}` : "";
  return `${head}X : ${kind} { ${nets}${own}, ${settings} }\n`;
}

const codes = (text: string) => check(text).diagnostics.map(({ code }) => code);

describe("every parameter", () => {
  test.each(PARAMETERS)("$kind: $name", ({ kind, name, shape }) => {
    const unit = shape.unit === "1" ? null : parseUnit(shape.unit)!;
    if (unit !== null) expect(sameDimension(unit.dimension, shape.dimension)).toBe(true);
    expect(codes(textWith(kind, name, oneOf(shape)))).toEqual([]);
    expect(codes(textWith(kind, name, `${oneOf(shape)} * 1 s`))).toEqual(["UNI3"]);
    const low = { value: shape.low ?? 0, isBound: shape.low !== undefined };
    const below = shape.unit === "°C" ? "0 K" : oneOf(shape).replace(/^1/u, String(low.value - 1));
    expect(codes(textWith(kind, name, below))).toEqual(low.isBound ? ["UNI8"] : []);
    expect(shape.about.length).toBeGreaterThan(5);
    if (shape.needs !== undefined)
      expect(KINDS[kind as keyof typeof KINDS].parameters[shape.needs]).toBeDefined();
  });
});

test("the kinds that follow a model are those of which a model can be made", () => {
  const following = Object.keys(KINDS).filter(
    (kind) => KINDS[kind as keyof typeof KINDS].follows === "model",
  );
  expect(following.sort()).toEqual([...MODEL_KINDS].sort());
});
