import type { RandomCircuit } from "./circuit";
import { Maker } from "./generate";
import { OTHER_SHAPES, OWN_SHAPES } from "./laws";

/**
 * A random circuit as those of generate.ts, in which every device has most of its terms: amplifiers with limits and output resistance,
 * diodes that break down or are lit, transistors with leakage, knee and terminal resistances, resistors with drift, gains and laws.
 */
export function fullCircuit(seed: number): RandomCircuit {
  return new FullMaker(seed).make();
}

class FullMaker extends Maker {
  /** Not "sharp": without a resistance it could tie two supplies together. */
  private readonly diodes = ["d", "zener", "lit"] as const;

  /** `value` half of the time, else nothing. */
  private perhaps(value: number): number {
    return this.stream.chance(0.6) ? value : 0;
  }

  protected override addModels(): void {
    super.addModels();
    const { stream, models } = this;
    const plain = models.d as Extract<RandomCircuit["models"][string], { kind: "diode" }>;
    models.zener = {
      ...plain,
      Rs: stream.pick([2, 10, 50]),
      V_breakdown: stream.between(2, 9),
      I_breakdown: stream.decades(1e-6, 1e-2),
      n_breakdown: stream.between(1, 6),
    };
    models.sharp = { ...models.zener, Rs: 0 };
    models.lit = { ...plain, Rs: stream.pick([0, 1, 100]), photocurrent: stream.decades(1e-11, 1e-2) };
    for (const kind of ["npn", "pnp"] as const) {
      const { kind: _, ...terms } = models[`q_${kind}`] as Extract<
        RandomCircuit["models"][string],
        { kind: "npn" | "pnp" }
      >;
      const [leakE, leakC] = [
        this.perhaps(stream.decades(1e-16, 1e-11)),
        this.perhaps(stream.decades(1e-15, 1e-11)),
      ];
      models[`q_${kind}`] = {
        kind,
        ...terms,
        Va_r: this.perhaps(stream.between(5, 40)),
        beta_power: this.perhaps(stream.between(0.5, 2)),
        I_leak_e: leakE,
        n_leak_e: leakE && stream.between(1.3, 2.2),
        I_leak_c: leakC,
        n_leak_c: leakC && stream.between(1.3, 2.2),
        I_knee_f: this.perhaps(stream.decades(1e-4, 1e-1)),
        I_knee_r: this.perhaps(stream.decades(1e-6, 1e-2)),
        R_base: this.perhaps(stream.decades(1, 500)),
        R_emitter: this.perhaps(stream.decades(0.1, 5)),
        R_collector: this.perhaps(stream.decades(1, 50)),
      };
    }
    const limited = {
      kind: "opamp",
      gain: stream.pick([1e4, 2e5, 1e7]),
      offset: stream.pick([0, 1e-4, -2e-3]),
      offset_drift: stream.pick([0, 2e-6, -1e-5]),
      bias: this.bias,
      bias_offset: this.bias / 4,
      R_out: stream.pick([0, 50, 300]),
    } as const;
    models.swing = { ...limited, out_low: -stream.between(2, 14), out_high: stream.between(2, 14) };
    models.single = { ...limited, out_low: 0.02, out_high: stream.between(2, 5) };
    this.bias += this.bias / 8;
  }

  protected override model(of: "diode" | "npn" | "pnp" | "opamp"): string {
    if (of === "diode") return this.stream.pick(this.diodes);
    return of === "opamp" ? this.stream.pick(["swing", "swing", "amp"]) : super.model(of);
  }

  protected override resistor(left: string, right: string, low: number, high: number): void {
    super.resistor(left, right, low, high);
    const last = this.elements.at(-1)!;
    if (last.kind !== "resistor" || this.stream.chance(0.7)) return;
    this.elements[this.elements.length - 1] = { ...last, drift: this.stream.between(-4e-4, 4e-3) };
  }

  protected override addStage(left: number): void {
    const stage = this.stream.next();
    if (stage < 0.6) super.addStage(left);
    else if (stage < 0.66) this.addStabiliser();
    else if (stage < 0.72) this.addLightMeter();
    else if (stage < 0.8) this.addComparator();
    else if (stage < 0.9) this.addOwnLaw();
    else if (stage < 0.96) this.addOtherLaw();
    else this.addGain();
  }

