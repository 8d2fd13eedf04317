import Link from "next/link";
import type { ReactNode } from "react";
import { Notice } from "@/app/_components/ui/notice";
import { ENGINE_VERSION } from "@/lib/analyses/version";
import { isLive, type RunState } from "./run-shapes";

/** Says that the engine or the netlist has moved on since the run, and offers to queue it again. */
export function StaleNotice({
  workspace,
  run,
  latestRevision,
  again,
}: {
  readonly workspace: string;
  readonly run: RunState;
  readonly latestRevision: number;
  /** The button that queues the run again, where the reader may. */
  readonly again: ReactNode;
}) {
  const engineMoved = run.engineVersion !== ENGINE_VERSION;
  const textMoved = run.revision < latestRevision;
  if (isLive(run.status) || (!engineMoved && !textMoved)) return null;
  return (
    <div className="px-4 pt-4 md:px-6" data-stale={engineMoved ? "engine" : "netlist"}>
      <Notice tone="caution" title={engineMoved ? "Of an earlier engine" : "Of an earlier revision"}>
        {engineMoved && (
          <p>
            Version {run.engineVersion} solved this run; the engine is at version {ENGINE_VERSION} now, and
            its digits may differ. What is shown is what was found then.
          </p>
        )}
        {textMoved && (
          <p>
            The netlist is at revision {latestRevision} now; this is revision {run.revision}.{" "}
            <Link
              className="link"
              href={`/${workspace}/netlists/${run.netlistId}/compare/${run.revision}..${latestRevision}`}
              prefetch={false}
            >
              See what has changed
            </Link>
          </p>
        )}
        {engineMoved && again !== null && <div className="mt-2">{again}</div>}
      </Notice>
    </div>
  );
}
