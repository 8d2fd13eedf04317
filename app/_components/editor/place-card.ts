import type { editor, IDisposable, IPosition } from "monaco-editor/editor";
import type { Diagnostic, Fix } from "@/lib/language/diagnostic";
import { rangeOf, spellCode } from "./markers";
import { messagePieces } from "./message-text";
import type { Marked } from "./providers";
import type { Told } from "./questions";

/** Milliseconds that the pointer rests on a place before its card comes, and may be away before it goes. */
const COME = 180;
const GO = 240;

/** What the card asks of the editor it stands in. */
export interface CardSource {
  readonly marked: () => Marked | null;
  readonly mend: ((fix: Fix, of: string) => void) | null;
  /** What stands at an offset of the present text; null as well when the text has changed meanwhile. */
  readonly tell: (offset: number) => Promise<Told | null>;
  /** The value of a name at the cursor's point of the preview. */
  readonly valueAtCursor: (name: string) => string | null;
}

/**
 * What stands at a place of the text: its problem, with the button that mends it, and the meaning of the name with its value. It
 * comes while the pointer rests there, or on demand at the cursor; then it is spoken too.
 */
export class PlaceCard implements editor.IContentWidget {
  readonly allowEditorOverflow = true;
  readonly suppressMouseDown = true;
  private readonly node = document.createElement("div");
  private readonly spoken = document.createElement("p");
  private readonly listeners: IDisposable[];
  private timer: ReturnType<typeof setTimeout> | undefined;
  private problem: Diagnostic | null = null;
  private at: IPosition | null = null;
  /** What the pointer rests on, so that the same is not asked about twice. */
  private pointed = "";
  private asked = 0;

  constructor(
    private readonly owner: editor.IStandaloneCodeEditor,
    private readonly source: CardSource,
  ) {
    // The list of problems, the line over the text and the spoken words say the same to those who use no pointer.
    this.node.setAttribute("aria-hidden", "true");
    this.node.className =
      "place-card z-40 max-w-[min(440px,84vw)] rounded-[2px] border bg-surface px-3 py-2 font-(family-name:--font-text) text-sm text-ink whitespace-normal";
    this.node.addEventListener("mouseenter", () => clearTimeout(this.timer));
    this.node.addEventListener("mouseleave", () => this.later(() => this.hide(), GO));
    this.spoken.setAttribute("role", "status");
    this.spoken.className = "sr-only";
    owner.getContainerDomNode().append(this.spoken);
    owner.addContentWidget(this);
    this.listeners = [
      // 6 is text, 7 the blank behind it, where only a problem at the line's end can be meant.
      owner.onMouseMove(({ target: { type, position } }) =>
        this.point(type === 6 || type === 7 ? position : null, type === 6),
      ),
      owner.onMouseLeave(() => this.later(() => this.hide(), GO)),
      owner.onKeyDown(() => this.hide()),
      owner.onDidScrollChange(() => this.hide()),
    ];
  }

  getId(): string {
    return "place-card";
  }

  getDomNode(): HTMLElement {
    return this.node;
  }

  getPosition(): editor.IContentWidgetPosition | null {
    // 2 is below the line, 1 above it.
    return this.at === null ? null : { position: this.at, preference: [2, 1] };
  }

  /** Takes the card away when its problem is no longer there. */
  refresh(): void {
    if (this.problem !== null && !this.source.marked()?.diagnostics.includes(this.problem)) this.hide();
  }

  /** Shows what stands at the cursor, and has it spoken, or `otherwise` where nothing does. */
  async showAtCursor(otherwise = "Nothing to tell here."): Promise<void> {
    const position = this.owner.getPosition();
    if (position === null) return;
    const said = await this.show(position);
    this.spoken.textContent = said === "" ? otherwise : said;
    if (said !== "") return;
    this.node.replaceChildren(element("p", otherwise));
    this.node.style.borderColor = "var(--edge)";
    this.at = position;
    this.owner.layoutContentWidget(this);
  }

  /** Has something spoken that the text shows. */
  say(words: string): void {
    this.spoken.textContent = words;
  }

  dispose(): void {
    clearTimeout(this.timer);
    for (const listener of this.listeners) listener.dispose();
    this.owner.removeContentWidget(this);
    this.spoken.remove();
  }

