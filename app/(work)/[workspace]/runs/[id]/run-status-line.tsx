import { counted, formatCount } from "@/app/_components/ui/count";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { ProgressLine } from "@/app/_components/ui/states";
import { isLive, type RunState } from "./run-shapes";

/** How far the run is, in words, and whether its curves are `behind` that: announced politely when it changes state, not at every point. */
export function RunStatusLine({ run, behind }: { readonly run: RunState; readonly behind: boolean }) {
  const { status, points, pointsDone, search } = run;
  return (
    <section aria-label="State of the run" className="grid border-b">
      <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1 px-4 py-2.5 text-sm md:px-6">
        <span data-run-status={status}>
          <StateBadge state={shownState(run)} failed={run.pointsFailed} />
        </span>
        <p className="min-w-0 text-quiet">
          <span role="status">
            {sentence(run)}
            {behind && " Fetching the rest of the curves…"}
          </span>
          {status === "running" && (
            <span className="figures" data-points-done={pointsDone}>
              {" "}
              {search && pointsDone === points
                ? `${formatCount(search.rowsDone)} of ${counted(search.rows, "setting")}`
                : `${formatCount(pointsDone)} of ${counted(points, "point")}`}
              {run.pointsFailed > 0 && `, ${formatCount(run.pointsFailed)} failed`}
            </span>
          )}
        </p>
      </div>
      {isLive(status) &&
        (status === "running" ? (
          <ProgressLine done={pointsDone} total={points} label="Points solved" />
        ) : (
          <ProgressLine />
        ))}
    </section>
  );
}

/** The state in a sentence; while running it does not hold the count, which would be read out again and again. */
function sentence({ status, points, pointsDone, pointsFailed, error, search }: RunState): string {
  const solved = pointsDone - pointsFailed;
  switch (status) {
    case "queued":
      return "Waiting for a worker. Curves appear here with the first points.";
    case "running":
      return search && pointsDone === points
        ? "All points are solved; operating points are still being sought:"
        : "Being solved:";
    case "failed":
      return `${error ?? "The run could not be computed."} ${kept(pointsDone)}`;
    case "cancelled":
      return `Cancelled when ${formatCount(pointsDone)} of ${counted(points, "point")} were in. ${kept(pointsDone)}`;
    case "done":
      return pointsFailed === 0
        ? `${points === 1 ? "Its one point is" : `All ${counted(points, "point")} are`} solved.`
        : `${formatCount(solved)} of ${counted(points, "point")} are solved. Those that failed have no value: they are marked on the plot, and choosing one says why.`;
  }
}

function kept(pointsDone: number): string {
  return pointsDone === 0 ? "No point was kept." : "What was solved by then is kept and shown.";
}
