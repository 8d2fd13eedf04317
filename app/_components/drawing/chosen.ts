import type { Span } from "@/lib/language/span";
import type { Box, Connections, Row } from "@/lib/language/symbols/connections";

/** Every box, those inside instances among them, in the order of the text. */
export function allBoxes(rows: readonly Row[]): Box[] {
  return rows.flatMap((boxes) => boxes.flatMap((box) => [box, ...allBoxes(box.inside ?? [])]));
}

/** Every net with the pins that are joined to it, as `R1.right`; nets of heads count for the nets that they are. */
export function netsWithPins({ rows, nets }: Connections): ReadonlyMap<string, readonly string[]> {
  const pins = new Map<string, string[]>([...nets.keys()].map((net) => [net, []]));
  for (const box of allBoxes(rows)) {
    if (box.inside !== null) continue;
    for (const { pin, net } of box.joints) if (net !== null) pins.get(net)?.push(`${box.name}.${pin}`);
  }
  return pins;
}

/** Where the text says what a name of the drawing is; null for a name that it does not have. */
export function spanOf({ rows, nets }: Connections, name: string): Span | null {
  return nets.get(name) ?? allBoxes(rows).find((box) => box.name === name)?.span ?? null;
}

/**
 * The names of what stands at an offset of the text: those that the name there has in the circuit, or else the nets and then the
 * elements whose part of the text it is. Nothing outside the wiring.
 */
export function namesAt(connections: Connections, offset: number, told: readonly string[]): string[] {
  const boxes = allBoxes(connections.rows);
  const known = new Set([...boxes.map(({ name }) => name), ...connections.nets.keys()]);
  const named = told.filter((name) => known.has(name));
  if (named.length > 0) return named;
  const holds = (span: Span | null) => span !== null && span.from <= offset && offset <= span.to;
  const joined = boxes.flatMap(({ joints }) => joints.filter(({ at }) => holds(at)).map(({ net }) => net));
  const nets = joined.filter((net) => net !== null);
  if (nets.length > 0) return [...new Set(nets)];
  return boxes.filter(({ span }) => holds(span)).map(({ name }) => name);
}

/** Whether a box stands for one of the names: by its own, or, closed, by that of something inside it. */
export function standsFor(box: Box, names: readonly string[], isOpen: boolean): boolean {
  return names.some(
    (name) => name === box.name || (!isOpen && box.inside !== null && name.startsWith(`${box.name}.`)),
  );
}

/** What a box is and what it is joined to, in a sentence. */
export function sayBox({ name, of, value, joints }: Box): string {
  const what = value === "" ? of : `${of} ${value}`;
  const ends = joints.map(({ pin, net }) => (net === null ? `${pin} open` : `${pin} to ${net}`));
  return `${name}, ${what}: ${ends.length === 0 ? "joined to nothing" : ends.join(", ")}`;
}

/** What is joined to a net, in a sentence. */
export function sayNet(net: string, pins: readonly string[]): string {
  return `net ${net}: ${pins.length === 0 ? "joined to nothing" : pins.join(", ")}`;
}
