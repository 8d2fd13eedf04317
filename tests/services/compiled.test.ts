import { describe, expect, it } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { compiled } from "@/lib/services/runs/compiled";

const text = (k: number) => `title "Divider ${k} (invented)"
knob V_in = ${k} V
ground -- V1 : voltage V_in -- in -- R1 : resistor 1 kΩ -- ground
sweep V_in from 1 V to 10 V, 4 points
show i = R1.i
`;

describe("the meaning of a text", () => {
  it("is worked out once while it is asked for, and is that of this text and no other", () => {
    const first = compiled(text(1));
    expect(compiled(text(1))).toBe(first);
    expect(first.job?.plan).toEqual(compile(text(1)).job?.plan);
    expect(compiled(text(2)).job?.plan.title).toBe("Divider 2 (invented)");
  });

  it("is forgotten for what was asked for longest ago", () => {
    const first = compiled(text(1));
    for (const k of [2, 3, 4]) compiled(text(k));
    expect(compiled(text(1))).toBe(first);
    for (const k of [5, 6, 7, 8]) compiled(text(k));
    expect(compiled(text(1))).not.toBe(first);
  });
});
