"use client";

import { useQuery } from "@tanstack/react-query";
import { useMemo } from "react";
import { CurveFigure } from "@/app/_components/curves/curve-figure";
import { curveSet } from "@/app/_components/curves/curve-set";
import type { CurveView } from "@/app/_components/curves/curve-view";
import { FailedState, LoadingState } from "@/app/_components/ui/states";
import type { RunDocument } from "@/lib/analyses/result";
import { fetchDocument } from "../../../../runs/[id]/fetch-run";
import { bothCurves, onlyIn } from "./both-curves";

interface Props {
  readonly before: { readonly revision: number; readonly run: string };
  readonly after: { readonly revision: number; readonly run: string };
  readonly view: CurveView;
  readonly onView: (change: Partial<CurveView>) => void;
  readonly point: number | null;
  readonly onPoint: (point: number) => void;
}

/** The curves of both revisions over one ruler, or one figure under the other where their sweeps differ. */
export function CurveSection({ before, after, ...figure }: Props) {
  const old = useDocument(before.run);
  const now = useDocument(after.run);
  const both = useMemo(() => {
    if (old.data === undefined || now.data === undefined) return null;
    return bothCurves(
      { revision: before.revision, document: old.data },
      { revision: after.revision, document: now.data },
    );
  }, [old.data, now.data, before.revision, after.revision]);
  const error = old.error ?? now.error;
  if (error !== null)
    return (
      <FailedState title="The curves could not be fetched">
        <p>{error.message}</p>
      </FailedState>
    );
  if (old.data === undefined || now.data === undefined)
    return <LoadingState>Fetching the curves…</LoadingState>;
  const name = `Curves of revisions ${before.revision} and ${after.revision}`;
  if (both !== null) {
    return (
      <>
        <CurveFigure set={curveSet(both)!} name={name} waiting={null} {...figure} />
        <Apart documents={[old.data, now.data]} revisions={[before.revision, after.revision]} />
      </>
    );
  }
  if (old.data.axes.length === 0 || now.data.axes.length === 0)
    return (
      <p className="border-y py-3 text-quiet text-sm">
        One of them sweeps nothing, so there are no two curves to lay over one another.
      </p>
    );
  return (
    <div className="grid gap-8">
      <p className="text-sm">
        The sweeps of the two differ, so their points do not stand at the same values: the curves stand one
        under the other.
      </p>
      {[
        { document: old.data, revision: before.revision },
        { document: now.data, revision: after.revision },
      ].map(({ document, revision }) => (
        <div key={revision} className="grid gap-2">
          <h3 className="font-semibold text-sm">Revision {revision}</h3>
          <CurveFigure
            set={curveSet(document)!}
            name={`Curves of revision ${revision}`}
            waiting={null}
            {...figure}
          />
        </div>
      ))}
    </div>
  );
}

/** What only one of the two shows. */
function Apart({
  documents: [old, now],
  revisions,
}: {
  readonly documents: readonly [RunDocument, RunDocument];
  readonly revisions: readonly [number, number];
}) {
  const alone = [
    { names: onlyIn(old, now), revision: revisions[0] },
    { names: onlyIn(now, old), revision: revisions[1] },
  ].filter(({ names }) => names.length > 0);
  if (alone.length === 0) return null;
  return (
    <p className="mt-3 text-quiet text-sm">
      {alone.map(({ names, revision }) => `Only revision ${revision} shows ${names.join(", ")}.`).join(" ")}
    </p>
  );
}

function useDocument(run: string) {
  return useQuery({
    queryKey: ["run-document", run],
    queryFn: async () => (await fetchDocument(run, null))!.document,
    staleTime: Number.POSITIVE_INFINITY,
  });
}
