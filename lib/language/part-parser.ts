import type { Cursor } from "./cursor";
import type { ExpressionParser } from "./expression-parser";
import type { Span } from "./span";
import type { PathPart, Setting, StatementForm, ToleranceSyntax, Word } from "./syntax";
import { quote } from "./token";

export const ZERO = "A net is called by a name, and the one that voltages are counted from is `ground`.";

/** What may follow the kind of a part that has no value. */
const BEHIND_KIND: ReadonlySet<string> = new Set(["--", "±", "{", ","]);

/** Reads what is wired: paths, devices, models, and the settings and tolerances inside them. */
export class PartParser {
  constructor(
    private readonly cursor: Cursor,
    private readonly expressions: ExpressionParser,
  ) {}

  /** `net -- NAME : kind … -- net -- …`; nets and parts must take turns and a net stands at both ends. */
  path(span: Span): StatementForm {
    const { cursor } = this;
    const nets: Word[] = [this.net()];
    const parts: PathPart[] = [];
    while (cursor.acceptSymbol("--")) {
      if (cursor.token.kind === "word" && !cursor.isSymbol(":", 1)) {
        cursor.fail("FRM7", cursor.token, this.elementMissing(nets[nets.length - 1]!));
        break;
      }
      const part = this.part();
      parts.push(this.withoutNet(part));
      if (!cursor.acceptSymbol("--")) {
        cursor.failHere("FRM7", `The path wants ${quote("--")} and a net after ${quote(part.name.text)}`);
      } else if (cursor.token.kind === "word" && cursor.isSymbol(":", 1)) {
        const next = cursor.token;
        const message = `Between ${quote(part.name.text)} and ${quote(next.text)} the path wants a net; name it: \`… -- net -- ${next.text} : …\`.`;
        cursor.fail("FRM7", next, message);
      }
      nets.push(this.net());
    }
    if (cursor.isSymbol("-") && cursor.peek(1).kind === "word") this.wantDashes(cursor.token);
    return { kind: "path", nets, parts, ...span };
  }

  /** The name of a net, with `ground` for a net that is called 0. */
  private net(): Word {
    const { cursor } = this;
    const { token } = cursor;
    if (token.kind !== "number" || token.text !== "0") return cursor.wantWord("The name of a net");
    const fix = { title: "Change to ground", from: token.from, to: token.to, text: "ground" };
    cursor.fail("FRM2", token, ZERO, fix);
    return { text: "ground", from: token.from, to: token.to };
  }

  /** A part whose value has swallowed the net behind a single `-`, without it. */
  private withoutNet(part: PathPart): PathPart {
    const { value } = part;
    if (value?.kind !== "binary" || value.operator !== "-") return part;
    if (value.right.kind !== "name" || value.right.path.length !== 1) return part;
    const goesOn = this.cursor.peek(1).kind === "word" && this.cursor.isSymbol(":", 2);
    if (!this.cursor.atEnd && !(this.cursor.isSymbol("--") && goesOn)) return part;
    this.wantDashes({ from: value.left.to, to: value.right.from });
    return { ...part, value: { kind: "hole", from: value.from, to: value.to } };
  }

  /** `at` is a single minus sign, or what is between its neighbours. */
  private wantDashes(at: Span): void {
    const text = at.to - at.from === 1 ? "--" : " -- ";
    const fix = { title: "Write --", from: at.from, to: at.to, text };
    this.cursor.fail("FRM7", at, "Nets and elements of a path are joined by `--`, not by `-`.", fix);
  }

  private elementMissing(left: Word): string {
    const right = this.cursor.token.text;
    return `Between the nets ${quote(left.text)} and ${quote(right)} an element is missing; write it as \`${left.text} -- R1 : resistor 1 kΩ -- ${right}\`.`;
  }

  private part(): PathPart {
    const { cursor } = this;
    const name = cursor.wantWord("An element such as `R1 : resistor 1 kΩ`");
    cursor.wantSymbol(":", "the name of the element");
    const kind = cursor.wantWord("A kind or model after `:`");
    const { token } = cursor;
    const bare = cursor.atEnd || (token.kind === "symbol" && BEHIND_KIND.has(token.text));
    const value = bare ? null : this.expressions.expression();
    const tolerance = this.tolerance();
    const settings = cursor.isSymbol("{") ? this.settings() : [];
    return { name, kind, value, tolerance, settings, from: name.from, to: cursor.behind };
  }

  /** `NAME : kind { … }` */
  device(span: Span): StatementForm {
    const { cursor } = this;
    const name = cursor.takeWord();
    cursor.take();
    const of = cursor.wantWord("A kind or model after `:`");
    if (!cursor.isSymbol("{")) {
      const wish = `Pins in braces are wanted after ${quote(of.text)}, or a net and \`--\` before ${quote(name.text)}`;
      cursor.failHere("FRM7", wish);
    }
    return { kind: "device", name, of, settings: this.settings(), ...span };
  }

  /** `model NAME : kind { … }`, after the word `model`. */
  model(span: Span): StatementForm {
    const { cursor } = this;
    const name = cursor.wantWord("A name after `model`");
    cursor.wantSymbol(":", "the name of the model");
    const of = cursor.wantWord("A kind such as `diode` or `npn` after `:`");
    cursor.wantSymbol("{", "the kind; a model without parameters ends in `{ }`");
    return { kind: "model", name, of, settings: this.settingList(), ...span };
  }

  private settings(): Setting[] {
    this.cursor.wantSymbol("{", "the kind");
    return this.settingList();
  }

  /** `name = value, … }`, after the opening brace; a comma may stand before the closing one. */
  private settingList(): Setting[] {
    const { cursor } = this;
    const open = { from: cursor.behind - 1, to: cursor.behind };
    const settings: Setting[] = [];
    while (!cursor.isSymbol("}") && !cursor.atEnd) {
      const name = cursor.wantWord("The name of a pin or parameter");
      cursor.wantSymbol("=", "the name");
      const value = this.expressions.expression();
      const tolerance = this.tolerance();
      settings.push({ name, value, tolerance, from: name.from, to: cursor.behind });
      if (cursor.isSymbol("}") || cursor.acceptSymbol(",")) continue;
      if (!cursor.atEnd) cursor.failHere("FRM2", "`,` or `}` is wanted here");
    }
    if (!cursor.acceptSymbol("}")) {
      const to = cursor.behind;
      const fix = { title: "Close it with }", from: to, to, text: " }" };
      cursor.fail("FRM5", open, "This brace is not closed; put a `}` at its end.", fix);
    }
    return settings;
  }

  /** `± amount [uniform | normal N sigma] [track GROUP [within amount]]`, null where there is none. */
  tolerance(): ToleranceSyntax | null {
    const { cursor } = this;
    const from = cursor.token.from;
    if (!cursor.acceptSymbol("±")) return null;
    const amount = this.expressions.sum();
    let law: "uniform" | "normal" = "uniform";
    let sigmas: number | null = null;
    if (cursor.acceptWord("normal")) {
      law = "normal";
      const number = cursor.take();
      sigmas = number.kind === "number" ? Number(number.text) : null;
      if (sigmas === null || !cursor.acceptWord("sigma")) {
        cursor.failHere("FRM2", "A normal law reads `normal 3 sigma`");
      }
    } else {
      cursor.acceptWord("uniform");
    }
    let track = null;
    if (cursor.acceptWord("track")) {
      const group = cursor.wantWord("The name of a group after `track`");
      track = { group, within: cursor.acceptWord("within") ? this.expressions.sum() : null };
    }
    return { amount, law, sigmas, track, from, to: cursor.behind };
  }
}