  private later(act: () => void, wait: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(act, wait);
  }

  private point(position: IPosition | null, isText: boolean): void {
    const word = position !== null && isText ? this.owner.getModel()!.getWordAtPosition(position) : null;
    const problem = position === null ? undefined : this.problemAt(position);
    if (position === null || (word === null && problem === undefined)) {
      this.pointed = "";
      if (this.at !== null) this.later(() => this.hide(), GO);
      else clearTimeout(this.timer);
      return;
    }
    const pointed = `${position.lineNumber} ${word?.startColumn ?? ""} ${problem?.from ?? ""}`;
    const isShown = pointed === this.pointed && this.at !== null;
    this.pointed = pointed;
    if (isShown) clearTimeout(this.timer);
    else this.later(() => void this.show(position), COME);
  }

  /** Gives the words that are shown. */
  private async show(position: IPosition): Promise<string> {
    this.asked += 1;
    const { asked } = this;
    const model = this.owner.getModel()!;
    const version = model.getVersionId();
    const told = await this.source.tell(model.getOffsetAt(position));
    if (asked !== this.asked || model.isDisposed() || model.getVersionId() !== version) return "";
    const problem = this.problemAt(position) ?? null;
    if (told === null && problem === null) {
      this.hide();
      return "";
    }
    const text = model.getValue(1);
    const { startLineNumber, startColumn } = rangeOf(text, told ?? problem!);
    this.at = { lineNumber: startLineNumber, column: startColumn };
    this.problem = problem;
    const parts = [
      ...(problem === null ? [] : [this.problemPart(problem, text)]),
      ...(told === null ? [] : [this.toldPart(told)]),
    ];
    this.node.replaceChildren(...parts);
    const tone = problem?.severity === "error" ? "--broken" : "--nodata";
    this.node.style.borderColor = `var(${problem === null ? "--edge" : tone})`;
    this.owner.layoutContentWidget(this);
    return parts.map((part) => part.textContent).join(" ");
  }

  private problemPart({ code, message, fix }: Diagnostic, of: string): HTMLElement {
    const part = document.createElement("p");
    part.append(element("b", `${spellCode(code)} `));
    for (const { quoted, text } of messagePieces(message))
      part.append(element(quoted ? "code" : "span", text));
    const { mend } = this.source;
    if (fix !== undefined && mend !== null) {
      const button = element("button", fix.title) as HTMLButtonElement;
      button.type = "button";
      button.tabIndex = -1;
      button.className = "link ml-1.5";
      button.addEventListener("click", () => {
        this.hide();
        mend(fix, of);
      });
      part.append(button);
    }
    return part;
  }

  private toldPart({ lines, paths }: Told): HTMLElement {
    const part = document.createElement("div");
    lines.forEach((line, index) => {
      const row = document.createElement("p");
      if (index > 0) row.className = "text-quiet";
      for (const { quoted, text } of messagePieces(line)) row.append(element(quoted ? "code" : "span", text));
      part.append(row);
    });
    for (const path of paths) {
      const value = this.source.valueAtCursor(path);
      if (value === null) continue;
      const row = element("p", paths.length > 1 ? `${path}: ${value}` : value);
      row.className = "figures text-accent";
      part.append(row);
    }
    return part;
  }

  private problemAt(position: IPosition): Diagnostic | undefined {
    const marked = this.source.marked();
    return marked === null ? undefined : problemIn(marked, position);
  }

  private hide(): void {
    clearTimeout(this.timer);
    this.asked += 1;
    this.problem = null;
    if (this.at === null) return;
    this.at = null;
    this.pointed = "";
    this.owner.layoutContentWidget(this);
  }
}

function element(tag: string, text: string): HTMLElement {
  const made = document.createElement(tag);
  made.textContent = text;
  return made;
}

function problemIn({ text, diagnostics }: Marked, { lineNumber, column }: IPosition): Diagnostic | undefined {
  return diagnostics.find((one) => {
    const range = rangeOf(text, one);
    const after = lineNumber > range.startLineNumber || column >= range.startColumn;
    const before =
      lineNumber < range.endLineNumber || column <= Math.max(range.endColumn, range.startColumn + 1);
    return lineNumber >= range.startLineNumber && lineNumber <= range.endLineNumber && after && before;
  });
}
