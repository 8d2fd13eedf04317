import type { Box, Row } from "@/lib/language/symbols/connections";

/** A row of boxes that is drawn, or the edge of the frame round an open block. */
export type Line =
  | { readonly kind: "row"; readonly boxes: Row }
  | { readonly kind: "open" | "close"; readonly box: Box };

/** The rows in the order of the text; in place of an instance whose name is in `open` stands what is inside it. */
export function linesOf(rows: readonly Row[], open: ReadonlySet<string>): Line[] {
  return rows.flatMap((boxes): Line[] => {
    const box = boxes[0];
    if (box === undefined) return [];
    if (box.inside === null || !open.has(box.name)) return [{ kind: "row", boxes }];
    return [{ kind: "open", box }, ...linesOf(box.inside, open), { kind: "close", box }];
  });
}

/**
 * The nets but ground, in the order of their rails from left to right. A net stands beside the one through which the text first
 * comes to it, so that a change of one line moves little else.
 */
export function railOrder(lines: readonly Line[]): string[] {
  const order: string[] = [];
  for (const line of lines) {
    // The head of an open block is wired inside it, so its rails come with what stands there.
    if (line.kind === "row") for (const box of line.boxes) place(order, netsOf(box));
  }
  return order;
}

/** The nets of a box but ground, each once, in the order of its pins. */
export function netsOf({ joints }: Box): string[] {
  const nets = joints.map(({ net }) => net).filter((net) => net !== null && net !== "ground");
  return [...new Set(nets as string[])];
}

function place(order: string[], nets: readonly string[]): void {
  let before = -1;
  nets.forEach((net, k) => {
    const known = order.indexOf(net);
    if (known !== -1) {
      before = known;
      return;
    }
    const next = nets.slice(k + 1).find((one) => order.includes(one));
    const at = before !== -1 ? before + 1 : next === undefined ? order.length : order.indexOf(next);
    order.splice(at, 0, net);
    before = at;
  });
}
