import type { Element, Model, ModelKind, NamedValue } from "./ast";
import type { Flat } from "./expand";
import { KINDS, MODEL_KINDS } from "./kinds";
import { LawCheck } from "./law-check";
import type { Names } from "./names";
import { nearest } from "./nearest";
import type { Nominal } from "./nominal";
import { Parameters } from "./parameters";
import type { Quantities } from "./quantities";
import type { Report } from "./report";
import type { Statement } from "./syntax";
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

/** Checks models and elements against kinds.ts. */
export class ElementCheck {
  private readonly parameters: Parameters;
  private readonly laws: LawCheck;

  constructor(
    private readonly quantities: Quantities,
    private readonly nominal: Nominal,
    private readonly report: Report,
  ) {
    this.parameters = new Parameters(quantities, nominal, report);
    this.laws = new LawCheck(quantities, nominal, report);
  }

  models(statements: readonly Flat[], kinds: ReadonlyMap<string, ModelKind>): Model[] {
    return statements.flatMap((statement) => {
      if (statement.kind !== "model") return [];
      const kind = kinds.get(statement.name.text);
      return kind === undefined || kind !== statement.of.text ? [] : [this.model(statement, kind)];
    });
  }

  private model(statement: ModelStatement, kind: ModelKind): Model {
    const { name, settings, whole, from, to } = statement;
    const owner = { text: `the ${kind} ${quote(name.text)}`, model: null, name, isWhole: whole, pins: [] };
    const params = this.parameters.of(settings, KINDS[kind].parameters, owner);
    return { name: name.text, kind, params, from, to };
  }

  element(wired: Wired): Element {
    const { kind, model, pins, name, isWhole, from, to } = wired;
    const { follows, parameters } = KINDS[kind];
    const owner = {
      // Words for a message that is seldom needed are put together when it is.
      get text() {
        return `the ${kind} ${quote(name.text)}`;
      },
      model,
      name,
      isWhole,
      pins: KINDS[kind].pins,
    };
    const law = follows === "law" ? this.laws.of(wired) : null;
    const settings = follows === "law" ? this.laws.others(wired.settings) : wired.settings;
    const params = this.parameters.of(settings, model === null ? parameters : {}, owner);
    return { name: name.text, kind, pins, value: this.value(wired), model, params, law, from, to };
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
    const want = {
      dimension: shape.dimension,
      unit: shape.unit,
      get what() {
        return `The value of the ${wired.kind} ${quote(name)}`;
      },
    };
    const typed = this.quantities.fitting(wired.value, want);
    if (typed === null) return null;
    const number = this.nominal.of(typed);
    if (this.quantities.finite(number, wired.value) && wired.kind === "resistor" && number <= 0) {
      this.report.error(
        "UNI8",
        wired.value,
        `${want.what} must be above 0 Ω; to join two nets give them one name.`,
      );
    }
    const tolerance = this.quantities.tolerance(wired.tolerance, typed);
    return { name: "value", value: typed, tolerance, from: wired.value.from, to: wired.value.to };
  }
}
