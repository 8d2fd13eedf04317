import { formatQuantity } from "@/lib/units/quantity";
import type { Element, Model, ModelKind, NamedValue } from "./ast";
import type { Flat } from "./expand";
import { KINDS, LATER_PARAMETERS, MODEL_KINDS, type ParameterKind } from "./kinds";
import type { Names } from "./names";
import { nearest } from "./nearest";
import type { Nominal } from "./nominal";
import type { Quantities } from "./quantities";
import type { Report } from "./report";
import type { Setting, Statement } from "./syntax";
import { quote } from "./token";
import type { Wired } from "./wired";

type ModelStatement = Extract<Statement, { kind: "model" }>;

/** The kind of every model whose kind is known; an unknown one is reported. */
export function modelKinds(
  statements: readonly Flat[],
  names: Names,
  report: Report,
): Map<string, ModelKind> {
  const kinds = new Map<string, ModelKind>();
  for (const statement of statements) {
    if (statement.kind !== "model" || statement.of.text === "") continue;
    const { name, of } = statement;
    if (!isModelKind(of.text)) {
      const start = Object.hasOwn(KINDS, of.text)
        ? `A ${of.text} takes no model`
        : `No model kind is called ${quote(of.text)}`;
      const search = () => nearest(of.text, MODEL_KINDS);
      report.propose("NAM5", of, start, search, "a model is a diode, npn, pnp or opamp");
    } else if (names.meaningOf(name.text) === "model" && names.placeOf(name.text).from === name.from) {
      kinds.set(name.text, of.text);
    }
  }
  return kinds;
}

function isModelKind(text: string): text is ModelKind {
  return Object.hasOwn(KINDS, text) && KINDS[text as ModelKind].follows === "model";
}

/** Checks parameters and values of models and elements against kinds.ts. */
export class ElementCheck {
  constructor(
    private readonly quantities: Quantities,
    private readonly nominal: Nominal,
    private readonly report: Report,
  ) {}

  models(statements: readonly Flat[], kinds: ReadonlyMap<string, ModelKind>): Model[] {
    return statements.flatMap((statement) => {
      if (statement.kind !== "model") return [];
      const kind = kinds.get(statement.name.text);
      return kind === undefined || kind !== statement.of.text ? [] : [this.model(statement, kind)];
    });
  }

  private model(statement: ModelStatement, kind: ModelKind): Model {
    const { parameters } = KINDS[kind];
    const owner = `the ${kind} ${quote(statement.name.text)}`;
    const later = LATER_PARAMETERS[kind] ?? [];
    const settings = statement.settings.filter(({ name }) => !this.isLater(name, later));
    const params = this.parameters(settings, parameters, owner);
    const missing = Object.keys(parameters).find(
      (key) => parameters[key]!.absent === null && !isNamed(statement.settings, key),
    );
    if (missing !== undefined && statement.whole) {
      const { unit, about } = parameters[missing]!;
      const message = `The ${kind} ${quote(statement.name.text)} lacks ${quote(missing)} (${about}); give it as \`${missing} = 1 f${unit}\` or what it is.`;
      this.report.error("NAM6", statement.name, message);
    }
    return { name: statement.name.text, kind, params, from: statement.from, to: statement.to };
  }

  element(wired: Wired): Element {
    const { kind, model, pins, from, to } = wired;
    const name = wired.name.text;
    const parameters = model === null ? KINDS[kind].parameters : {};
    const params = this.parameters(wired.settings, parameters, `the ${kind} ${quote(name)}`, model);
    return { name, kind, pins, value: this.value(wired), model, params, law: null, from, to };
  }

  /** The ohms, volts or amperes of an element that has them. */
  private value(wired: Wired): NamedValue | null {
    const shape = KINDS[wired.kind].value;
    if (shape === null) return null;
    const name = wired.name.text;
    if (wired.value === null) {
      const example = `${wired.kind} 1 ${shape.unit === "Ω" ? "kΩ" : shape.unit}`;
      const message = `The ${wired.kind} ${quote(name)} has no value; give it in ${shape.unit}, as in ${quote(example)}.`;
      this.report.error("FRM3", wired.name, message);
      return null;
    }
    const what = `The value of the ${wired.kind} ${quote(name)}`;
    const typed = this.quantities.fitting(wired.value, { ...shape, what });
    if (typed === null) return null;
    const number = this.nominal.of(typed);
    if (this.quantities.finite(number, wired.value) && wired.kind === "resistor" && number <= 0) {
      this.report.error(
        "UNI8",
        wired.value,
        `${what} must be above 0 Ω; to join two nets give them one name.`,
      );
    }
    const tolerance = this.quantities.tolerance(wired.tolerance, typed);
    return { name: "value", value: typed, tolerance, from: wired.value.from, to: wired.value.to };
  }

  private parameters(
    settings: readonly Setting[],
    known: Readonly<Record<string, ParameterKind>>,
    owner: string,
    model: string | null = null,
  ): Map<string, NamedValue> {
    const params = new Map<string, NamedValue>();
    const seen = new Set<string>();
    for (const { name, value, tolerance, from, to } of settings) {
      if (name.text === "") continue;
      if (!Object.hasOwn(known, name.text)) {
        this.unknownParameter(name, Object.keys(known), owner, model);
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
        what: `The parameter ${quote(name.text)} of ${owner}`,
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
    return params;
  }

  private isLater(name: Setting["name"], later: readonly string[]): boolean {
    if (!later.includes(name.text)) return false;
    const message = `${quote(name.text)} is not yet part of the language this server speaks; take it out.`;
    this.report.error("FRM6", name, message);
    return true;
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

  private unknownParameter(
    name: Setting["name"],
    known: readonly string[],
    owner: string,
    model: string | null,
  ): void {
    const start = `${owner[0]!.toUpperCase()}${owner.slice(1)} has no pin or parameter ${quote(name.text)}`;
    const list = known.length === 0 ? "it takes no parameters" : `its parameters are ${known.join(", ")}`;
    const otherwise = model === null ? list : `parameters are given in the model ${quote(model)}`;
    this.report.propose("NAM6", name, start, () => nearest(name.text, known), otherwise);
  }
}

function inBounds(number: number, { low, high, open }: ParameterKind): boolean {
  if (low !== undefined && (open ? number <= low : number < low)) return false;
  return !(high !== undefined && (open ? number >= high : number > high));
}

function isNamed(settings: readonly Setting[], key: string): boolean {
  return settings.some((setting) => setting.name.text === key);
}
