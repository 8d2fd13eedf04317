"use client";

import type { TabDoes } from "@/app/_components/editor/editor-handle";
import type { Examined } from "@/app/_components/editor/use-examination";
import type { Previewing } from "@/app/_components/preview/previewing";
import { proofInWords } from "@/app/_components/preview/row-words";
import { useLate } from "@/app/_components/preview/use-late";
import { usePreview } from "@/app/_components/preview/use-preview";
import { counted } from "@/app/_components/ui/count";
import { useKeyNames } from "./use-key-names";

interface Props {
  readonly examined: Examined | null;
  /** The text has changed since it was examined. */
  readonly stale: boolean;
  readonly previewing: Previewing;
  readonly tab: TabDoes;
  readonly readOnly: boolean;
}

/** Under the sheet: how many problems the text has, how large its circuit is, what is proved of the preview, and how the Tab key gets out of the editor. */
export function StatusLine({ examined, stale, previewing, tab, readOnly }: Props) {
  const keys = useKeyNames();
  return (
    <div className="figures flex shrink-0 flex-wrap items-center justify-between gap-x-6 gap-y-1 border-t bg-paper px-4 py-2 text-quiet text-xs md:px-6">
      <p className="flex flex-wrap gap-x-4" aria-busy={stale}>
        <span role="status">{examined === null ? "checking…" : problemText(examined)}</span>
        <CircuitSize previewing={previewing} />
      </p>
      {!readOnly && (
        <p aria-live="polite">
          Tab {tab}
          {tab !== "always moves on" && `; ${keys.tab} lets it ${tab === "indents" ? "move on" : "indent"}`}
        </p>
      )}
    </div>
  );
}

function CircuitSize({ previewing }: Pick<Props, "previewing">) {
  const outline = usePreview(previewing, (preview) => preview.outline);
  const row = usePreview(previewing, (preview) => preview.row);
  const isOld = useLate(usePreview(previewing, ({ isStale, state }) => isStale && state !== "solving"));
  if (outline === null) return null;
  return (
    <>
      <span>
        {counted(outline.unknowns, "unknown")}, {counted(outline.junctions, "junction")}
      </span>
      {row !== null && <span>{isOld ? "preview of an earlier text" : proofInWords(row)}</span>}
    </>
  );
}

function problemText({ diagnostics }: Examined): string {
  const errors = diagnostics.filter(({ severity }) => severity === "error").length;
  const warnings = diagnostics.length - errors;
  if (diagnostics.length === 0) return "no problems";
  const found = [
    ...(errors === 0 ? [] : [`${counted(errors, "error")} to mend before a run`]),
    ...(warnings === 0 ? [] : [counted(warnings, "warning")]),
  ];
  return found.join(", ");
}
