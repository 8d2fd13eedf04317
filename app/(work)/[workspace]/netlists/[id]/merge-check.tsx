import type { Examined } from "@/app/_components/editor/use-examination";
import { counted } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { lineStarts, placeOf } from "@/lib/language/span";

/** Problems of a merge that are listed; the sheet shows all. */
const MOST = 8;

interface Props {
  readonly text: string;
  /** What the checker says of `text`; null until it has read it. */
  readonly checked: Examined | null;
  readonly broken: boolean;
}

/** What the checker says of a merge. Lines that fit together may still contradict one another. */
export function MergeCheck({ text, checked, broken }: Props) {
  if (broken) {
    return (
      <Notice tone="caution" title="The merge cannot be checked here">
        <p>This browser could not start the checking. Put the merge on the sheet and save it from there.</p>
      </Notice>
    );
  }
  if (checked === null) return <p className="text-quiet text-sm">Checking the merge…</p>;
  const errors = checked.diagnostics.filter(({ severity }) => severity === "error");
  if (errors.length === 0) {
    return (
      <Notice tone="holds" title="The checker finds no error in the merge">
        {checked.diagnostics.length > 0 && <p>{counted(checked.diagnostics.length, "warning")}</p>}
      </Notice>
    );
  }
  const starts = lineStarts(text);
  return (
    <Notice tone="broken" title={`The merge has ${counted(errors.length, "error")}`} announce>
      <ul>
        {errors.slice(0, MOST).map((one) => (
          <li key={`${one.code} ${one.from}`}>
            line {placeOf(starts, one.from).line}: {one.message}
          </li>
        ))}
      </ul>
      {errors.length > MOST && <p>and {counted(errors.length - MOST, "more error")}</p>}
      <p className="mt-1">Choose otherwise, or put the merge on the sheet and mend it there.</p>
    </Notice>
  );
}
