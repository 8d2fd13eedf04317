import type { Examined } from "@/app/_components/editor/use-examination";
import { counted, formatCount } from "@/app/_components/ui/count";

interface Props {
  readonly examined: Examined | null;
  /** The text has changed since it was examined. */
  readonly stale: boolean;
  readonly tabMoves: boolean;
  readonly readOnly: boolean;
}

/** Under the text: how many problems it has, the size of what it would compute, and how the Tab key gets out of the editor. */
export function StatusLine({ examined, stale, tabMoves, readOnly }: Props) {
  return (
    <div className="figures flex shrink-0 flex-wrap items-center justify-between gap-x-6 gap-y-1 border-t bg-paper px-4 py-2 text-quiet text-xs md:px-6">
      <p className="flex flex-wrap gap-x-4" aria-busy={stale}>
        <span role="status">{examined === null ? "checking…" : problemText(examined)}</span>
        {examined !== null && examined.plan !== null && (
          <>
            <span>{counted(examined.plan.points, "point")}</span>
            <span>{formatCount(examined.plan.unknowns)} unknowns</span>
          </>
        )}
      </p>
      {!readOnly && (
        <p>
          {tabMoves ? "Tab moves on" : "Tab indents"}; Ctrl M{" "}
          {tabMoves ? "lets it indent" : "lets it move on"}
        </p>
      )}
    </div>
  );
}

function problemText({ diagnostics }: Examined): string {
  const errors = diagnostics.filter(({ severity }) => severity === "error").length;
  const warnings = diagnostics.length - errors;
  if (diagnostics.length === 0) return "no problems";
  if (warnings === 0) return counted(errors, "error");
  return errors === 0
    ? counted(warnings, "warning")
    : `${counted(errors, "error")}, ${counted(warnings, "warning")}`;
}
