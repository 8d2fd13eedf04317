import { renderToStaticMarkup } from "react-dom/server";
import { expect, test } from "vitest";
import { BranchList } from "@/app/(work)/[workspace]/runs/[id]/branch-list";
import type { BranchesDocument } from "@/lib/analyses/branches-document";

/** Made up: two stable branches that overlap, joined by one on which the circuit does not stay. */
const ROW: BranchesDocument = {
  at: [],
  complete: true,
  branches: [
    branch([true, true, true, null]),
    branch([null, false, false, null]),
    branch([null, true, true, true]),
  ],
  folds: [
    { value: 2.5, traces: [1.25] },
    { value: 3.5, traces: [4] },
  ],
};

function branch(stable: readonly (boolean | null)[]): BranchesDocument["branches"][number] {
  const along = <T,>(value: T) => stable.map((one) => (one === null ? null : value));
  return { stable, bound: along(3e-12), traces: [{ name: "out", unit: "V", values: along(1) }] };
}

const AXES = [{ knob: "V_in", unit: "V", scale: "linear" as const, values: [1, 2, 3, 4] }];

const text = (element: React.ReactElement) =>
  renderToStaticMarkup(element)
    .replace(/<[^>]+>/g, " ")
    .replace(/[\u202f\s]+/g, " ");

test("branches are listed with where they reach, whether the circuit stays, their proof, and their folds", () => {
  const words = text(<BranchList branches={[ROW]} axes={AXES} search={{ rows: 1, rowsDone: 1 }} />);
  expect(words).toContain("3 branches; their indices add up at every value, so none is known to be missing.");
  expect(words).toMatch(/1 1 V to 3 V, 3 points stable: the circuit stays there 3\.0 pV/);
  expect(words).toMatch(/2 2 V to 3 V, 2 points unstable: the circuit leaves it 3\.0 pV/);
  expect(words).toMatch(/2 folds, where branches turn back: V_in 2\.5 V \(out 1\.250 00 V\) ; V_in 3\.5 V/);
});

test("a search that goes on says how far it is, and one that failed why", () => {
  const going = text(<BranchList branches={[]} axes={AXES} search={{ rows: 7, rowsDone: 2 }} />);
  expect(going).toContain("Still being sought: 2 of 7 settings searched.");
  const fault = "The search took longer than its limit of 30 s.";
  const failed = { ...ROW, complete: false, branches: [], folds: [], fault };
  expect(text(<BranchList branches={[failed]} axes={AXES} search={null} />)).toContain(fault);
  const lacking = text(<BranchList branches={[{ ...ROW, complete: false }]} axes={AXES} search={null} />);
  expect(lacking).toContain("their indices do not add up, so an operating point is missing.");
});

test("a text that asks for one operating point has no list", () => {
  expect(renderToStaticMarkup(<BranchList branches={[]} axes={AXES} search={null} />)).toBe("");
});
