import Link from "next/link";
import { NumberedLines } from "@/app/_components/diff/numbered-lines";
import { counted } from "@/app/_components/ui/count";
import { When } from "@/app/_components/ui/when";
import type { TextChanges } from "@/lib/language/changes/of-texts";
import type { Role } from "@/lib/permissions/actor";
import { ChangeList } from "../../change-list";
import { LastRuns } from "../../last-runs";
import type { RunLines } from "../../run-line";
import { RevisionHeader } from "./revision-header";
import type { NetlistFacts, RevisionFacts } from "./revision-shapes";

interface Props {
  readonly workspace: string;
  readonly netlist: NetlistFacts;
  readonly revision: RevisionFacts;
  /** From the revision before; null of the first. */
  readonly changes: TextChanges | null;
  readonly runs: RunLines;
  readonly mayWrite: boolean;
  readonly mayRun: boolean;
  readonly role: Role;
}

/** One revision to read: its text, what changed in it, its runs, its identity, and what can be done with it. */
export function RevisionView({ workspace, netlist, revision, changes, runs, ...may }: Props) {
  const base = `/${workspace}/netlists/${netlist.id}`;
  const { number, hash, text, message, author, savedAt } = revision;
  const lines = text.split("\n").length - (text.endsWith("\n") ? 1 : 0);
  return (
    <>
      <RevisionHeader workspace={workspace} netlist={netlist} revision={revision} {...may} />
      <div className="grid grow grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,8fr)_minmax(320px,5fr)]">
        <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-3 px-4 py-4 md:px-6">
          <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
            <h2 className="caption">Text, {counted(lines, "line")}</h2>
            <nav aria-label="Other revisions" className="flex flex-wrap gap-x-4 text-sm">
              {number > 1 && (
                <Link href={`${base}/revisions/${number - 1}`} className="link min-h-6">
                  Revision {number - 1}
                </Link>
              )}
              {number < netlist.latest && (
                <Link href={`${base}/revisions/${number + 1}`} className="link min-h-6">
                  Revision {number + 1}
                </Link>
              )}
            </nav>
          </div>
          <NumberedLines text={text} label={`Text of revision ${number}, to read only`} />
        </div>
        <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-8 border-t px-4 py-4 md:px-6 lg:border-t-0 lg:border-l">
          <section aria-labelledby="about">
            <h2 id="about" className="caption">
              About this revision
            </h2>
            <dl className="mt-2 border-t text-sm">
              {[
                ["Message", message ?? "none"],
                ["Saved by", author],
                ["Saved", <When key="when" iso={savedAt} />],
                [
                  "Identity",
                  <code key="hash" className="break-all">
                    {hash}
                  </code>,
                ],
              ].map(([name, value]) => (
                <div
                  key={String(name)}
                  className="grid grid-cols-[6rem_minmax(0,1fr)] gap-x-4 border-b py-1.5"
                >
                  <dt className="text-quiet">{name}</dt>
                  <dd className="min-w-0 break-words">{value}</dd>
                </div>
              ))}
            </dl>
            <p className="mt-2 text-quiet text-xs">
              The identity is the SHA-256 of the text in canonical form: two texts with one identity are one
              design.
            </p>
          </section>
          {changes !== null && (
            <section aria-labelledby="changed">
              <h2 id="changed" className="caption">
                Changed from revision {number - 1}
              </h2>
              <div className="mt-2">
                <ChangeList found={changes} names={[`Revision ${number - 1}`, `Revision ${number}`]} />
              </div>
            </section>
          )}
          <LastRuns
            workspace={workspace}
            netlistId={netlist.id}
            revision={number}
            title={netlist.title}
            first={runs}
          />
        </div>
      </div>
    </>
  );
}
