import { createElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { expect, test } from "vitest";
import { ReportView } from "@/app/(work)/[workspace]/runs/[id]/report/report-view";
import type { RunState } from "@/app/(work)/[workspace]/runs/[id]/run-shapes";

const run = {
  title: "Very long (invented)",
  plan: { title: "", axes: [], draws: 0, points: 1, traces: [], unknowns: [] },
  judgement: null,
  verdict: null,
  status: "done",
  points: 1,
  pointsDone: 1,
  pointsFailed: 0,
  queuedAt: "2026-01-01T00:00:00.000Z",
  startedAt: null,
  finishedAt: null,
  hash: "0".repeat(64),
} as unknown as RunState;

const printed = { requirements: [], readings: [], failures: [] };

function linesOf(text: string): string[] {
  const of = { run, printed, figure: null, remark: null, text, span: null };
  const page = renderToStaticMarkup(
    createElement(ReportView, { ...of, savedBy: "Ilse Invented", savedAt: "2026-01-01T00:00:00.000Z" }),
  );
  return [...page.matchAll(/<li class="pl-2"><code[^>]*>(.*?)<\/code>/gs)].map(([, line]) => line!);
}

test("a report has every line of the text by its number, and the rest of a very long one in one block", () => {
  expect(linesOf("# a\r\n\r\n# <b>\n\n")).toEqual(["# a", "\u00a0", "# &lt;b&gt;"]);
  const long = Array.from({ length: 200_000 }, (_, k) => `# ${k}`);
  const lines = linesOf(long.join("\n"));
  expect(lines).toHaveLength(5_001);
  expect(lines.join("\n")).toBe(long.join("\n"));
});
