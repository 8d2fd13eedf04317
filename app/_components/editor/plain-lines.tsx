import { highlight } from "@/lib/language/highlight";
import { FONT_SIZE, LINE_HEIGHT, TOKEN_INKS } from "./palette";

/** Beyond it a text is shown without colours, since nobody waits for them. UTF-16 units. */
const MOST_COLOURED = 40_000;

export interface Piece {
  readonly at: number;
  readonly text: string;
  readonly ink: string | undefined;
}

/** The netlist as numbered lines, rendered by the server too, so that it can be read before the editor has arrived. */
export function PlainLines({ text, label }: { readonly text: string; readonly label: string }) {
  const metrics = { fontSize: FONT_SIZE, lineHeight: `${LINE_HEIGHT}px` };
  return (
    <section
      aria-label={label}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: text that scrolls must be reachable from the keyboard
      tabIndex={0}
      className="absolute inset-0 overflow-auto bg-surface pt-2"
    >
      <ol className="font-(family-name:--font-figures)" style={metrics}>
        {linesOf(text).map((line) => (
          <li
            key={line.at}
            className="sheet-line grid grid-cols-[48px_minmax(0,1fr)]"
            style={{ minHeight: LINE_HEIGHT }}
          >
            <span aria-hidden="true" className="select-none pr-3 text-right text-quiet">
              {line.number}
            </span>
            <code className="whitespace-pre-wrap break-words pl-3" style={{ fontSize: "inherit" }}>
              {line.pieces.map((piece) => (
                <span
                  key={piece.at}
                  style={piece.ink === undefined ? undefined : { color: `var(${piece.ink})` }}
                >
                  {piece.text}
                </span>
              ))}
            </code>
          </li>
        ))}
      </ol>
    </section>
  );
}

/** The lines of a text with their coloured pieces; `at` is the offset at which a line or piece begins. */
export function linesOf(text: string): { at: number; number: number; pieces: Piece[] }[] {
  const ranges = text.length > MOST_COLOURED ? [] : highlight(text);
  let next = 0;
  let at = 0;
  return text.split("\n").map((line, index) => {
    const start = at;
    const stop = start + line.length;
    const pieces: Piece[] = [];
    let end = start;
    for (; next < ranges.length && ranges[next]!.from < stop; next += 1) {
      const { from, to, class: kind } = ranges[next]!;
      if (from > end) pieces.push({ at: end, text: text.slice(end, from), ink: undefined });
      pieces.push({ at: from, text: text.slice(from, to), ink: TOKEN_INKS[kind] });
      end = to;
    }
    if (end < stop) pieces.push({ at: end, text: text.slice(end, stop), ink: undefined });
    at = stop + 1;
    return { at: start, number: index + 1, pieces };
  });
}
