import type { ElementKind, ModelKind } from "./ast";
import { removal } from "./diagnostic";
import type { Flat } from "./expand";
import { KINDS, MODEL_KINDS } from "./kinds";
import { Names, ownName } from "./names";
import { ZERO } from "./part-parser";
import type { Report } from "./report";
import type { Span } from "./span";
import type { Expression, Setting, Statement, ToleranceSyntax, Word } from "./syntax";
import { quote } from "./token";

/** An element whose kind and nets are known and whose values are not yet checked. */
export interface Wired extends Span {
  readonly name: Word;
  readonly kind: ElementKind;
  readonly model: string | null;
  readonly pins: Readonly<Record<string, string>>;
  readonly value: Expression | null;
  readonly tolerance: ToleranceSyntax | null;
  /** Parameters beyond the value. */
  readonly settings: readonly Setting[];
  /** Whether all of its statement could be read. */
  readonly isWhole: boolean;
}

const SPOKEN = Object.keys(KINDS);

type Followed = { readonly kind: ElementKind; readonly model: string | null };

/** Resolves the kind of every element and notes the nets it is wired to. */
export class Wirer {
  readonly wired: Wired[] = [];

  constructor(
    private readonly names: Names,
    /** Kind of each model whose statement is sound. */
    private readonly models: ReadonlyMap<string, ModelKind>,
    private readonly report: Report,
  ) {}

  wire(statements: readonly Flat[]): Wired[] {
    for (const statement of statements) {
      if (statement.kind === "path") this.path(statement);
      else if (statement.kind === "device") this.device(statement);
      else if (statement.kind === "instance")
        for (const { net } of statement.ports) this.names.mentionNet(net);
    }
    return this.wired;
  }

  private path(statement: Extract<Statement, { kind: "path" }>): void {
    for (const net of statement.nets) this.names.mentionNet(net);
    statement.parts.forEach((part, i) => {
      const followed = this.follow(part.kind);
      if (followed === null) return;
      const { kind } = followed;
      const pins = KINDS[kind].pins;
      if (pins.length !== 2) {
        const example = `${part.name.text || "Q1"} : ${part.kind.text} { ${pins.map((pin) => `${pin} = …`).join(", ")} }`;
        const message = `${quote(part.kind.text)} has ${pins.length} pins and cannot stand on a path; write ${quote(example)}.`;
        this.report.error("FRM11", part, message);
        return;
      }
      const model = followed.model ?? this.modelAfter(kind, part.value);
      if (KINDS[kind].follows === "model" && model === null) {
        if (part.value === null) this.wantModel(part.kind, kind);
        return;
      }
      if (kind === "law" && part.value !== null && part.value.kind !== "hole") {
        const message = "A law has its expression in braces; write it as `law { volts = … }`.";
        this.report.error("FRM11", part.value, message);
      }
      if (followed.model !== null && part.value !== null) {
        const message = `${quote(part.kind.text)} is a model, and what follows a model takes no value here; remove it.`;
        this.report.error("FRM11", part.value, message);
      }
      if (KINDS[kind].value === null && part.tolerance !== null) {
        this.report.error(
          "UNI10",
          part.tolerance,
          "This element has no value of its own, so it takes no tolerance; give it to what it follows.",
        );
      }
      this.add(
        part.name,
        { kind, model },
        { [pins[0]!]: statement.nets[i]!, [pins[1]!]: statement.nets[i + 1]! },
        {
          value: KINDS[kind].value === null ? null : part.value,
          tolerance: part.tolerance,
          settings: part.settings,
          isWhole: statement.whole,
          from: part.from,
          to: part.to,
        },
      );
    });
  }

