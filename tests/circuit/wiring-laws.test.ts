import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";

const HEAD = `model amp : opamp { }
ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground
show in.v
`;

/** Code and place, as `WIR4 L1 : law { …`, of everything that is wrong with the text. */
function problemsOf(text: string): string[] {
  const whole = HEAD + text;
  return compile(whole).diagnostics.map(({ code, from, to }) => `${code} ${whole.slice(from, to)}`);
}

describe("laws and gains in the wiring", () => {
  test("a net that a law reads needs no other connection where it has a voltage without it", () => {
    const law =
      "L1 : law { plus = o, minus = ground, volts = 2 * m.v }\no -- R3 : resistor 1 kΩ -- ground\nshow o.v";
    expect(problemsOf(`in -- R2 : resistor 1 kΩ -- m\n${law}`)).toEqual([]);
    expect(problemsOf(`in -- I2 : current 1 µA -- m\n${law}`).map((one) => one.slice(0, 4))).toContain(
      "WIR1",
    );
  });

  test("a law that drives a current whatever its voltage is no path for it; one that reads its own voltage is", () => {
    const island = (amps: string) =>
      `ground -- L1 : law { amps = ${amps} } -- x -- R2 : resistor 1 kΩ -- y -- I2 : current 1 µA -- ground\nshow x.v`;
    expect(problemsOf(island("1 mA * (in.v / 1 V)"))[0]).toMatch(/^WIR4 L1 : law/);
    expect(problemsOf(island("L1.v / 1 kΩ"))).toEqual([]);
    expect(problemsOf(island("1 mA * (x.v / 1 V)"))).toEqual([]);
  });

  test("a law of volts holds its voltage as a voltage element does, unless it reads its own current", () => {
    const across = (volts: string) => `ground -- L1 : law { volts = ${volts} } -- in`;
    expect(problemsOf(across("1 V"))[0]).toMatch(/^WIR3 L1 : law/);
    expect(problemsOf(across("1 kΩ * L1.i"))).toEqual([]);
    expect(problemsOf(across("1 kΩ * V1.i"))).toEqual([]);
  });

  test("two laws that each drive a current by the other's voltage settle both", () => {
    const across =
      "a -- L1 : law { amps = 1 mS * b.v } -- ground\nb -- L2 : law { amps = -1 mS * a.v } -- ground";
    expect(problemsOf(`${across}\nground -- I2 : current 1 mA -- a\nshow a.v`)).toEqual([]);
  });

  test("behind an output resistance two amplifiers may drive a net", () => {
    const two = (model: string) =>
      `model real : opamp { ${model} }\nA1 : real { plus = in, minus = o, out = o }\nA2 : real { plus = in, minus = o, out = o }`;
    expect(problemsOf(two("gain = 1e5"))[0]).toMatch(/^WIR8 A2/);
    expect(problemsOf(two("gain = 1e5, R_out = 50 Ω"))).toEqual([]);
  });

  test("an amplifier with both limits may run open as a comparator", () => {
    const open = (model: string) =>
      `model real : opamp { ${model} }\nA1 : real { plus = in, minus = ground, out = o }\no -- R2 : resistor 1 kΩ -- ground`;
    expect(problemsOf(open("gain = 1e5, out_low = -12 V"))[0]).toMatch(/^WIR6 A1/);
    expect(problemsOf(open("gain = 1e5, out_low = -12 V, out_high = 12 V"))).toEqual([]);
  });

  test("the output of a gain drives its net, alone", () => {
    expect(problemsOf("G1 : gain { plus = in, minus = ground, out = in, ratio = 2 }")[0]).toMatch(/^WIR8 G1/);
    const chain =
      "G1 : gain { plus = in, minus = ground, out = o, ratio = 2 }\no -- R2 : resistor 1 kΩ -- ground";
    expect(problemsOf(chain)).toEqual([]);
    expect(
      problemsOf(
        "G1 : gain { plus = p, minus = ground, out = o, ratio = 2 }\no -- R2 : resistor 1 kΩ -- ground",
      ).length,
    ).toBe(1);
  });

  test("feedback leads through gains and laws", () => {
    const loop = (back: string) =>
      `A1 : amp { plus = in, minus = m, out = o }\no -- R2 : resistor 1 kΩ -- ground\n${back}`;
    expect(problemsOf(loop("m -- R3 : resistor 1 kΩ -- ground"))[0]).toMatch(/^WIR6 A1/);
    expect(problemsOf(loop("G1 : gain { plus = o, minus = ground, out = m, ratio = 0.5 }"))).toEqual([]);
    expect(problemsOf(loop("m -- L1 : law { volts = o.v * o.v / 1 V } -- ground"))).toEqual([]);
  });
});
