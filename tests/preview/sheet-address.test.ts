import { describe, expect, it } from "vitest";
import { USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { readSheetAddress, writeSheetAddress } from "@/app/(work)/[workspace]/netlists/[id]/sheet-address";

const read = (search: string) => readSheetAddress(new URLSearchParams(search));

describe("the address of a sheet", () => {
  it("is empty for what is usual", () => {
    expect(writeSheetAddress({ side: "preview", view: USUAL_VIEW, turned: new Map() })).toBe("");
  });

  it("brings back what it was written from", () => {
    const kept = {
      side: "connections",
      view: { ...USUAL_VIEW, traces: ["ratio"], zoom: { from: 1e-8, to: 1e-5 }, only: { family: 0 } },
      turned: new Map([
        ["I_sample", 2.5e-6],
        ["temperature", 313.15],
      ]),
    } as const;
    expect(read(writeSheetAddress(kept))).toEqual(kept);
  });

  it.each(["knob=", "knob=I_in", "knob=I_in:", "knob=I_in:ten", "knob=:1", "beside=nothing", "from=2&to=1"])(
    "leaves out what makes no sense: %s",
    (search) => {
      expect(writeSheetAddress(read(search))).toBe("");
    },
  );
});