  private device(statement: Extract<Statement, { kind: "device" }>): void {
    const followed = this.follow(statement.of);
    if (followed === null) {
      // The nets are noted all the same, so that signals on them stay quiet.
      for (const setting of statement.settings) {
        const net = plainName(setting.value);
        if (net !== null && this.names.meaningOf(net.text) === null) this.names.mentionNet(net);
      }
      return;
    }
    const { kind, model } = followed;
    if (KINDS[kind].follows === "model" && model === null) {
      this.wantModel(statement.of, kind);
      return;
    }
    const pins: Record<string, Word> = {};
    const settings: Setting[] = [];
    let value: Setting | null = null;
    const seen = new Set<string>();
    for (const setting of statement.settings) {
      if (!this.isNew(setting.name, seen)) continue;
      if (KINDS[kind].pins.includes(setting.name.text)) this.pin(setting, pins);
      else if (setting.name.text === "value" && KINDS[kind].value !== null) value = setting;
      else settings.push(setting);
    }
    const misnamed = this.misnamed(kind, settings, seen);
    if (misnamed !== null) {
      settings.splice(settings.indexOf(misnamed.setting), 1);
      seen.add(misnamed.pin);
      this.pin({ ...misnamed.setting, name: { ...misnamed.setting.name, text: misnamed.pin } }, pins);
    }
    const open = KINDS[kind].pins.filter((pin) => !seen.has(pin));
    if (open.length > 0 && statement.whole) {
      const which = open.length === 1 ? `pin ${quote(open[0]!)}` : `pins ${open.map(quote).join(", ")}`;
      const message = `The ${which} of ${quote(statement.name.text)} ${open.length === 1 ? "is" : "are"} left open; connect ${open.length === 1 ? "it" : "them"}: \`${open[0]} = net\`.`;
      this.report.error("WIR5", statement.name, message);
    }
    if (open.length > 0 && !statement.whole) return;
    const { from, to, whole: isWhole } = statement;
    this.add(statement.name, followed, pins, {
      value: value?.value ?? null,
      tolerance: value?.tolerance ?? null,
      settings,
      isWhole,
      from,
      to,
    });
  }

  private add(
    name: Word,
    { kind, model }: Followed,
    nets: Readonly<Record<string, Word>>,
    rest: Span & Pick<Wired, "value" | "tolerance" | "settings" | "isWhole">,
  ): void {
    if (this.names.meaningOf(name.text) !== "element" || this.names.placeOf(name.text).from !== name.from)
      return;
    this.names.setKind(name.text, kind);
    const pins: Record<string, string> = {};
    for (const [pin, net] of Object.entries(nets)) {
      pins[pin] = net.text;
      for (const port of net.through ?? []) this.names.feed(port, { element: name.text, pin });
    }
    this.wired.push({ name, kind, model, pins, ...rest });
  }

  /** The one setting that is surely meant for the one pin that is left: it gives a net and names nothing of its kind. */
  private misnamed(
    kind: ElementKind,
    settings: readonly Setting[],
    seen: ReadonlySet<string>,
  ): { setting: Setting; pin: string } | null {
    const open = KINDS[kind].pins.filter((pin) => !seen.has(pin));
    const strange = settings.filter(
      ({ name, value }) => plainName(value) !== null && !Object.hasOwn(KINDS[kind].parameters, name.text),
    );
    const [setting, pin] = [strange[0], open[0]];
    if (setting === undefined || pin === undefined || strange.length > 1 || open.length > 1) return null;
    const { text, from, to } = setting.name;
    const pins = KINDS[kind].pins.join(", ");
    const message = `${article(kind)} ${kind} has no pin ${quote(text)}, and its pin ${quote(pin)} is open; its pins are ${pins}.`;
    this.report.error("WIR5", setting.name, message, { title: `Change to ${pin}`, from, to, text: pin });
    return { setting, pin };
  }

