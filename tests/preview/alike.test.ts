import { expect, it } from "vitest";
import { isAlike } from "@/app/_components/preview/alike";

it("data is alike when every part of it is", () => {
  const made = () => ({ title: "A", axes: [{ knob: "V", values: [1, Number.NaN] }], seek: null });
  expect(isAlike(made(), made())).toBe(true);
  for (const other of [
    { ...made(), title: "B" },
    { ...made(), axes: [] },
    { ...made(), axes: [{ knob: "V", values: [1, 2] }] },
    { ...made(), axes: [{ knob: "V", values: [1, Number.NaN, 3] }] },
    { ...made(), seek: 3 },
    { ...made(), more: 1 },
    { title: "A", axes: made().axes },
    { ...made(), axes: { 0: made().axes[0] } },
    null,
    "A",
  ]) {
    expect([isAlike(made(), other), isAlike(other, made())]).toEqual([false, false]);
  }
});
