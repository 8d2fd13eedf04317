import { AMPERE, VOLT } from "@/lib/units/dimension";
import type { Element, Typed } from "./ast";
import { removal } from "./diagnostic";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import type { Report } from "./report";
import { hasSignals } from "./signals-of";
import type { Setting } from "./syntax";
import { quote } from "./token";
import type { Wired } from "./wired";

const QUANTITIES = {
  volts: { dimension: VOLT, unit: "V" },
  amps: { dimension: AMPERE, unit: "A" },
} as const;

type Quantity = keyof typeof QUANTITIES;

/** Checks what a law says: one of `volts` and `amps`, an expression that may use signals. */
export class LawCheck {
  constructor(
    private readonly quantities: Quantities,
    private readonly nominal: Nominal,
    private readonly report: Report,
  ) {}

  of({ name, settings, isWhole }: Wired): Element["law"] {
    const said = settings.filter((setting) => isQuantity(setting.name.text));
    const [first, second] = said;
    if (first === undefined) {
      const message = `The law ${quote(name.text)} says nothing; give it \`volts = …\` or \`amps = …\`.`;
      if (isWhole) this.report.error("FRM3", name, message);
      return null;
    }
    if (second !== undefined) {
      const twice = first.name.text === second.name.text;
      const message = `A law has one of \`volts\` and \`amps\`, and ${twice ? "it once" : "not both"}; remove one.`;
      this.report.error("NAM8", second.name, message);
    }
    return this.law(first, first.name.text as Quantity, name.text);
  }

  /** Settings that are no part of a law; it takes none. */
  others(settings: readonly Setting[]): Setting[] {
    return settings.filter((setting) => !isQuantity(setting.name.text));
  }

  private law({ value, tolerance }: Setting, quantity: Quantity, owner: string): Element["law"] {
    if (tolerance !== null) {
      const message = "A law takes no tolerance; give it to a value that the law uses.";
      this.report.error("UNI10", tolerance, message, removal(tolerance));
    }
    const want = { ...QUANTITIES[quantity], what: `${quote(quantity)} of the law ${quote(owner)}` };
    const typed = this.quantities.fitting(value, want, true);
    if (typed === null) return null;
    if (!hasSignals(typed)) this.quantities.finite(this.nominal.of(typed), value);
    return { quantity, value: powersApart(typed) };
  }
}

function isQuantity(text: string): text is Quantity {
  return text === "volts" || text === "amps";
}

/** Writes the power of an element as its voltage times its current, so that only those two are left to be solved for. */
function powersApart(typed: Typed): Typed {
  switch (typed.op) {
    case "signal": {
      const { signal } = typed;
      if (signal.of !== "element" || signal.quantity !== "p") return typed;
      return {
        op: "*",
        left: { op: "signal", signal: { ...signal, quantity: "v" }, dimension: VOLT },
        right: { op: "signal", signal: { ...signal, quantity: "i" }, dimension: AMPERE },
        dimension: typed.dimension,
      };
    }
    case "negate":
      return { ...typed, operand: powersApart(typed.operand) };
    case "call":
      return { ...typed, args: typed.args.map(powersApart) };
    case "constant":
    case "knob":
    case "let":
    case "thermal voltage":
    case "trace":
    case "reading":
    case "reduce":
      return typed;
    default:
      return { ...typed, left: powersApart(typed.left), right: powersApart(typed.right) };
  }
}
