import type { editor, IDisposable, IPosition } from "monaco-editor/editor";
import type { Diagnostic, Fix } from "@/lib/language/diagnostic";
import { rangeOf, spellCode } from "./markers";
import { messagePieces } from "./message-text";
import type { Marked } from "./mount-editor";

/** Milliseconds that the pointer rests on a problem before its card comes, and may be away before it goes. */
const COME = 180;
const GO = 240;

/**
 * The sentence of a problem under its place in the text, with the button that mends it, while the pointer rests there. The list of
 * problems says the same to those who use no pointer, so the card is kept from assistive technology.
 */
export class ProblemCard implements editor.IContentWidget {
  readonly allowEditorOverflow = true;
  readonly suppressMouseDown = true;
  private readonly node = document.createElement("div");
  private readonly listeners: IDisposable[];
  private timer: ReturnType<typeof setTimeout> | undefined;
  private shown: Diagnostic | null = null;
  private at: IPosition | null = null;

  constructor(
    private readonly owner: editor.IStandaloneCodeEditor,
    private readonly marked: () => Marked | null,
    private readonly mend: ((fix: Fix, of: string) => void) | null,
  ) {
    this.node.setAttribute("aria-hidden", "true");
    this.node.className =
      "max-w-[min(420px,80vw)] rounded-[2px] border bg-surface px-3 py-2 font-(family-name:--font-text) text-sm text-ink whitespace-normal";
    this.node.addEventListener("mouseenter", () => clearTimeout(this.timer));
    this.node.addEventListener("mouseleave", () => this.later(() => this.hide(), GO));
    owner.addContentWidget(this);
    this.listeners = [
      owner.onMouseMove(({ target }) => this.point(target.position)),
      owner.onMouseLeave(() => this.later(() => this.hide(), GO)),
      owner.onKeyDown(() => this.hide()),
      owner.onDidScrollChange(() => this.hide()),
    ];
  }

  getId(): string {
    return "problem-card";
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
    if (this.shown !== null && !this.marked()?.diagnostics.includes(this.shown)) this.hide();
  }

  dispose(): void {
    clearTimeout(this.timer);
    for (const listener of this.listeners) listener.dispose();
    this.owner.removeContentWidget(this);
  }

  private later(act: () => void, wait: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(act, wait);
  }

  private point(position: IPosition | null): void {
    const marked = this.marked();
    const found = position === null || marked === null ? undefined : problemAt(marked, position);
    if (found === undefined) {
      if (this.shown !== null) this.later(() => this.hide(), GO);
      else clearTimeout(this.timer);
    } else if (found !== this.shown) this.later(() => this.show(found, marked!.text), COME);
    else clearTimeout(this.timer);
  }

  private show(problem: Diagnostic, of: string): void {
    const range = rangeOf(of, problem);
    this.shown = problem;
    this.at = { lineNumber: range.startLineNumber, column: range.startColumn };
    const code = document.createElement("b");
    code.textContent = `${spellCode(problem.code)} `;
    const pieces = messagePieces(problem.message).map(({ quoted, text }) => {
      const piece = document.createElement(quoted ? "code" : "span");
      piece.textContent = text;
      return piece;
    });
    this.node.replaceChildren(code, ...pieces);
    this.node.style.borderColor = problem.severity === "error" ? "var(--broken)" : "var(--nodata)";
    const { fix } = problem;
    const { mend } = this;
    if (fix !== undefined && mend !== null) {
      const button = document.createElement("button");
      button.type = "button";
      button.tabIndex = -1;
      button.className = "link ml-1.5";
      button.textContent = fix.title;
      button.addEventListener("click", () => {
        this.hide();
        mend(fix, of);
      });
      this.node.append(button);
    }
    this.owner.layoutContentWidget(this);
  }

  private hide(): void {
    clearTimeout(this.timer);
    this.shown = null;
    this.at = null;
    this.owner.layoutContentWidget(this);
  }
}

function problemAt({ text, diagnostics }: Marked, { lineNumber, column }: IPosition): Diagnostic | undefined {
  return diagnostics.find((one) => {
    const range = rangeOf(text, one);
    const after = lineNumber > range.startLineNumber || column >= range.startColumn;
    const before =
      lineNumber < range.endLineNumber || column <= Math.max(range.endColumn, range.startColumn + 1);
    return lineNumber >= range.startLineNumber && lineNumber <= range.endLineNumber && after && before;
  });
}
