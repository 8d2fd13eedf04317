import { describe, expect, test } from "vitest";
import { STORY, textsOf } from "@/db/demo-story";
import { compile } from "@/lib/analyses/compile";
import { toDocument } from "@/lib/analyses/document";
import { solveRange } from "@/lib/analyses/sweep";

const TEXTS = textsOf(STORY);

describe("the story of the demo", () => {
  test("differs from revision to revision, and each change finds its place", () => {
    expect(new Set(TEXTS).size).toBe(STORY.length);
    for (const [place, { changes }] of STORY.entries())
      for (const [was] of changes) expect(TEXTS[place - 1] ?? "").toContain(was);
  });

  test.each(STORY.map(({ message, breaks }, place) => ({ message, breaks, text: TEXTS[place]! })))(
    "$message: breaks $breaks",
    ({ breaks, text }) => {
      const { job, diagnostics } = compile(text);
      expect(diagnostics).toEqual([]);
      const { plan, design } = job!;
      const {
        from: _from,
        to: _to,
        unknowns: _u,
        residual: _r,
        ...columns
      } = solveRange(job!, 0, plan.points);
      const { requirements, failures } = toDocument({ plan, design, text, ...columns, diagnostics });
      expect(failures).toEqual([]);
      expect(requirements.filter(({ verdict }) => verdict !== "holds").map(({ label }) => label)).toEqual(
        breaks,
      );
    },
  );
});
