import { parse } from "@/lib/language/parser";
import { type Connections, connectionsOf } from "@/lib/language/symbols/connections";
import { symbolsOf } from "@/lib/language/symbols/symbols";

/** What a text connects. */
export function connected(text: string): Connections {
  const { netlist } = parse(text);
  return connectionsOf(netlist, symbolsOf(netlist, text));
}

/** A ladder of resistors with a transistor at each third step: three elements for two steps, and one current into it. */
export function ladderText(elements: number): string {
  const lines = ["model j : npn { Is = 1 fA }", "ground -- IS : current 1 µA -- n0"];
  for (let k = 0; lines.length < elements + 1; k += 1) {
    lines.push(`n${k} -- R${k} : resistor 1 kΩ -- n${k + 1}`);
    if (k % 3 === 0) lines.push(`Q${k} : j { c = n${k + 1}, b = n${k}, e = ground }`);
  }
  return `${lines.slice(0, elements + 1).join("\n")}\n`;
}
