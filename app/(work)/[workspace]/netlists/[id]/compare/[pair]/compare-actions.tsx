"use client";

import { useRouter } from "next/navigation";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { SelectField } from "@/app/_components/ui/field";

interface Props {
  readonly workspace: string;
  readonly netlist: { readonly id: string; readonly latest: number };
  readonly pair: readonly [before: number, after: number];
}

/** Which two revisions stand on the page: others by choosing, the same the other way round by exchanging. */
export function CompareActions({ workspace, netlist, pair: [before, after] }: Props) {
  const router = useRouter();
  const base = `/${workspace}/netlists/${netlist.id}`;
  const go = (a: number, b: number) => router.push(`${base}/compare/${a}..${b}`);
  useDeeds("here", [
    { id: "exchange", words: "Exchange the two revisions", also: "swap", does: () => go(after, before) },
    { id: "history", words: "History", also: "revisions", does: `${base}/revisions` },
    { id: "sheet", words: "Open sheet", also: "netlist text edit", does: base },
  ]);
  const all = Array.from({ length: netlist.latest }, (_, k) => netlist.latest - k);
  const options = all.map((number) => (
    <option key={number} value={number}>
      Revision {number}
    </option>
  ));
  return (
    <>
      <SelectField
        label="Before"
        labelHidden
        value={before}
        onChange={(event) => go(Number(event.target.value), after)}
      >
        {options}
      </SelectField>
      <Button onClick={() => go(after, before)} aria-label="Exchange the two" title="Exchange the two">
        ⇄
      </Button>
      <SelectField
        label="After"
        labelHidden
        value={after}
        onChange={(event) => router.push(`${base}/compare/${before}..${event.target.value}`)}
      >
        {options}
        <option value="draft">Your draft</option>
      </SelectField>
      <ButtonLink href={`${base}/revisions`}>History</ButtonLink>
      <ButtonLink href={base}>Open sheet</ButtonLink>
    </>
  );
}