  /** A resistor that feeds a diode backwards, with a load. */
  private addStabiliser(): void {
    const { stream } = this;
    const k = this.net();
    this.resistor(this.source(), k, 100, 1e5);
    this.resistor(k, "ground", 1e3, 1e6);
    this.elements.push({
      kind: "diode",
      anode: "ground",
      cathode: k,
      model: stream.pick(["zener", "sharp"]),
    });
    this.junctions += 1;
    this.heard.push(k);
  }

  /** The current of a lit diode, made a voltage by an amplifier. */
  private addLightMeter(): void {
    const [sum, out] = [this.net(), this.net()];
    const model = this.model("opamp");
    // Nothing but an amplifier's own limits would hold back the current of a diode from a positive supply.
    const anode = this.stream.pick(["ground", this.supplies[2] ?? "ground"]);
    this.resistor(sum, out, 1e2, 1e9);
    this.elements.push(
      { kind: "diode", anode, cathode: sum, model: "lit" },
      { kind: "opamp", plus: "ground", minus: sum, out, model },
    );
    this.junctions += 1;
    this.heard.push(out);
  }

  /** An amplifier between its limits, or at one, whose output is fed back to the side that lets it stay there, or not at all. */
  private addComparator(): void {
    const { stream } = this;
    const [plus, out, low] = [this.net(), this.net(), this.net()];
    this.resistor(this.source(), plus, 1e3, 1e5);
    this.resistor(plus, "ground", 1e3, 1e6);
    if (stream.chance(0.5)) this.resistor(out, plus, 1e5, 1e8);
    this.resistor(out, low, 1e3, 1e5);
    const minus = stream.pick(["ground", ...this.heard]);
    this.elements.push(
      { kind: "opamp", plus, minus, out, model: stream.pick(["swing", "single"]) },
      { kind: "diode", anode: low, cathode: "ground", model: this.model("diode") },
    );
    this.junctions += 1;
    this.heard.push(low, out);
  }

  /** A law of amperes that takes what a resistor brings. */
  private addOwnLaw(): void {
    const { stream } = this;
    const [a, out] = [this.net(), this.net()];
    this.resistor(this.source(), a, 1e2, 1e6);
    this.resistor(a, "ground", 1e5, 1e9);
    const fed = `R${this.elements.length - 2}`;
    this.elements.push({
      ...{ kind: "law", plus: a, minus: "ground", shape: stream.pick(OWN_SHAPES) },
      ...{ size: stream.decades(1e-7, 1e-2), width: stream.decades(0.02, 5) },
    });
    this.resistor(out, "ground", 10, 1e4);
    const of = stream.chance(0.5) ? `L${this.elements.length - 2}` : fed;
    this.elements.push(
      stream.chance(0.7)
        ? {
            kind: "law",
            plus: "ground",
            minus: out,
            shape: "copy",
            of,
            size: stream.between(-2, 2),
            width: 1,
          }
        : {
            kind: "law",
            plus: "ground",
            minus: out,
            shape: "heat",
            of,
            size: 1,
            width: stream.between(1, 10),
          },
    );
    this.heard.push(a, out);
    this.junctions += 1;
  }

  /** A law of volts of two nets that stand before it. */
  private addOtherLaw(): void {
    const { stream } = this;
    const out = this.net();
    const nets = [...this.heard, ...this.supplies.slice(1)];
    const shape = stream.pick(OTHER_SHAPES);
    const [a, b] = [stream.pick(nets), stream.pick(nets)];
    const figures = { size: stream.between(-2, 2), width: stream.between(2, 20) };
    this.elements.push({ kind: "law", plus: out, minus: "ground", shape, a, b, ...figures });
    this.resistor(out, "ground", 1e3, 1e6);
    this.junctions += 1;
    this.heard.push(out);
  }

  private addGain(): void {
    const { stream } = this;
    const out = this.net();
    const nets = ["ground", ...this.heard, ...this.supplies.slice(1)];
    const ratio = stream.between(-3, 3);
    this.elements.push({ kind: "gain", plus: stream.pick(nets), minus: stream.pick(nets), out, ratio });
    this.resistor(out, "ground", 1e3, 1e6);
    this.heard.push(out);
    this.junctions += 1;
  }
}
