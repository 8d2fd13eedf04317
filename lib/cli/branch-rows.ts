import type { RunDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { knobValue } from "./verdicts";

/** The branches of operating points, with where each is, whether it stays and its first trace; a heading comes first. */
export function branchRows({ branches = [], axes, traces }: RunDocument): string[][] {
  const first = axes[0];
  const rows = branches.flatMap(({ at, branches: found }) => {
    const outer = at.map(({ knob, value }) => `${knob} = ${knobValue(knob, value, unitOf(knob, axes))}`);
    return found.map(({ stable, traces: shown }, k) => {
      const places = stable.flatMap((one, place) => (one === null ? [] : [place]));
      const ends = [places[0], places.at(-1)].map((place) =>
        first === undefined || place === undefined
          ? ""
          : knobValue(first.knob, first.values[place]!, first.unit),
      );
      const stays = places.filter((place) => stable[place]).length;
      const state = stays === places.length ? "stable" : stays === 0 ? "unstable" : "stable in part";
      const values = shown[0]?.values.filter((value) => value !== null) ?? [];
      const range = [Math.min(...values), Math.max(...values)];
      const unit = shown[0]?.unit ?? "1";
      return [
        [String(k + 1), ...outer].join(", "),
        ends.join(" to "),
        state,
        values.length === 0 ? "" : range.map((value) => formatQuantity(rounded(value), unit)).join(" to "),
      ];
    });
  });
  return [["branch", `over ${first?.knob ?? ""}`.trim(), "state", traces[0]?.name ?? ""], ...rows];
}

/** Below the floor of the acceptance test there is nothing but rounding. */
function rounded(value: number): number {
  return Math.abs(value) < 1e-18 ? 0 : value;
}

/** Where branches turn back, and whether one may be missing. */
export function foldRows({ branches = [], axes, traces }: RunDocument): string[][] {
  const rows = branches.flatMap(({ folds, at }) =>
    folds.map((fold) => {
      const outer = at.map(({ knob, value }) => `${knob} = ${knobValue(knob, value, unitOf(knob, axes))}`);
      const value = axes[0] === undefined ? "" : formatQuantity(fold.value, axes[0].unit, 6);
      const there = fold.traces.map((trace, k) =>
        trace === null ? "" : formatQuantity(trace, traces[k]!.unit),
      );
      return [[`fold at ${value}`, ...outer].join(", "), ...there];
    }),
  );
  return [["folds", ...traces.map(({ name }) => name)], ...rows];
}

/** A sentence where the operating points found cannot be all. */
export function missingLine({ branches = [] }: RunDocument): string[] {
  return branches.every(({ complete }) => complete)
    ? []
    : ["", "The indices of the operating points do not add up: one may be missing."];
}

function unitOf(knob: string, axes: RunDocument["axes"]): string {
  return axes.find((axis) => axis.knob === knob)?.unit ?? "1";
}
