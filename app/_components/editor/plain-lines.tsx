import { highlight } from "@/lib/language/highlight";
import { FONT_SIZE, LINE_HEIGHT, TOKEN_INKS } from "./palette";

/** Beyond it a text is shown without colours, since nobody waits for them. UTF-16 units. */
const MOST_COLOURED = 40_000;

/** Lines that are set one by one; what comes after them is one block, since each line costs the server a kilobyte. */
export const MOST_LINES = 5_000;

export interface Piece {
  readonly at: number;
  readonly text: string;
  readonly ink: string | undefined;
}

interface Props {
  readonly text: string;
  readonly label: string;
  /** Hears of the offset at which the text was pressed, or its beginning when a key was. */
  readonly onPress?: (offset: number) => void;
}

/** The netlist as numbered lines, rendered by the server too, so that it can be read before the editor has arrived. */
export function PlainLines({ text, label, onPress }: Props) {
  const metrics = { fontSize: FONT_SIZE, lineHeight: `${LINE_HEIGHT}px` };
  return (
    <section
      aria-label={label}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: text that scrolls must be reachable from the keyboard
      tabIndex={0}
      // A page rendered by the server alone hears of nothing, and may not hand a handler on.
      onClick={onPress && ((event) => onPress(offsetUnder(event.clientX, event.clientY)))}
      onKeyDown={onPress && ((event) => event.key === "Enter" && onPress(0))}
      className="absolute inset-0 overflow-auto bg-surface pt-2"
    >
      <ol className="font-(family-name:--font-figures)" style={metrics}>
        {shownLinesOf(text).map((line) => (
          <li
            key={line.at}
            data-at={line.at}
            className="sheet-line grid grid-cols-[48px_minmax(0,1fr)]"
            style={{ minHeight: LINE_HEIGHT }}
          >
            <span aria-hidden="true" className="select-none pr-6 text-right text-quiet">
              {line.number}
            </span>
            <code
              className="whitespace-pre-wrap break-words pr-5"
              style={{ fontSize: "inherit", ...hanging(line.pieces[0]?.text ?? "") }}
            >
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

/** What goes on in a further line stands two places further in than the line begins, as in the editor. */
function hanging(start: string): { paddingLeft: string; textIndent: string } {
  const places = 2 + (/^ */u.exec(start)?.[0].length ?? 0);
  return { paddingLeft: `calc(8px + ${places}ch)`, textIndent: `-${places}ch` };
}

/** Offset in the text of the character under a point of the window: the end of its line where the point lies beside it. */
export function offsetUnder(x: number, y: number): number {
  const line = document.elementFromPoint(x, y)?.closest<HTMLElement>("[data-at]");
  const code = line?.querySelector("code");
  if (line == null || code == null) return 0;
  const at = Number(line.dataset.at);
  const caret = document.caretRangeFromPoint?.(x, y);
  if (caret == null || !code.contains(caret.startContainer)) return at + (code.textContent?.length ?? 0);
  const before = document.createRange();
  before.setStart(code, 0);
  before.setEnd(caret.startContainer, caret.startOffset);
  return at + before.toString().length;
}

/** As `linesOf`, but all that comes after `MOST_LINES` lines as one, whose pieces have the line ends in them. */
export function shownLinesOf(text: string): ReturnType<typeof linesOf> {
  let at = 0;
  for (let line = 0; line < MOST_LINES; line += 1) {
    const end = text.indexOf("\n", at);
    if (end === -1) return linesOf(text);
    at = end + 1;
  }
  const rest = { at, number: MOST_LINES + 1, pieces: [{ at, text: text.slice(at), ink: undefined }] };
  return [...linesOf(text.slice(0, at - 1)), rest];
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
