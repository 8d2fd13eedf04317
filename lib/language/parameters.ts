import { formatQuantity } from "@/lib/units/quantity";
import type { NamedValue } from "./ast";
import type { ParameterKind } from "./kinds";
import { nearest } from "./nearest";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import type { Report } from "./report";
import type { Setting, Word } from "./syntax";
import { quote } from "./token";

/** What parameters belong to: "the npn `array`", the model that it follows, its name, and whether all of it could be read. */
export interface Owner {
  readonly text: string;
  readonly model: string | null;
  readonly name: Word;
  readonly isWhole: boolean;
  /** Pins of its kind, none for a model. */
  readonly pins: readonly string[];
}

/** Names that parameters go by on data sheets. */
const KNOWN_ELSEWHERE: Readonly<Record<string, string>> = {
  beta: "beta_f",
  hFE: "beta_f",
  Vos: "offset",
  Ib: "bias",
  Rb: "R_base",
  Re: "R_emitter",
  Rc: "R_collector",
};

/** Checks `parameter = value` of models and elements against kinds.ts. */
export class Parameters {
  constructor(
    private readonly quantities: Quantities,
    private readonly nominal: Nominal,
    private readonly report: Report,
  ) {}

  /** The parameters given, each where it can be used. `isWhole` says that what is missing was not merely unreadable. */
  of(
    settings: readonly Setting[],
    known: Readonly<Record<string, ParameterKind>>,
    owner: Owner,
  ): Map<string, NamedValue> {
    const params = new Map<string, NamedValue>();
    if (settings.length === 0 && Object.keys(known).length === 0) return params;
    const seen = new Set<string>();
    for (const { name, value, tolerance, from, to } of settings) {
      if (name.text === "") continue;
      if (!Object.hasOwn(known, name.text)) {
        this.unknown(name, Object.keys(known), owner);
        continue;
      }
      if (seen.has(name.text)) {
        this.report.error("NAM8", name, `${quote(name.text)} is given twice; remove one of the two.`);
        continue;
      }
      seen.add(name.text);
      const shape = known[name.text]!;
      const typed = this.quantities.fitting(value, {
        ...shape,
        what: `The parameter ${quote(name.text)} of ${owner.text}`,
      });
      if (typed === null) continue;
      const number = this.nominal.of(typed);
      if (this.quantities.finite(number, value) && !inBounds(number, shape))
        this.outOfBounds(name.text, value, shape);
      params.set(name.text, {
        name: name.text,
        value: typed,
        tolerance: this.quantities.tolerance(tolerance, typed),
        from,
        to,
      });
    }
    this.checkTogether(settings, known, owner);
    this.checkOrder(params, "out_low", "out_high");
    return params;
  }

  /** Two parameters of which the first must be below the second. */
  private checkOrder(params: ReadonlyMap<string, NamedValue>, low: string, high: string): void {
    const [below, above] = [params.get(low), params.get(high)];
    if (below === undefined || above === undefined) return;
    if (!(this.nominal.of(below.value) >= this.nominal.of(above.value))) return;
    this.report.error("UNI8", above, `${quote(high)} must be above ${quote(low)}.`);
  }

  private outOfBounds(name: string, value: Setting["value"], shape: ParameterKind): void {
    const unit = shape.unit === "°C" ? "K" : shape.unit;
    const low =
      shape.low === undefined
        ? null
        : `${shape.open ? "above" : "at least"} ${formatQuantity(shape.low, unit)}`;
    const high =
      shape.high === undefined
        ? null
        : `${shape.open ? "below" : "at most"} ${formatQuantity(shape.high, unit)}`;
    const bounds = [low, high].filter((bound) => bound !== null).join(" and ");
    this.report.error("UNI8", value, `The parameter ${quote(name)} (${shape.about}) must be ${bounds}.`);
  }

  private unknown(name: Setting["name"], known: readonly string[], { text, model, pins }: Owner): void {
    const start = `${text[0]!.toUpperCase()}${text.slice(1)} has no pin or parameter ${quote(name.text)}`;
    const list = known.length === 0 ? "it takes no parameters" : `its parameters are ${known.join(", ")}`;
    const others = model === null ? list : `parameters are given in the model ${quote(model)}`;
    const otherwise = pins.length === 0 ? others : `its pins are ${pins.join(", ")}, and ${others}`;
    const alias = Object.hasOwn(KNOWN_ELSEWHERE, name.text) ? KNOWN_ELSEWHERE[name.text]! : "";
    const search = () => (known.includes(alias) ? alias : nearest(name.text, [...pins, ...known]));
    this.report.propose("NAM6", name, start, search, otherwise);
  }

  /** Parameters that must be given, and those that mean nothing without another. */
  private checkTogether(
    settings: readonly Setting[],
    known: Readonly<Record<string, ParameterKind>>,
    owner: Owner,
  ): void {
    const given = new Map(settings.map((setting) => [setting.name.text, setting.name]));
    for (const [key, { needs }] of Object.entries(known)) {
      const word = given.get(key);
      if (word === undefined || needs === undefined || given.has(needs)) continue;
      const message = `${quote(key)} means nothing without ${quote(needs)} (${known[needs]!.about}); give that too.`;
      this.report.error("FRM14", word, message);
    }
    const missing = Object.keys(known).find((key) => known[key]!.absent === null && !given.has(key));
    if (missing === undefined || !owner.isWhole) return;
    const { unit, about } = known[missing]!;
    const example = unit === "1" ? "10" : `1 f${unit}`;
    const { text, name } = owner;
    const message = `${text[0]!.toUpperCase()}${text.slice(1)} lacks ${quote(missing)} (${about}); give it as \`${missing} = ${example}\` or what it is.`;
    this.report.error("NAM6", name, message);
  }
}

function inBounds(number: number, { low, high, open }: ParameterKind): boolean {
  if (low !== undefined && (open ? number <= low : number < low)) return false;
  return !(high !== undefined && (open ? number >= high : number > high));
}
