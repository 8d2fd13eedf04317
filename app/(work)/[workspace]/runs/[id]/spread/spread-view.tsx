"use client";

import { useMemo } from "react";
import { SelectField } from "@/app/_components/ui/field";
import type { TextLinks } from "../text-links";
import { BudgetBars } from "./budget-bars";
import { histogram } from "./histogram";
import { HistogramPlot } from "./histogram-plot";
import { type SpreadMatter, type Subject, spreadOf, subjectsOf } from "./subjects";

interface Props {
  readonly matter: SpreadMatter;
  /** Error budgets are still being worked out, or the run is too large for them. */
  readonly budgetsMissing: "to come" | "too large" | null;
  readonly links: TextLinks;
  /** Key of what is looked at, and its setting; null for the usual ones. */
  readonly subject: string | null;
  readonly setting: number | null;
  readonly onSubject: (subject: string, setting: number | null) => void;
}

/** How the tolerances spread one value: its distribution over the draws, and its error budget. */
export function SpreadView({ matter, budgetsMissing, links, subject, setting, onSubject }: Props) {
  const subjects = useMemo(() => subjectsOf(matter), [matter]);
  const chosen = subjects.find(({ key }) => key === subject) ?? subjects[0];
  const at = setting !== null && setting < (chosen?.settings.length ?? 0) ? setting : 0;
  const looked = useMemo(() => {
    if (chosen === undefined) return null;
    const spread = spreadOf(matter, chosen, at);
    return { ...spread, found: histogram(spread.drawn, spread.limits) };
  }, [matter, chosen, at]);
  if (chosen === undefined || looked === null) return null;
  const { nominal, drawn, limits, budget, found } = looked;
  return (
    <section
      aria-labelledby="spread"
      className="@container mt-6 grid gap-4 border-t pt-4"
      data-subject={chosen.key}
    >
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <h2 id="spread" className="caption">
          What the tolerances do to
        </h2>
        <SelectField
          label="Value whose spread is shown"
          labelHidden
          value={chosen.key}
          onChange={({ target }) => onSubject(target.value, null)}
          className="max-w-full"
        >
          <Options title="Requirements" subjects={subjects.filter(({ kind }) => kind === "requirement")} />
          <Options title="Readings" subjects={subjects.filter(({ kind }) => kind === "reading")} />
        </SelectField>
        {chosen.settings.length > 1 && (
          <SelectField
            label="Setting"
            labelHidden
            value={at}
            onChange={({ target }) => onSubject(chosen.key, Number(target.value))}
          >
            {chosen.settings.map((words, index) => (
              <option key={words} value={index}>
                at {words}
              </option>
            ))}
          </SelectField>
        )}
      </div>
      <div className="grid gap-x-8 gap-y-6 @2xl:grid-cols-2">
        <div className="min-w-0">
          <h3 className="caption mb-2">
            Error budget
            {chosen.kind === "requirement" && budget !== null && (
              <span className="font-normal"> where the nominal design is worst</span>
            )}
          </h3>
          {budget === null ? (
            <p className="text-quiet text-sm">{missingBudget(budgetsMissing)}</p>
          ) : (
            <BudgetBars budget={budget} links={links} />
          )}
        </div>
        <div className="min-w-0">
          <h3 className="caption mb-2">
            Over the draws
            {chosen.kind === "requirement" && found !== null && (
              <span className="font-normal"> at the worst place of each</span>
            )}
          </h3>
          {found === null ? (
            <p className="text-quiet text-sm">
              {drawn.length === 0
                ? "The netlist asks for no draws. Add a line such as draws 400 to see how often it holds."
                : "No draw has a value."}
            </p>
          ) : (
            <HistogramPlot
              key={`${chosen.key} ${at}`}
              name={chosen.name}
              unit={chosen.unit}
              found={found}
              limits={limits}
              nominal={nominal}
            />
          )}
        </div>
      </div>
    </section>
  );
}

function Options({ title, subjects }: { readonly title: string; readonly subjects: readonly Subject[] }) {
  if (subjects.length === 0) return null;
  return (
    <optgroup label={title}>
      {subjects.map(({ key, name }) => (
        <option key={key} value={key}>
          {name}
        </option>
      ))}
    </optgroup>
  );
}

function missingBudget(why: Props["budgetsMissing"]): string {
  if (why === "to come") return "The error budgets are worked out when all points are solved.";
  if (why === "too large") return "The run is too large for error budgets. Sweep fewer points to get them.";
  return "No tolerance moves it, or it has no value in the nominal design.";
}
