import { shownLinesOf } from "../editor/plain-lines";
import { AskedLine } from "./asked-line";
import { InkedLine } from "./inked-line";

/** A text to read, in its colours, each of its first lines with its number: the address of a page that shows one may end in #L12 for a line. */
export function NumberedLines({ text, label }: { readonly text: string; readonly label: string }) {
  const lines = shownLinesOf(text.endsWith("\n") ? text.slice(0, -1) : text);
  return (
    <section aria-label={label} className="border bg-surface">
      <AskedLine />
      <ol className="py-2 font-(family-name:--font-figures) text-[0.8125rem] leading-6">
        {lines.map(({ at, number, pieces }) => (
          <li
            key={at}
            id={`L${number}`}
            className="grid min-h-6 scroll-mt-24 grid-cols-[44px_minmax(0,1fr)] pr-3 data-asked:bg-wash data-asked:outline data-asked:outline-accent"
          >
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
