"use client";

import { useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import type { SheetState } from "./use-sheet";

/** Somebody saved a revision meanwhile: nothing of either text is lost, whichever way the reader takes. */
export function ConflictDialog({ sheet, base }: { readonly sheet: SheetState; readonly base: number }) {
  const [copying, setCopying] = useState(false);
  const { theirs } = sheet;
  if (theirs === null) return null;
  const copy = async () => {
    setCopying(true);
    await sheet.keepAsCopy();
    setCopying(false);
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && sheet.closeConflict()}
      title={`Revision ${theirs.revision} was saved meanwhile`}
      description={`Your text was written upon revision ${base}, so it was not saved over the newer one. Both texts are kept, whichever way you take.`}
      actions={
        <>
          <Button onClick={sheet.closeConflict}>Go on with mine</Button>
          <Button busy={copying} onClick={() => void copy()}>
            {copying ? "Copying…" : "Keep mine as a new netlist"}
          </Button>
          <Button tone="primary" onClick={sheet.loadTheirs}>
            Load revision {theirs.revision}
          </Button>
        </>
      }
    >
      <p className="text-sm">
        Loading sets your text aside on this machine; you can take it back and save it upon revision{" "}
        {theirs.revision}.
      </p>
    </Dialog>
  );
}
