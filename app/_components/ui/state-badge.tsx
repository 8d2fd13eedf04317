import { classNames } from "./class-names";
import { counted } from "./count";
import { type MarkShape, StateMark } from "./state-mark";

/** States of a run, then verdicts, then "never run" for a netlist without a run. */
export type State =
  | "queued"
  | "running"
  | "done"
  | "failed"
  | "cancelled"
  | "holds"
  | "broken"
  | "no data"
  | "never run";

const STATES: Record<State, { shape: MarkShape; ink: string }> = {
  queued: { shape: "ring", ink: "text-quiet" },
  running: { shape: "half", ink: "text-running" },
  done: { shape: "check", ink: "text-holds" },
  failed: { shape: "cross", ink: "text-broken" },
  cancelled: { shape: "bar", ink: "text-quiet" },
  holds: { shape: "check", ink: "text-holds" },
  broken: { shape: "cross", ink: "text-broken" },
  "no data": { shape: "diamond", ink: "text-nodata" },
  "never run": { shape: "ring", ink: "text-quiet" },
};

/**
 * A state as shape, word and colour. A run that is done but has points that failed says so and takes the "no data" colour:
 * the rest of its sweep stands.
 */
export function StateBadge({ state, failed = 0 }: { readonly state: State; readonly failed?: number }) {
  const partial = state === "done" && failed > 0;
  const { shape, ink } = partial ? STATES["no data"] : STATES[state];
  return (
    <span className={classNames("inline-flex items-baseline gap-1.5 text-sm", ink)}>
      <StateMark shape={shape} />
      {partial ? `done, ${counted(failed, "point")} failed` : state}
    </span>
  );
}

/** What to show of a run: its verdict once it is judged and wholly solved, else its state. */
export function shownState(run: {
  readonly status: Extract<State, "queued" | "running" | "done" | "failed" | "cancelled">;
  readonly verdict?: Extract<State, "holds" | "broken" | "no data"> | null;
  readonly pointsFailed: number;
}): State {
  if (run.status !== "done" || !run.verdict) return run.status;
  return run.pointsFailed > 0 && run.verdict === "holds" ? "done" : run.verdict;
}
