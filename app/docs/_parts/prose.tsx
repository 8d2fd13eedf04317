import { Fragment } from "react";
import { Symbols } from "./math";

/** A sentence in which what stands between backticks is set as text of a netlist, and what stands between dollar signs as a formula. */
export function Prose({ children }: { readonly children: string }) {
  return children.split(/(`[^`]*`|\$[^$]*\$)/u).map((piece, k) => {
    const inner = piece.slice(1, -1);
    // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of a sentence never change their order
    if (piece.startsWith("`")) return <code key={k}>{inner}</code>;
    // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of a sentence never change their order
    if (piece.startsWith("$")) return <Symbols key={k}>{inner}</Symbols>;
    // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of a sentence never change their order
    return <Fragment key={k}>{piece}</Fragment>;
  });
}
