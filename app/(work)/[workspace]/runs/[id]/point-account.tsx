import type { ReactNode } from "react";
import { formatKnob, formatValue } from "@/app/_components/curves/figures-in-words";
import { StateMark } from "@/app/_components/ui/state-mark";
import { effortInWords, outcomeInWords } from "@/lib/analyses/reasons";
import { formatQuantity } from "@/lib/units/quantity";
import type { PointAccount } from "./run-shapes";

/** How a point was solved or why it was not, its setting, and everything that was kept of it. */
export function PointAccountView({ account }: { readonly account: PointAccount }) {
  const { at, outcome, iterations, rung, residual, bound, failure, traces, unknowns } = account;
  const solved = outcome === "converged";
  return (
    <div className="mt-2 grid gap-4" data-point={account.point} data-outcome={outcome ?? "not solved"}>
      {!solved && failure !== null && (
        <div
          className="flex gap-2.5 border-broken border-l-2 py-1 pl-3 text-sm"
          role={outcome === null ? undefined : "alert"}
        >
          <div>
            <p className={outcome === null ? "font-semibold" : "font-semibold text-broken"}>
              {outcome === null ? "Not solved" : `Failed: ${outcomeInWords(outcome)}`}
            </p>
            <p className="text-quiet">{failure}</p>
          </div>
        </div>
      )}
      <dl className="border-t">
        {at.map((axis) => (
          <Row key={axis.knob} name={axis.knob}>
            {formatKnob(axis, axis.value)}
          </Row>
        ))}
        {solved && (
          <Row name="outcome">
            <span className="inline-flex items-baseline gap-1.5 text-holds">
              <StateMark shape="check" />
              {outcomeInWords(outcome)}
            </span>
          </Row>
        )}
        {solved && (
          <Row name="proved within">{bound === null ? "not proved" : formatQuantity(bound, "V", 2)}</Row>
        )}
        {iterations !== null && <Row name="iterations">{effortInWords(iterations, rung)}</Row>}
        {residual !== null && (
          <Row name="largest residual">
            <Power value={residual} />
            &#8239;A
          </Row>
        )}
        {solved &&
          traces.map(({ name, unit, value }) => (
            <Row key={name} name={name}>
              {formatValue(value, unit)}
            </Row>
          ))}
      </dl>
      {solved && (
        <>
          <Figures title="Net voltages" figures={unknowns.filter(({ unit }) => unit === "V")} />
          <Figures title="Branch currents" figures={unknowns.filter(({ unit }) => unit === "A")} />
        </>
      )}
      {outcome !== null && !solved && (
        <p className="text-quiet text-sm">
          No voltage or current of a failed point is kept: none of them would be a solution.
        </p>
      )}
    </div>
  );
}

function Figures({ title, figures }: { readonly title: string; readonly figures: PointAccount["unknowns"] }) {
  if (figures.length === 0) return null;
  return (
    <div>
      <h3 className="caption">{title}</h3>
      <dl className="mt-1 border-t">
        {figures.map(({ name, unit, value }) => (
          <Row key={name} name={name}>
            {formatValue(value, unit)}
          </Row>
        ))}
      </dl>
    </div>
  );
}

function Row({ name, children }: { readonly name: string; readonly children: ReactNode }) {
  return (
    <div className="flex items-baseline justify-between gap-4 border-b py-1">
      <dt className="figures min-w-0 break-words">{name}</dt>
      <dd className="figures whitespace-nowrap text-right">{children}</dd>
    </div>
  );
}

/** Two digits and a power of ten, for a size that is near nothing. */
export function Power({ value }: { readonly value: number }) {
  if (value === 0) return "0";
  const [digits, exponent] = value.toExponential(1).split("e");
  return (
    <>
      {digits}&#8239;·&#8239;10<sup>{String(Number(exponent)).replace("-", "\u2212")}</sup>
    </>
  );
}
