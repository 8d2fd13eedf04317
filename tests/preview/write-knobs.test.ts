import fc from "fast-check";
import { expect, test } from "vitest";
import { spellKnob, type WrittenKnob, writeKnobs } from "@/app/_components/preview/write-knobs";
import { check } from "@/lib/language/checker";
import { format } from "@/lib/language/format";

const TEXT = `title "Knobs"
knob I_in = 1 µA ± 1 % in 1 nA .. 1 mA # the signal
knob gain  = 2

ground -- IS : current I_in * gain -- s -- R1 : resistor 1 kΩ -- ground
show s.v
`;

function write(text: string, ...knobs: WrittenKnob[]): string | null {
  const change = writeKnobs(text, knobs);
  return change === null ? null : text.slice(0, change.from) + change.text + text.slice(change.to);
}

function valuesIn(text: string): Record<string, unknown> {
  const { design, diagnostics } = check(text);
  expect(diagnostics).toEqual([]);
  return Object.fromEntries(
    design!.knobs.map(({ name, value }) => [name, value.op === "constant" && value.value]),
  );
}

test("only the value changes: tolerance, range and comment stay", () => {
  expect(write(TEXT, { knob: "I_in", unit: "A", value: 2.15e-8 })).toBe(TEXT.replace("1 µA ±", "21.5 nA ±"));
});

test("several knobs are one change, and a temperature that the text does not set gets a line after the knobs", () => {
  const next = write(
    TEXT,
    { knob: "gain", unit: "1", value: 0.5 },
    { knob: "temperature", unit: "K", value: 300.15 },
    { knob: "I_in", unit: "A", value: 1e-4 },
  )!;
  expect(valuesIn(next)).toEqual({ I_in: 1e-4, gain: 0.5, temperature: 300.15 });
  expect(next).toContain("knob gain  = 0.5\nknob temperature = 27 °C\n\nground");
});

test("a text in canonical form stays in it, any other is left as it is beside the value", () => {
  const canonical = format(TEXT);
  const next = write(canonical, { knob: "temperature", unit: "K", value: 258.15 })!;
  expect(format(next)).toBe(next);
  expect(next).toContain("knob temperature = -15 °C");
  expect(write(TEXT, { knob: "gain", unit: "1", value: 3 })).toBe(TEXT.replace("= 2", "= 3"));
});

test("what the text does not declare, and a unit that cannot be spelt, are not written", () => {
  expect(write(TEXT, { knob: "nothing", unit: "A", value: 1 })).toBe(null);
  expect(spellKnob({ knob: "k", unit: "V^0.5", value: 1 })).toBe(null);
});

test("a text without a title or a knob gets its temperature in the first line", () => {
  expect(write("show a.v", { knob: "temperature", unit: "K", value: 298.15 })).toBe(
    "knob temperature = 25 °C\nshow a.v",
  );
});

test("a value of up to fifteen digits reads as the same double when it is written", () => {
  const units = fc.constantFrom("A", "V", "Ω", "1", "W", "V/K", "A/V²", "1/K", "K");
  fc.assert(
    fc.property(units, fc.double({ noNaN: true, min: -1e6, max: 1e6 }), (unit, any) => {
      const value = Number(any.toPrecision(15));
      const spelt = spellKnob({ knob: "k", unit, value })!;
      expect(
        valuesIn(`knob k = ${spelt}\nground -- V : voltage 1 V -- a -- R : resistor 1 Ω -- ground\nshow a.v`)
          .k,
      ).toBe(value === 0 ? 0 : value);
    }),
  );
});
