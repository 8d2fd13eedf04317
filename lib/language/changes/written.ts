import { formatAxis, formatQuantity, unitOf } from "@/lib/units/quantity";
import type { Design, NamedValue, Relation, Signal, Sweep, Tolerance, Typed, Window } from "../ast";

/* Parts of a design in the words of the language, with every digit that tells two of them apart. */

/** Names whose values are points on the temperature scale, read in °C. */
const AMBIENT: ReadonlySet<string> = new Set(["temperature", "T0"]);

const BINDING: Readonly<Record<string, number>> = { "+": 2, "-": 2, "*": 3, "/": 3, "^": 5 };

/** A number in its unit, in as few digits as give it back. `name` is what it is the value of. */
export function writeNumber(value: number, unit: string, name = ""): string {
  if (unit === "K" && AMBIENT.has(name.slice(name.lastIndexOf(".") + 1))) {
    return formatAxis(Number((value - 273.15).toPrecision(12)), "°C");
  }
  // A change with temperature is read and written in millionths.
  if (unit === "1/K") return writeNumber(Number((1e6 * value).toPrecision(15)), "ppm/K");
  const short = Number(value.toPrecision(6));
  // Beyond six digits the short form would call two values one.
  return short === value ? formatAxis(value, unit) : trimmed(formatQuantity(value, unit, 15));
}

/** A number without the zeros at its end. */
function trimmed(text: string): string {
  const [, whole, digits, unit] =
    /^([^.]*)\.([\d\u202f]*?)[0\u202f]*((?:\u202f[^\d\u202f].*)?)$/u.exec(text) ?? [];
  if (whole === undefined) return text;
  return digits === "" ? `${whole}${unit}` : `${whole}.${digits}${unit}`;
}

/** Writes the parts of one design. */
export class Writing {
  private readonly units: ReadonlyMap<string, string>;

  constructor({ knobs }: Pick<Design, "knobs">) {
    this.units = new Map(knobs.map(({ name, value }) => [name, unitOf(value.dimension)]));
  }

  /** An expression, with brackets only where they are needed; `name` is what it is the value of. */
  typed(typed: Typed, name = ""): string {
    return this.within(typed, 0, name);
  }

  private within(typed: Typed, around: number, name: string): string {
    switch (typed.op) {
      case "constant":
        return writeNumber(typed.value, unitOf(typed.dimension), name);
      case "knob":
      case "let":
      case "trace":
      case "reading":
        return typed.name;
      case "thermal voltage":
        return "V_T";
      case "signal":
        return writeSignal(typed.signal);
      case "negate":
        return bracketed(`-${this.within(typed.operand, 4, name)}`, around > 3);
      case "call":
        return `${typed.callee}(${typed.args.map((arg) => this.typed(arg)).join(", ")})`;
      case "reduce": {
        const { reduction, args, at } = typed;
        const bound = at === null ? [] : [`${at.knob} = ${this.ofKnob(at.knob, at.value)}`];
        return `${reduction}(${[...args.map((arg) => this.typed(arg)), ...bound].join(", ")})`;
      }
      default: {
        const own = BINDING[typed.op] ?? 1;
        const left = this.within(typed.left, typed.op === "^" ? own + 1 : own, "");
        const right = this.within(typed.right, typed.op === "^" ? own : own + 1, "");
        return bracketed(`${left} ${typed.op} ${right}`, own < around);
      }
    }
  }

  /** A value of a knob. */
  ofKnob(knob: string, value: number): string {
    return writeNumber(value, this.units.get(knob) ?? "1", knob);
  }

  /** A value with its tolerance. */
  value({ name, value, tolerance }: NamedValue): string {
    const around = writeTolerance(tolerance, unitOf(value.dimension));
    return around === "" ? this.typed(value, name) : `${this.typed(value, name)} ${around}`;
  }

  /** ` for I in 1 nA .. 1 mA at temperature = 25 °C`, with a blank ahead. */
  windows(windows: readonly Window[]): string {
    return windows
      .map(({ knob, low, high }) =>
        low === high
          ? ` at ${knob} = ${this.ofKnob(knob, low)}`
          : ` for ${knob} in ${this.ofKnob(knob, low)} .. ${this.ofKnob(knob, high)}`,
      )
      .join("");
  }

  /** `<= 0.5 mV`, `within 1 V ± 0.5 %`, `between A and B`, `rising`. */
  relation(relation: Relation): string {
    switch (relation.kind) {
      case "compare":
        return `${relation.operator} ${this.typed(relation.bound)}`;
      case "within": {
        const { target, half, relative } = relation;
        const isShare = relative && half.op === "constant";
        return `within ${this.typed(target)} ± ${isShare ? writeShare(half.value) : this.typed(half)}`;
      }
      case "between":
        return `between ${this.typed(relation.low)} and ${this.typed(relation.high)}`;
      default:
        return relation.kind;
    }
  }

  /** `from 1 nA to 1 mA, 20 per decade`, `over 10 °C, 25 °C, 40 °C`. */
  sweep({ knob, scale, values }: Sweep): string {
    const text = (value: number) => this.ofKnob(knob, Number(value.toPrecision(9)));
    const [first, last] = [values[0] ?? Number.NaN, values.at(-1) ?? Number.NaN];
    const ends = `from ${text(first)} to ${text(last)}`;
    if (scale === "list") {
      return values.length <= 6
        ? `over ${values.map(text).join(", ")}`
        : `over ${values.length} values ${ends}`;
    }
    if (scale === "linear") return `${ends}, ${values.length} points`;
    const perDecade = (values.length - 1) / Math.abs(Math.log10(last / first));
    return Math.abs(perDecade - Math.round(perDecade)) < 1e-6
      ? `${ends}, ${Math.round(perDecade)} per decade`
      : `${ends}, ${values.length} points on a logarithmic ruler`;
  }
}

/** `± 1 % normal 3 sigma track GROUP within 0.05 %`; empty without a tolerance. */
export function writeTolerance(tolerance: Tolerance | null, unit: string): string {
  if (tolerance === null) return "";
  const { amount, relative, law, sigmas, track } = tolerance;
  const half = (value: number, isShare: boolean) => (isShare ? writeShare(value) : writeNumber(value, unit));
  const parts = [`± ${half(amount, relative)}`];
  if (law === "normal") parts.push(`normal ${sigmas} sigma`);
  if (track !== null) parts.push(`track ${track.group} within ${half(track.within, track.relative)}`);
  return parts.join(" ");
}

/** A share as a percentage. */
export function writeShare(share: number): string {
  return writeNumber(Number((100 * share).toPrecision(12)), "%");
}

function writeSignal(signal: Signal): string {
  if (signal.of === "net") return `${signal.net}.v`;
  return signal.of === "element"
    ? `${signal.element}.${signal.quantity}`
    : `${signal.element}.${signal.pin}.i`;
}

function bracketed(text: string, isNeeded: boolean): string {
  return isNeeded ? `(${text})` : text;
}