  private pin(setting: Setting, pins: Record<string, Word>): void {
    const net = plainName(setting.value);
    if (net === null) {
      if (setting.value.kind === "hole") return;
      if (setting.value.kind === "number" && setting.value.value === 0 && setting.value.unit === null) {
        const { from, to } = setting.value;
        this.report.error("FRM10", { from, to }, ZERO, {
          title: "Change to ground",
          from,
          to,
          text: "ground",
        });
        return;
      }
      const message = `The pin ${quote(setting.name.text)} wants the name of a net, as in \`${setting.name.text} = out\`.`;
      this.report.error("FRM10", setting.value, message);
      return;
    }
    if (setting.tolerance !== null) {
      this.report.error(
        "UNI10",
        setting.tolerance,
        "A pin takes no tolerance; remove it.",
        removal(setting.tolerance),
      );
    }
    this.names.mentionNet(net);
    pins[setting.name.text] = net;
  }

  private isNew(name: Word, seen: Set<string>): boolean {
    if (seen.has(name.text)) {
      this.report.error("NAM8", name, `${quote(name.text)} is given twice; remove one of the two.`);
      return false;
    }
    seen.add(name.text);
    return true;
  }

  /** The kind that the word after `:` names, or that of the model it names. */
  private follow(word: Word): Followed | null {
    if (word.text === "") return null;
    if (Object.hasOwn(KINDS, word.text)) return { kind: word.text as ElementKind, model: null };
    const kind = this.models.get(word.text);
    if (kind !== undefined) return { kind, model: word.text };
    this.unknownKind(word);
    return null;
  }

  private unknownKind(word: Word): void {
    const meaning = this.names.meaningOf(word.text);
    if (meaning === "model" || meaning === "unread") return;
    if (meaning === null && this.names.isIncomplete) return;
    if (meaning === "block") {
      const message = `${quote(ownName(word))} is a block, and its nets go by name; write it as \`X : ${ownName(word)} { net = …, … }\`.`;
      this.report.error("FRM11", word, message);
    } else if (meaning !== null) {
      const message = `${quote(ownName(word))} is ${Names.describe(meaning)}, and a kind or model is wanted after \`:\`.`;
      this.report.error("NAM5", word, message);
    } else {
      const search = () => this.near(word);
      const all = `the kinds are ${SPOKEN.join(", ")}`;
      this.report.propose("NAM5", word, `No kind or model is called ${quote(ownName(word))}`, search, all);
    }
  }

  /** The kind, model or block that was probably meant. */
  private near(word: Word): string | null {
    const seen = this.names.namesSeen(["model", "block"], word.prefix ?? "");
    return this.names.near(ownName(word), [...SPOKEN, ...seen]);
  }

  /** `diode junction` on a path: the model named where other kinds have their value. */
  private modelAfter(kind: ElementKind, value: Expression | null): string | null {
    if (KINDS[kind].follows !== "model" || value === null || value.kind === "hole") return null;
    const word = plainName(value);
    const of = word === null ? undefined : this.models.get(word.text);
    if (of === kind) return word!.text;
    if (word === null || of !== undefined || this.names.meaningOf(word.text) !== "model") {
      if (word !== null && this.names.meaningOf(word.text) === null) this.names.unknown(word, ["model"]);
      else if (word === null || this.names.meaningOf(word.text) !== "unread") {
        this.report.error(
          "FRM11",
          value,
          `${article(kind)} ${kind} follows a model of its kind; declare one with \`model M : ${kind} { … }\` and name it here.`,
        );
      }
    }
    return null;
  }

  private wantModel(word: Word, kind: ElementKind): void {
    const sketch = MODEL_KINDS.includes(kind as ModelKind) ? `model M : ${kind} { … }` : kind;
    const message = `${article(kind)} ${kind} follows a model; declare one with ${quote(sketch)} and write its name in place of ${quote(word.text)}.`;
    this.report.error("FRM11", word, message);
  }
}

function plainName(expression: Expression): Word | null {
  return expression.kind === "name" && expression.path.length === 1 ? expression.path[0]! : null;
}

function article(kind: ElementKind): string {
  return kind === "npn" || kind === "opamp" ? "An" : "A";
}
