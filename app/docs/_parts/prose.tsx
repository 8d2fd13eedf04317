import Link from "next/link";
import { Fragment } from "react";
import { Symbols } from "./math";
import { wholeQuantities } from "./whole-quantities";

const MARKED = /(`[^`]*`|\$[^$]*\$|\b(?:TXT|FRM|NAM|UNI|WIR|PLN|CON|CAP)\d+\b)/u;

/**
 * A sentence in which what stands between backticks is set as text of a netlist, what stands between dollar signs as a formula, and the
 * code of a diagnostic leads to it.
 */
export function Prose({ children }: { readonly children: string }) {
  return (
    children
      .split(MARKED)
      // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of a sentence never change their order
      .map((piece, k) => <Piece key={`${k} ${piece}`} text={piece} isMarked={k % 2 === 1} />)
  );
}

function Piece({ text, isMarked }: { readonly text: string; readonly isMarked: boolean }) {
  if (!isMarked) return <Fragment>{wholeQuantities(text)}</Fragment>;
  const inner = text.slice(1, -1);
  if (text.startsWith("`")) return <code>{inner}</code>;
  if (text.startsWith("$")) return <Symbols>{inner}</Symbols>;
  return (
    <Link href={`/docs/diagnostics#${text}`} className="link">
      {text}
    </Link>
  );
}
