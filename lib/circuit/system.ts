import type { Design, Element, Signal } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import { Assembly } from "./assembly";
import type { Circuit } from "./circuit";
import { Frame, Tables } from "./frame";
import type { Bench, JunctionPart, Part } from "./part";
import { CurrentPart } from "./parts/current";
import { DiodePart } from "./parts/diode";
import { followDiodes, settleDiodes } from "./parts/diode-table";
import { GainPart } from "./parts/gain";
import { LawPart } from "./parts/law";
import { LimitedOpampPart } from "./parts/limited-opamp";
import { OpampPart } from "./parts/opamp";
import { ResistorPart } from "./parts/resistor";
import { TerminalPart } from "./parts/terminal";
import { TransistorPart } from "./parts/transistor";
import { followTransistors, settleTransistors } from "./parts/transistor-table";
import { VoltagePart } from "./parts/voltage";
import { Pattern } from "./pattern";
import { across, type State } from "./state";
import { type Draw, PointValues } from "./values";

/**
 * The modified nodal system of a design (Ho, Ruehli and Brennan, IEEE Trans. CAS 22, 1975): F(x) = G·x + s + Σ a_k·φ_k(b_kᵀx) = 0,
 * one row a net (currents leaving it, A) and one a branch law (V). It holds the figures of one point and the present unknowns.
 */
export class System {
  readonly values: PointValues;
  readonly pattern: Pattern;
  readonly state: State;
  readonly parts: readonly Part[];
  readonly junctions: readonly JunctionPart[];
  private readonly byName: ReadonlyMap<string, Part>;
  /** The parts that follow each knob. */
  private readonly followers = new Map<string, Part[]>();
  readonly frame: Frame;
  readonly assembly: Assembly;
  /** Junctions that no table settles and follows. */
  private readonly furtherJunctions: readonly JunctionPart[];

  constructor(
    design: Design,
    readonly circuit: Circuit,
  ) {
    this.values = new PointValues(design);
    this.pattern = new Pattern(circuit.size);
    const models = new Map(design.models.map((model) => [model.name, model]));
    const { pattern, values } = this;
    const tables = new Tables();
    const modelOf = ({ model }: Element) => (model === null ? null : models.get(model)!);
    const named = new Map(design.elements.map((element) => [element.name, element]));
    const elements = design.elements.map((element) =>
      partOf(element, { element, model: modelOf(element), circuit, pattern, values, tables }, named),
    );
    const terminals = [...circuit.terminals.values()].map(
      (terminal) =>
        new TerminalPart({ model: modelOf(terminal.element), circuit, pattern, values, tables }, terminal),
    );
    this.parts = [...elements, ...terminals];
    this.junctions = this.parts.filter(isJunction);
    this.byName = new Map(elements.map((part) => [part.element.name, part]));
    this.furtherJunctions = this.junctions.filter((part) => part.isPlain !== true);
    this.frame = new Frame(circuit.size, this.pattern.rows.length, tables);
    this.state = this.frame.state;
    this.assembly = new Assembly(this.parts, this.frame);
    for (const part of this.parts) {
      this.read(part);
      for (const knob of part.movers) {
        const following = this.followers.get(knob);
        if (following === undefined) this.followers.set(knob, [part]);
        else following.push(part);
      }
    }
    this.gatherConstantSlopes();
  }

  /** Turns a knob; only the parts that follow it read their figures again. */
  turn(knob: string, value: number): void {
    if (this.values.knob(knob) === value) return;
    this.values.turn(knob, value);
    const following = this.followers.get(knob);
    if (following === undefined) return;
    for (const part of following) this.read(part);
    this.gatherConstantSlopes();
  }

  /** Draws the tolerances of every part, nominal for null. */
  draw(draw: Draw | null): void {
    this.values.use(draw);
    for (const part of this.parts) this.read(part);
    this.gatherConstantSlopes();
  }

  private read(part: Part): void {
    this.values.within(part.element.name, () => part.read(this.values));
  }

  private gatherConstantSlopes(): void {
    const { constantSlopes } = this.frame;
    constantSlopes.fill(0);
    for (const part of this.parts) part.addConstantSlopes(constantSlopes);
    this.state.jacobian.set(constantSlopes);
  }

  /** Residual, scale and Jacobian at the present unknowns and linearisation. */
  assemble(): void {
    this.assembly.run();
  }

  /** As `settle` and `assemble` with less work, where further junctions are at their actual voltages already. */
  assembleAtRest(): void {
    this.assembly.runAtRest();
  }

  /** All unknowns at 0, junctions where a cold start wants them. */
  startCold(): void {
    this.state.x.fill(0);
    this.state.low.fill(0);
    for (const junction of this.junctions) junction.start();
  }

  /** Linearises every junction at its actual voltage. */
  settle(): void {
    const { state, frame } = this;
    settleDiodes(frame.tables.diodes, state);
    settleTransistors(frame.tables.transistors, state);
    this.settleFurther();
  }

  /** Those that `assembleAtRest` does not settle. */
  settleFurther(): void {
    const { furtherJunctions, state } = this;
    for (let k = 0; k < furtherJunctions.length; k++) furtherJunctions[k]!.settle(state);
  }

  /** Takes junction steps towards the actual voltages; true where all linearisation voltages equal the actual ones. */
  follow(): boolean {
    const { furtherJunctions, state, frame } = this;
    let isExact = followDiodes(frame.tables.diodes, state);
    if (!followTransistors(frame.tables.transistors, state)) isExact = false;
    for (let k = 0; k < furtherJunctions.length; k++) {
      if (!furtherJunctions[k]!.follow(state)) isExact = false;
    }
    return isExact;
  }

  /** The value of a signal at the present unknowns: V, A or W. An element's voltage is v_left − v_right. */
  signal(signal: Signal): number {
    if (signal.of === "net") return this.state.x[this.circuit.nets.get(signal.net)!]!;
    const part = this.byName.get(signal.element)!;
    if (signal.of === "pin") return part.current(signal.pin, this.state);
    const [left, right] = KINDS[part.element.kind].pins as [string, string];
    const net = (pin: string) => this.circuit.nets.get(part.element.pins[pin]!)!;
    if (signal.quantity === "i") return part.current(left, this.state);
    const drop = across(this.state, net(left), net(right));
    return signal.quantity === "v" ? drop : drop * part.current(left, this.state);
  }
}

function isJunction(part: Part): part is JunctionPart {
  return "settle" in part;
}

function partOf({ kind }: Element, bench: Bench, named: ReadonlyMap<string, Element>): Part {
  switch (kind) {
    case "resistor":
      return new ResistorPart(bench);
    case "voltage":
      return new VoltagePart(bench);
    case "current":
      return new CurrentPart(bench);
    case "diode":
      return new DiodePart(bench);
    case "npn":
    case "pnp":
      return new TransistorPart(bench);
    case "gain":
      return new GainPart(bench);
    case "law":
      return new LawPart(bench, named);
    case "opamp": {
      const { params } = bench.model!;
      return params.has("out_low") || params.has("out_high")
        ? new LimitedOpampPart(bench)
        : new OpampPart(bench);
    }
  }
}
