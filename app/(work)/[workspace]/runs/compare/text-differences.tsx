import Link from "next/link";
import type { ReactNode } from "react";
import { counted } from "@/app/_components/ui/count";
import { ChangeList } from "../../netlists/[id]/change-list";
import { type ComparedRun, nameOf } from "./compare-shapes";

/** What the texts of the other runs say differently from that of the first. */
export function TextDifferences({
  runs,
  workspace,
}: {
  readonly runs: readonly ComparedRun[];
  readonly workspace: string;
}) {
  const [first, ...others] = runs;
  if (first === undefined || others.length === 0) return null;
  return (
    <section aria-labelledby="texts" className="grid gap-4">
      <h2 id="texts" className="caption">
        What their texts say differently
      </h2>
      {others.map((one) => (
        <div key={one.letter} className="grid gap-1">
          <h3 className="flex flex-wrap items-baseline gap-x-3 text-sm">
            {first.letter} → {nameOf(one, runs)}
            {one.run.netlistId === first.run.netlistId && one.run.revision !== first.run.revision && (
              <Link
                className="link font-normal"
                prefetch={false}
                href={`/${workspace}/netlists/${one.run.netlistId}/compare/${first.run.revision}..${one.run.revision}`}
              >
                Line by line
              </Link>
            )}
          </h3>
          {one.run.engineVersion !== first.run.engineVersion && (
            <p className="text-sm">
              Solved by engine version {one.run.engineVersion}, not {first.run.engineVersion}: last digits may
              differ for that alone.
            </p>
          )}
          {one.changes !== null && (
            <Folded
              when={one.run.netlistId !== first.run.netlistId}
              words={`Of different netlists: ${counted(one.changes.changes.length, "difference")}`}
            >
              <ChangeList found={one.changes} names={[`Run ${first.letter}`, `Run ${one.letter}`]} />
            </Folded>
          )}
        </div>
      ))}
    </section>
  );
}

function Folded({
  when,
  words,
  children,
}: {
  readonly when: boolean;
  readonly words: string;
  readonly children: ReactNode;
}) {
  if (!when) return children;
  return (
    <details>
      <summary className="min-h-6 w-fit text-sm">{words}</summary>
      <div className="mt-1">{children}</div>
    </details>
  );
}
