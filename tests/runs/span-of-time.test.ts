import { describe, expect, it } from "vitest";
import { formatSpan } from "@/app/_components/ui/span-of-time";

const after = (ms: number) =>
  formatSpan("2026-03-01T10:00:00.000Z", new Date(Date.UTC(2026, 2, 1, 10) + ms).toISOString()).replaceAll(
    "\u202f",
    " ",
  );

describe("a span of time", () => {
  it("is written in the unit that fits it", () => {
    expect([38, 999, 1310, 12_340, 125_000, 7_500_000].map(after)).toEqual([
      "38 ms",
      "999 ms",
      "1.31 s",
      "12.3 s",
      "2 min 5 s",
      "2 h 5 min",
    ]);
  });

  it("is nothing before both ends are known, and never negative", () => {
    expect(formatSpan("2026-03-01T10:00:00.000Z", null)).toBe("");
    expect(after(-5)).toBe("0 ms");
  });
});
