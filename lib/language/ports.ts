import { removal } from "./diagnostic";
import { nearest } from "./nearest";
import type { Report } from "./report";
import type { BlockStatement } from "./scope";
import type { Setting, Statement, Word } from "./syntax";
import { quote } from "./token";

type DeviceStatement = Extract<Statement, { kind: "device" }>;

/** Sorts what stands in the braces of an instance: nets at ports, values of knobs. */
export class Ports {
  constructor(private readonly report: Report) {}

  connect(
    device: DeviceStatement,
    block: BlockStatement,
  ): { nets: ReadonlyMap<string, Word>; values: ReadonlyMap<string, Setting> } {
    const nets = new Map<string, Word>();
    const values = new Map<string, Setting>();
    const ports = block.ports.map((port) => port.text);
    const knobs = block.statements.flatMap((inner) => (inner.kind === "knob" ? [inner.name.text] : []));
    const seen = new Set<string>();
    for (const setting of device.settings) {
      const { name } = setting;
      if (name.text === "") continue;
      if (seen.has(name.text)) {
        this.report.error("NAM8", name, `${quote(name.text)} is given twice; remove one of the two.`);
        continue;
      }
      seen.add(name.text);
      if (ports.includes(name.text)) this.port(setting, nets);
      else if (knobs.includes(name.text)) values.set(name.text, setting);
      else this.unknown(name, block, [...ports, ...knobs]);
    }
    const open = ports.filter((port) => !seen.has(port));
    if (open.length > 0 && device.whole) this.reportOpen(device, open);
    return { nets, values };
  }

  private port({ name, value, tolerance }: Setting, nets: Map<string, Word>): void {
    if (value.kind === "hole") return;
    if (value.kind !== "name" || value.path.length > 1) {
      const message = `The net ${quote(name.text)} of a block wants the name of a net, as in \`${name.text} = out\`.`;
      this.report.error("FRM10", value, message);
      return;
    }
    if (tolerance !== null)
      this.report.error("UNI10", tolerance, "A net takes no tolerance; remove it.", removal(tolerance));
    nets.set(name.text, value.path[0]!);
  }

  private reportOpen({ name }: DeviceStatement, open: readonly string[]): void {
    const one = open.length === 1;
    const which = one ? `net ${quote(open[0]!)}` : `nets ${open.map(quote).join(", ")}`;
    const message = `The ${which} of ${quote(name.text)} ${one ? "is" : "are"} left open; connect ${one ? "it" : "them"}: \`${open[0]} = net\`.`;
    this.report.error("WIR5", name, message);
  }

  private unknown(name: Word, block: BlockStatement, known: readonly string[]): void {
    const start = `The block ${quote(block.name.text)} has no net or knob ${quote(name.text)}`;
    const list = known.length === 0 ? "it has none at all" : `it has ${known.join(", ")}`;
    this.report.propose("NAM6", name, start, () => nearest(name.text, known), list);
  }
}
