import { highlight } from "@/lib/language/highlight";

const INKS: Record<string, string> = {
  keyword: "var(--syntax-keyword)",
  kind: "var(--syntax-kind)",
  number: "var(--syntax-number)",
  unit: "var(--syntax-number)",
  comment: "var(--syntax-comment)",
};

const CLASS = "ruled mt-4 overflow-x-auto border-t text-[0.8125rem] print:whitespace-pre-wrap";

/** A netlist to read, set on ruled lines with the colours of the sheet. */
export function NetlistText({ text }: { readonly text: string }) {
  const pieces: { readonly at: number; readonly text: string; readonly ink: string | undefined }[] = [];
  let end = 0;
  for (const range of highlight(text)) {
    if (range.from > end) pieces.push({ at: end, text: text.slice(end, range.from), ink: undefined });
    pieces.push({ at: range.from, text: text.slice(range.from, range.to), ink: INKS[range.class] });
    end = range.to;
  }
  pieces.push({ at: end, text: text.slice(end), ink: undefined });
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: text that scrolls sideways must be reachable from the keyboard
    <pre tabIndex={0} className={CLASS}>
      {pieces.map((piece) => (
        <span key={piece.at} style={piece.ink === undefined ? undefined : { color: piece.ink }}>
          {piece.text}
        </span>
      ))}
    </pre>
  );
}
