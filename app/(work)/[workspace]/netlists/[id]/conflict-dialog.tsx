"use client";

import dynamic from "next/dynamic";
import { useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import type { SheetState } from "./use-sheet";

// With a placeholder of its own: without one the whole sheet, its text included, would be put away until it is here.
const MergeDialog = dynamic(() => import("./merge-dialog").then((found) => found.MergeDialog), {
  loading: () => null,
});

/** Somebody saved a revision meanwhile: nothing of either text is lost, whichever way the reader takes. */
export function ConflictDialog({ sheet }: { readonly sheet: SheetState }) {
  const [copying, setCopying] = useState(false);
  const [merging, setMerging] = useState(false);
  const { theirs, saved } = sheet;
  if (theirs === null) return null;
  const copy = async () => {
    setCopying(true);
    await sheet.keepAsCopy();
    setCopying(false);
  };
  const close = () => {
    setMerging(false);
    sheet.closeConflict();
  };
  if (merging) {
    return (
      <MergeDialog
        // Another revision that comes meanwhile is another merge.
        key={theirs.revision}
        sheet={sheet}
        theirs={theirs}
        onBack={() => setMerging(false)}
        onDone={() => setMerging(false)}
      />
    );
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && close()}
      title={`Revision ${theirs.revision} was saved meanwhile`}
      description={`Your text was written upon revision ${saved.revision} and is not saved over the newer one. Both texts are kept, whichever way you take.`}
      actions={
        <>
          <Button onClick={close}>Go on with mine</Button>
          <Button busy={copying} onClick={() => void copy()}>
            {copying ? "Copying…" : "Keep mine as a new netlist"}
          </Button>
          <Button onClick={() => sheet.loadTheirs()}>Load revision {theirs.revision}</Button>
          <Button tone="primary" onClick={() => setMerging(true)}>
            Merge both
          </Button>
        </>
      }
    >
      <p className="text-sm">
        Merging brings your changes and those of revision {theirs.revision} together, place by place. Loading
        sets your text aside on this machine; you can take it back and save it upon revision {theirs.revision}
        .
      </p>
    </Dialog>
  );
}
