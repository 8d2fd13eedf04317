import type { Fix } from "@/lib/language/diagnostic";
import { tokenize } from "@/lib/language/lexer";
import { Report } from "@/lib/language/report";
import type { Token } from "@/lib/language/token";
import { GROUND, list, type Wiring } from "./wiring-graph";

/** How ground is called elsewhere. */
export const LIKE_GROUND = /^(?:ground|[ad]?gnd|earth|vss)$/iu;

/**
 * Whether a pin of the circuit is on `ground`. Drivers count their output from ground, so that a circuit with one could be solved
 * without; but what is meant by such a text is another net in the place of ground.
 */
export function checkGround(wiring: Wiring, text: string | null, report: Report): boolean {
  if (wiring.connections[GROUND]!.length > 0) return true;
  const own = (net: string): string => net.slice(net.lastIndexOf(".") + 1);
  const meant =
    wiring.nets.find((net, i) => i !== GROUND && LIKE_GROUND.test(net)) ??
    wiring.nets.find((net, i) => i !== GROUND && LIKE_GROUND.test(own(net)));
  const place = wiring.design.netPlaces.get(meant ?? wiring.nets[GROUND + 1]!)!;
  const start =
    "Nothing in this file touches `ground`, the net that all voltages are counted from, so no voltage is defined";
  if (meant === undefined) {
    report.error("WIR10", place, `${start}; give the common net the name \`ground\`.`);
    return false;
  }
  const fix = text === null || meant.includes(".") ? undefined : renaming(text, meant);
  report.error("WIR10", place, `${start}; did you mean \`ground\` for ${list([own(meant)])}?`, fix);
  return false;
}

/** Puts `ground` wherever the file names this net; names of pins, traces and what stands inside blocks stay. */
function renaming(text: string, net: string): Fix | undefined {
  const places = namedInFile(tokenize(text, new Report()), net);
  const [first, last] = [places[0], places[places.length - 1]];
  if (first === undefined || last === undefined) return undefined;
  let renamed = "";
  let at = first.from;
  for (const { from, to } of places) {
    renamed += `${text.slice(at, from)}ground`;
    at = to;
  }
  return { title: `Change ${net} to ground`, from: first.from, to: last.to, text: renamed };
}

function namedInFile(tokens: readonly Token[], net: string): Token[] {
  const places: Token[] = [];
  let depth = 0;
  let isBlock = false;
  tokens.forEach((token, i) => {
    if (token.text === "block" && token.kind === "word") isBlock = true;
    if (isBlock && token.kind === "symbol" && token.text === "{") depth += 1;
    if (isBlock && token.kind === "symbol" && token.text === "}") {
      depth -= 1;
      if (depth === 0) isBlock = false;
    }
    if (isBlock || token.kind !== "word" || token.text !== net) return;
    if (tokens[i - 1]?.text !== "." && tokens[i + 1]?.text !== "=") places.push(token);
  });
  return places;
}
