import Link from "next/link";
import { Button } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import { When } from "@/app/_components/ui/when";
import type { ComparedRun } from "./compare-shapes";

interface Props {
  readonly workspace: string;
  readonly runs: readonly ComparedRun[];
  readonly onRuns: (ids: readonly string[]) => void;
}

/** The runs that are compared, with what tells them apart; the first is what the others are measured from. */
export function ChosenRuns({ workspace, runs, onRuns }: Props) {
  const ids = runs.map(({ run }) => run.id);
  return (
    <section aria-labelledby="chosen-runs">
      <h2 id="chosen-runs" className="sr-only">
        Runs compared
      </h2>
      <TableFrame label="Runs compared">
        <Table aria-labelledby="chosen-runs">
          <thead>
            <tr>
              <HeadCell>
                <span className="sr-only">Letter</span>
              </HeadCell>
              <HeadCell figure>Run</HeadCell>
              <HeadCell>Netlist</HeadCell>
              <HeadCell figure>Revision</HeadCell>
              <HeadCell>Queued</HeadCell>
              <HeadCell figure>Engine</HeadCell>
              <HeadCell>State</HeadCell>
              <HeadCell>
                <span className="sr-only">What can be done</span>
              </HeadCell>
            </tr>
          </thead>
          <tbody>
            {runs.map(({ letter, run }, index) => (
              <tr key={run.id} data-compared={letter}>
                <Cell className="w-6 font-semibold">{letter}</Cell>
                <Cell figure>{run.number}</Cell>
                <Cell className="min-w-40">
                  <Link
                    href={`/${workspace}/runs/${run.id}`}
                    prefetch={false}
                    className="inline-block min-h-6 font-semibold underline-offset-3 hover:underline"
                  >
                    {run.title}
                  </Link>
                  <p className="text-quiet text-xs">{counted(run.points, "point")}</p>
                </Cell>
                <Cell figure>{run.revision}</Cell>
                <Cell>
                  <When iso={run.queuedAt} />
                </Cell>
                <Cell figure>{run.engineVersion}</Cell>
                <Cell className="whitespace-nowrap">
                  <StateBadge state={shownState(run)} failed={run.pointsFailed} />
                </Cell>
                <Cell className="py-1! text-right">
                  <span className="inline-flex gap-1">
                    {index === 0
                      ? runs.length > 1 && (
                          <span className="px-2 py-1 text-quiet text-xs">others are measured from it</span>
                        )
                      : runs.length > 1 && (
                          <Button
                            size="small"
                            tone="quiet"
                            aria-label={`Measure from run ${letter}`}
                            onClick={() => onRuns([run.id, ...ids.filter((id) => id !== run.id)])}
                          >
                            Measure from it
                          </Button>
                        )}
                    <Button
                      size="small"
                      tone="quiet"
                      aria-label={`Leave out run ${letter}`}
                      onClick={() => onRuns(ids.filter((id) => id !== run.id))}
                    >
                      Leave out
                    </Button>
                  </span>
                </Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}
