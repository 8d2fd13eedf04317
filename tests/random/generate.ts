import type { RandomCircuit, RandomElement, RandomModel } from "./circuit";
import { Stream } from "./stream";

/** Junctions that a circuit has at most; a transistor has two. */
const MOST_JUNCTIONS = 20;

/**
 * A random circuit of 2 to 20 junctions that has a solution: stages of resistors, sources, diodes and transistors, each of which
 * takes the voltages of the stages before it through amplifiers or resistors. Every transistor has resistors at base and emitter
 * or a path that feeds it, and every net a path to ground, so that a stage, being passive, has a solution; a loop around an
 * amplifier is closed within its own stage, by a resistor, a pair of diodes or a transistor fed the right way.
 */
export function randomCircuit(seed: number): RandomCircuit {
  return new Maker(seed).make();
}

export class Maker {
  protected readonly stream: Stream;
  protected readonly elements: RandomElement[] = [];
  protected readonly models: Record<string, RandomModel> = {};
  protected readonly supplies: string[] = ["ground"];
  /** Nets that later stages may listen to. */
  protected readonly heard: string[] = [];
  protected junctions = 0;
  private count = 0;
  /** A: the most that an amplifier takes into an input. */
  protected bias = 0;

  constructor(private readonly seed: number) {
    this.stream = new Stream(seed);
  }

  make(): RandomCircuit {
    const { stream } = this;
    const kelvin = stream.pick([218.15, 273.15, 298.15, 300, 358.15, 398.15]);
    this.addModels();
    this.addSupplies();
    const wanted = stream.whole(2, MOST_JUNCTIONS);
    while (this.junctions < wanted) this.addStage(wanted - this.junctions);
    const nets = [...new Set(this.elements.flatMap(netsOf))].filter((net) => net !== "ground");
    return { seed: this.seed, kelvin, nets, models: this.models, elements: this.elements };
  }

  /** Adds a stage of at most `left` junctions. */
  protected addStage(left: number): void {
    const stage = this.stream.next();
    if (left >= 2 && stage < 0.5) this.addNetwork(left);
    else if (left >= 2 && stage < 0.6) this.addLogStage();
    else if (left >= 2 && stage < 0.7) this.addLimiter();
    else if (left >= 4 && stage < 0.8) this.addMirror();
    else if (left >= 4 && stage < 0.9) this.addPair();
    else if (stage < 0.95) this.addFollower();
    else this.addDiodes(left);
  }

  /** The model that the next diode, transistor or amplifier follows. */
  protected model(of: "diode" | "npn" | "pnp" | "opamp"): string {
    return of === "diode" ? "d" : of === "opamp" ? "amp" : `q_${of}`;
  }

  protected net(): string {
    this.count += 1;
    return `n${this.count}`;
  }

  protected resistor(left: string, right: string, low: number, high: number): void {
    this.elements.push({ kind: "resistor", left, right, ohms: this.stream.decades(low, high) });
  }

  protected addModels(): void {
    const { stream, models } = this;
    const junction = () => ({ Is: stream.decades(1e-18, 1e-9), n: 1, Eg: 1.12, x: 3 });
    models.d = {
      kind: "diode",
      ...junction(),
      n: stream.pick([1, 1, 1.5, 2]),
      Rs: stream.pick([0, 0, 0.5, 20]),
    };
    for (const kind of ["npn", "pnp"] as const) {
      models[`q_${kind}`] = {
        kind,
        ...junction(),
        Is: stream.decades(1e-18, 1e-13),
        beta_f: stream.decades(20, 500),
        beta_r: stream.decades(0.5, 10),
        Va_f: stream.pick([0, 30, 80, 150]),
      };
    }
    this.bias = stream.pick([0, 2e-11, 5e-8]);
    const [gain, offset] = [stream.pick([0, 1e4, 2e5, 1e7]), stream.pick([0, 1e-4, -2e-3])];
    models.amp = { kind: "opamp", gain, offset, bias: this.bias };
  }

  private addSupplies(): void {
    const { stream, supplies } = this;
    const volts = [stream.between(3, 15), ...(stream.chance(0.5) ? [-stream.between(3, 15)] : [])];
    for (const value of volts) {
      const right = this.net();
      this.elements.push({ kind: "voltage", left: "ground", right, volts: value });
      this.resistor(right, "ground", 1e3, 1e6);
      supplies.push(right);
    }
  }

  /** Where a stage takes its input from: a supply, or an earlier stage behind an amplifier. */
  protected source(): string {
    const { stream } = this;
    if (this.heard.length === 0 || stream.chance(0.4)) return stream.pick(this.supplies.slice(1));
    const heard = stream.pick(this.heard);
    const out = this.net();
    this.elements.push({ kind: "opamp", plus: heard, minus: out, out, model: this.model("opamp") });
    return out;
  }

