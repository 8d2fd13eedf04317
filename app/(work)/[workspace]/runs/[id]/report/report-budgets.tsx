import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { counted } from "@/app/_components/ui/count";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { Budget } from "@/lib/analyses/budget";
import type { KeptJudgement } from "@/lib/analyses/verdict";
import { formatQuantity } from "@/lib/units/quantity";

/** Budgets that are printed, and parts of each. */
const BUDGETS = 12;
const PARTS = 8;
/** Share of the variance below which a part is left out: it would be printed as nothing. */
const NOTHING = 0.0005;

/** What the tolerances cost, the costliest part first: of what each requirement is about, then of the readings. */
export function ReportBudgets({ judgement }: { readonly judgement: KeptJudgement | null }) {
  const { causes, budgets } = judgement ?? { causes: null, budgets: null };
  // What a requirement asks of a reading itself is not printed again as the budget of that reading.
  const told = new Set(causes?.map(figures));
  const rest = budgets?.filter((budget) => !told.has(figures(budget))) ?? null;
  const all = [...named("require", causes), ...named("read", rest)];
  const isTooLarge = judgement !== null && budgets === null;
  if (all.length === 0 && !isTooLarge) return null;
  return (
    <section aria-labelledby="report-budgets" className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <h2 id="report-budgets">Error budgets</h2>
      <p className="text-sm">
        To first order about the nominal design: how far each toleranced value moves the result, and its share
        of the variance.
      </p>
      {isTooLarge && <p>This run is too large for an error budget.</p>}
      {all.slice(0, BUDGETS).map(({ key, budget }) => (
        <BudgetTable key={key} budget={budget} />
      ))}
      {all.length > BUDGETS && <p>{all.length - BUDGETS} more budgets stand on the page of the run.</p>}
    </section>
  );
}

/** What two budgets of one thing at one place share. */
function figures({ at, unit, nominal, sigma }: Budget): string {
  return JSON.stringify([at, unit, nominal, sigma]);
}

/** Those that have parts, each with a key of its own. */
function named(kind: string, budgets: readonly Budget[] | null) {
  return (budgets ?? [])
    .map((budget, place) => ({ key: `${kind} ${place}`, budget }))
    .filter(({ budget }) => budget.parts.length > 0);
}

function BudgetTable({ budget }: { readonly budget: Budget }) {
  const { reading, unit, at, nominal, sigma } = budget;
  const parts = budget.parts.filter(({ share }) => share >= NOTHING).slice(0, PARTS);
  const place = at.map((one) => `${one.knob} ${formatKnob(one, one.value, 4)}`).join(", ");
  const rest = budget.parts.length - parts.length;
  return (
    <section data-whole aria-label={`Error budget of ${reading}`}>
      <TableFrame label={`Parts of ${reading}`}>
        <Table>
          <caption>
            {reading}
            {place !== "" && ` at ${place}`}: nominal {formatQuantity(nominal, unit, 4)}, standard deviation{" "}
            {formatQuantity(sigma, unit, 3)}
            {rest > 0 && `; ${counted(rest, "smaller part")} left out`}
          </caption>
          <thead>
            <tr>
              <HeadCell>Part</HeadCell>
              <HeadCell figure>Change at its tolerance</HeadCell>
              <HeadCell figure>Share</HeadCell>
            </tr>
          </thead>
          <tbody>
            {parts.map(({ part, parameter, effect, share }) => (
              <tr key={`${part} ${parameter}`}>
                <th scope="row" className="border-b py-1 pr-4 text-left font-normal">
                  {[part, parameter].filter(Boolean).join(" ")}
                </th>
                <Cell figure>{formatQuantity(effect, unit, 3)}</Cell>
                <Cell figure>{`${(100 * share).toFixed(1)}\u202f%`}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}
