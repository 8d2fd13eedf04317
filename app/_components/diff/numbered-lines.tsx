import { linesOf } from "../editor/plain-lines";
import { InkedLine } from "./inked-line";

/** A text to read, in its colours, each line with its number. */
export function NumberedLines({ text, label }: { readonly text: string; readonly label: string }) {
  const lines = linesOf(text.endsWith("\n") ? text.slice(0, -1) : text);
  return (
    <section aria-label={label} className="border bg-surface">
      <ol className="py-2 font-(family-name:--font-figures) text-[0.8125rem] leading-6">
        {lines.map(({ at, number, pieces }) => (
          <li key={at} className="grid min-h-6 grid-cols-[44px_minmax(0,1fr)] pr-3">
            <span aria-hidden="true" className="select-none pr-3 text-right text-quiet">
              {number}
            </span>
            <InkedLine pieces={pieces} marks={[]} start={at} sort="same" />
          </li>
        ))}
      </ol>
    </section>
  );
}
