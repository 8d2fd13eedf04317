"use client";

import type { TabDoes } from "@/app/_components/editor/editor-handle";
import type { Examined } from "@/app/_components/editor/use-examination";
import { counted } from "@/app/_components/ui/count";
import { useKeyNames } from "./use-key-names";

interface Props {
  readonly examined: Examined | null;
  /** The text has changed since it was examined. */
  readonly stale: boolean;
  readonly tab: TabDoes;
  readonly readOnly: boolean;
}

/** Under the text: how many problems it has, the size of what it would compute, and how the Tab key gets out of the editor. */
export function StatusLine({ examined, stale, tab, readOnly }: Props) {
  const keys = useKeyNames();
  return (
    <div className="figures flex shrink-0 flex-wrap items-center justify-between gap-x-6 gap-y-1 border-t bg-paper px-4 py-2 text-quiet text-xs md:px-6">
      <p className="flex flex-wrap gap-x-4" aria-busy={stale}>
        <span role="status">{examined === null ? "checking…" : problemText(examined)}</span>
        {examined !== null && examined.plan !== null && (
          <>
            <span>{counted(examined.plan.points, "point")}</span>
            <span>{counted(examined.plan.unknowns, "unknown")}</span>
          </>
        )}
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
