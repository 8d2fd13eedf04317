import { renderToStaticMarkup } from "react-dom/server";
import { expect, test } from "vitest";
import { ReportBudgets } from "@/app/(work)/[workspace]/runs/[id]/report/report-budgets";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { finalJudgement } from "@/lib/analyses/verdict";

const TEXT = `title "Divider (invented)"
knob V_in = 1 V
ground -- V1 : voltage V_in -- in -- R1 : resistor 10 kΩ ± 1 % -- out -- R2 : resistor 10 kΩ ± 1 % -- ground
sweep V_in from 1 V to 2 V, 3 points
sweep temperature over 10 °C, 40 °C
show out.v
read share = at(out.v, V_in = 1 V)
read most = highest(out.v)
require share <= 0.6 V as "share of the input"
`;

test("a report prints the budget of a requirement once, not again as that of the reading it is about", () => {
  const { job } = compile(TEXT);
  const page = renderToStaticMarkup(
    <ReportBudgets judgement={finalJudgement(job!, solveRange(job!, 0, job!.plan.points))} />,
  );
  const captions = [...page.matchAll(/<caption[^>]*>(.*?)<\/caption>/gs)].map(([, caption]) =>
    caption!.replaceAll("\u202f", " ").replace(/:.*/su, ""),
  );
  expect(captions).toEqual([
    "share of the input at temperature 10 °C",
    "share at temperature 40 °C",
    "most at temperature 10 °C",
    "most at temperature 40 °C",
  ]);
});