  /** Transistors and diodes between nets that resistors tie to each other, to the supplies and to an earlier stage. */
  private addNetwork(most: number): void {
    const { stream } = this;
    const inner = Array.from({ length: stream.whole(2, 6) }, () => this.net());
    const all = [...inner, ...this.supplies];
    const other = (than: string) => stream.pick(all.filter((net) => net !== than));
    for (const net of inner) {
      this.resistor(net, other(net), 100, 1e6);
      this.resistor(net, "ground", 1e4, 1e8);
    }
    this.resistor(stream.pick(inner), this.source(), 1e3, 1e5);
    for (let left = stream.whole(2, Math.min(12, most)); left > 0; ) {
      if (left >= 2 && stream.chance(0.75)) {
        const c = stream.pick(all);
        const [b, e] = [this.net(), this.net()];
        this.elements.push({ kind: "transistor", c, b, e, model: this.model(stream.pick(["npn", "pnp"])) });
        this.resistor(b, other(c), 100, 1e5);
        this.resistor(e, other(c), 10, 1e4);
        left -= 2;
        this.junctions += 2;
      } else {
        const anode = stream.pick(inner);
        this.elements.push({ kind: "diode", anode, cathode: other(anode), model: this.model("diode") });
        left -= 1;
        this.junctions += 1;
      }
    }
    this.heard.push(...inner);
  }

  /** An amplifier whose current a transistor takes, base at ground: a log converter of eight decades. */
  private addLogStage(): void {
    const [sum, out] = [this.net(), this.net()];
    // Less than the amplifier's bias, or than its offset over the leak, could not flow through the transistor.
    const least = 1e-10 + 4 * this.bias;
    this.elements.push(
      { kind: "current", left: "ground", right: sum, amperes: this.stream.decades(least, 3e-3) },
      { kind: "transistor", c: sum, b: "ground", e: out, model: this.model("npn") },
      { kind: "opamp", plus: "ground", minus: sum, out, model: this.model("opamp") },
    );
    this.resistor(sum, "ground", 1e8, 1e11);
    this.junctions += 2;
    this.heard.push(out);
  }

  /** An inverting amplifier that two diodes limit. */
  private addLimiter(): void {
    const [sum, out] = [this.net(), this.net()];
    this.resistor(this.source(), sum, 1e3, 1e6);
    this.resistor(sum, out, 1e4, 1e7);
    this.elements.push(
      { kind: "diode", anode: sum, cathode: out, model: this.model("diode") },
      { kind: "diode", anode: out, cathode: sum, model: this.model("diode") },
      { kind: "opamp", plus: "ground", minus: sum, out, model: this.model("opamp") },
    );
    this.junctions += 2;
    this.heard.push(out);
  }

  /** A mirror fed by a current from the positive supply. */
  private addMirror(): void {
    const { stream } = this;
    const [input, out, e] = [this.net(), this.net(), this.net()];
    const supply = this.supplies[1]!;
    this.elements.push(
      { kind: "current", left: supply, right: input, amperes: stream.decades(1e-9, 3e-3) },
      { kind: "transistor", c: input, b: input, e: "ground", model: this.model("npn") },
      { kind: "transistor", c: out, b: input, e, model: this.model("npn") },
    );
    this.resistor(e, "ground", 1, 1e4);
    this.resistor(supply, out, 100, 1e6);
    this.resistor(input, "ground", 1e6, 1e10);
    this.junctions += 4;
    this.heard.push(out, input);
  }

  /** A pair of transistors with a common emitter current, one base driven. */
  private addPair(): void {
    const { stream } = this;
    const [c1, c2, b, e] = [this.net(), this.net(), this.net(), this.net()];
    const supply = this.supplies[1]!;
    this.elements.push(
      { kind: "transistor", c: c1, b, e, model: this.model("npn") },
      { kind: "transistor", c: c2, b: "ground", e, model: this.model("npn") },
      { kind: "current", left: e, right: "ground", amperes: stream.decades(1e-8, 3e-3) },
    );
    this.resistor(supply, c1, 100, 1e5);
    this.resistor(supply, c2, 100, 1e5);
    this.resistor(e, "ground", 1e6, 1e9);
    this.resistor(b, "ground", 10, 1e4);
    this.resistor(b, this.source(), 1e3, 1e6);
    this.junctions += 4;
    this.heard.push(c1, c2);
  }

  /** A diode that an amplifier drives until its cathode follows the input: a rectifier without a drop. */
  private addFollower(): void {
    const [drive, out] = [this.net(), this.net()];
    const plus = this.source();
    this.elements.push({ kind: "diode", anode: drive, cathode: out, model: this.model("diode") });
    this.elements.push({ kind: "opamp", plus, minus: out, out: drive, model: this.model("opamp") });
    this.resistor(out, this.supplies.at(-1)!, 1e3, 1e6);
    this.resistor(drive, out, 1e5, 1e8);
    this.junctions += 1;
    this.heard.push(out);
  }

  /** Diodes in series from a source to ground; a leak at each net holds it where they block. */
  private addDiodes(most: number): void {
    let net = this.net();
    this.resistor(this.source(), net, 100, 1e7);
    for (let k = this.stream.whole(1, Math.min(4, most)); k > 0; k--) {
      const cathode = k === 1 ? "ground" : this.net();
      this.elements.push({ kind: "diode", anode: net, cathode, model: this.model("diode") });
      this.resistor(net, "ground", 1e8, 1e12);
      this.heard.push(net);
      this.junctions += 1;
      net = cathode;
    }
  }
}

const NO_NETS: ReadonlySet<string> = new Set(["kind", "model", "shape", "of"]);

function netsOf(element: RandomElement): string[] {
  return Object.entries(element).flatMap(([key, value]) =>
    typeof value === "string" && !NO_NETS.has(key) ? [value] : [],
  );
}
