"use client";

import { useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { Notice } from "@/app/_components/ui/notice";
import { OpenButton } from "../examples/open-button";
import type { Progress } from "./progress";
import type { StepName, TourRun } from "./steps";

interface Props {
  readonly name: StepName;
  readonly text: string;
  readonly netlist: Progress["netlist"];
  readonly runs: readonly TourRun[] | null;
  /** Why the last run was not queued. */
  readonly problem: string | null;
  readonly onNetlist: (netlist: Progress["netlist"]) => void;
}

/** The ways out of the tour to what is real: the sheet of its netlist, its runs and their comparison, each in a tab of its own. */
export function RunLinks({ name, text, netlist, runs, problem, onNetlist }: Props) {
  const [isAnew, setAnew] = useState(false);
  const solved = (runs ?? []).filter(({ status }) => status === "done");
  const [last, first] = solved;
  if (netlist === null || isAnew) {
    return (
      <OpenButton
        text={text}
        onMade={({ workspace, id }) => {
          setAnew(false);
          onNetlist({ workspace, id });
        }}
      />
    );
  }
  const { workspace, id } = netlist;
  return (
    <div className="grid gap-2">
      <p className="flex flex-wrap items-center gap-x-5 gap-y-1 text-sm">
        <TabLink href={`/${workspace}/netlists/${id}`}>Open its sheet</TabLink>
        {last !== undefined && (
          <TabLink href={`/${workspace}/runs/${last.id}`}>Look at run {last.number} and its proofs</TabLink>
        )}
        {name === "compare" && first !== undefined && last !== undefined && (
          <TabLink href={`/${workspace}/runs/compare?runs=${first.id},${last.id}`}>
            Compare runs {first.number} and {last.number}
          </TabLink>
        )}
        <Button size="small" tone="quiet" onClick={() => setAnew(true)}>
          Use another netlist
        </Button>
      </p>
      {problem !== null && (
        <Notice tone="broken" title="The run was not queued" announce>
          <p>{problem}</p>
        </Notice>
      )}
    </div>
  );
}

function TabLink({ href, children }: { readonly href: string; readonly children: React.ReactNode }) {
  return (
    <a href={href} target="_blank" rel="noopener" className="link inline-flex min-h-6 items-center">
      {children} (new tab)
    </a>
  );
}
