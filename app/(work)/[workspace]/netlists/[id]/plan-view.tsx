import type { Examined } from "@/app/_components/editor/use-examination";
import { counted } from "@/app/_components/ui/count";
import { SweepRuler } from "./sweep-ruler";

/** What a run of the text would compute: sweeps on their rulers, and traces. While the text has errors, the plan before them stays. */
export function PlanView({ examined }: { readonly examined: Examined | null }) {
  const plan = examined?.latestPlan ?? null;
  const past = plan !== null && examined?.plan === null;
  return (
    <section aria-labelledby="plan">
      <h2 id="plan" className="caption">
        Plan
        {plan !== null && (
          <span className="ml-2 font-normal">
            {counted(plan.points, "point")}, {counted(plan.traces.length, "trace")}
            {past && <b className="text-nodata">, as before the errors</b>}
          </span>
        )}
      </h2>
      {plan === null ? (
        <p className="mt-2 border-y py-3 text-quiet text-sm">
          {examined === null
            ? "Reading the text…"
            : "The plan stands here again when the errors of the text are mended."}
        </p>
      ) : (
        <div>
          <ol className="mt-2 border-t">
            {plan.sweeps.map((sweep, index) => (
              <li key={sweep.knob} className="border-b py-3">
                <SweepRuler sweep={sweep} role={index === 0 ? "horizontal axis" : "nested"} />
              </li>
            ))}
            {plan.sweeps.length === 0 && (
              <li className="border-b py-3 text-quiet text-sm">
                Nothing is swept: one point at the values of the knobs.
              </li>
            )}
          </ol>
          <h3 className="caption mt-6">Traces</h3>
          <Pairs
            label="Traces"
            rows={plan.traces.map(({ name, unit }, index) => [
              `${index} ${name}`,
              name,
              unit === "1" ? "pure number" : unit,
            ])}
            empty="Nothing is shown, so a run would keep no trace."
          />
        </div>
      )}
    </section>
  );
}

function Pairs({
  label,
  rows,
  empty,
}: {
  readonly label: string;
  readonly rows: readonly (readonly [key: string, name: string, value: string])[];
  readonly empty: string;
}) {
  if (rows.length === 0) return <p className="mt-2 border-y py-2 text-quiet text-sm">{empty}</p>;
  return (
    <dl aria-label={label} className="mt-2 border-t text-sm">
      {rows.map(([key, name, value]) => (
        <div key={key} className="flex justify-between gap-4 border-b py-1.5">
          <dt className="figures min-w-0 break-words">{name}</dt>
          <dd className="figures whitespace-nowrap text-quiet">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
