import type { editor, IPosition } from "monaco-editor/editor";
import type { Renaming } from "@/lib/language/symbols/rename";
import { messagePieces } from "./message-text";

export interface RenameSource {
  /** The edits that a new name needs, or why it cannot be. */
  readonly ask: (name: string) => Promise<Renaming>;
  /** Makes the edits as one step; false where the text has changed meanwhile. */
  readonly apply: (renaming: Extract<Renaming, { readonly edits: unknown }>) => boolean;
  readonly onClose: () => void;
}

/** A box under a name in which its new one is written; while one writes it says whether that name can be had. */
export class RenameBox implements editor.IContentWidget {
  readonly allowEditorOverflow = true;
  readonly suppressMouseDown = false;
  private readonly node = document.createElement("form");
  private readonly field = document.createElement("input");
  private readonly remark = document.createElement("p");
  private asked = 0;
  private isOpen = true;

  constructor(
    private readonly owner: editor.IStandaloneCodeEditor,
    private readonly at: IPosition,
    { name, places }: { readonly name: string; readonly places: number },
    private readonly source: RenameSource,
  ) {
    this.node.className =
      "w-[min(340px,84vw)] rounded-[2px] border border-edge bg-surface p-2 font-(family-name:--font-text) text-sm text-ink whitespace-normal";
    this.node.setAttribute("role", "dialog");
    this.node.setAttribute("aria-label", `Rename ${name}`);
    const label = document.createElement("label");
    label.className = "block";
    label.append(`New name for ${name}, in ${places} ${places === 1 ? "place" : "places"}`);
    this.field.value = name;
    this.field.spellcheck = false;
    this.field.autocomplete = "off";
    this.field.className =
      "mt-1 block min-h-8 w-full rounded-[2px] border border-edge bg-surface px-2 font-(family-name:--font-figures) text-sm";
    label.append(this.field);
    this.remark.setAttribute("role", "status");
    this.remark.className = "mt-1 text-quiet";
    this.node.append(label, this.remark);
    this.hint();
    this.node.addEventListener("submit", (event) => {
      event.preventDefault();
      void this.submit();
    });
    this.field.addEventListener("input", () => void this.judge());
    this.node.addEventListener("keydown", (event) => {
      event.stopPropagation();
      if (event.key !== "Escape") return;
      event.preventDefault();
      this.close();
    });
    this.node.addEventListener("focusout", (event) => {
      if (!this.node.contains(event.relatedTarget as Node | null)) this.close(false);
    });
    owner.addContentWidget(this);
    owner.revealPosition(at);
    // The widget is put in place at the next drawing of the editor; before it, it cannot have the focus.
    requestAnimationFrame(() => {
      this.field.focus();
      this.field.select();
    });
  }

  getId(): string {
    return "rename-box";
  }

  getDomNode(): HTMLElement {
    return this.node;
  }

  getPosition(): editor.IContentWidgetPosition {
    return { position: this.at, preference: [2, 1] };
  }

  close(giveFocus = true): void {
    if (!this.isOpen) return;
    this.isOpen = false;
    this.owner.removeContentWidget(this);
    this.source.onClose();
    if (giveFocus) this.owner.focus();
  }

  private async judge(): Promise<Renaming | null> {
    this.asked += 1;
    const { asked } = this;
    const renaming = await this.source.ask(this.field.value.trim());
    if (asked !== this.asked || !this.isOpen) return null;
    if ("refusal" in renaming) this.say(renaming.refusal);
    else this.hint();
    return renaming;
  }

  private async submit(): Promise<void> {
    const renaming = await this.judge();
    if (renaming === null || "refusal" in renaming) return;
    if (this.source.apply(renaming)) this.close();
    else this.say("The text has changed meanwhile; close this and begin again.");
  }

  private hint(): void {
    this.field.removeAttribute("aria-invalid");
    this.remark.className = "mt-1 text-quiet";
    this.remark.textContent = "Enter renames, Escape leaves it as it is.";
  }

  private say(refusal: string): void {
    this.field.setAttribute("aria-invalid", "true");
    this.remark.className = "mt-1 text-broken";
    const pieces = messagePieces(refusal).map(({ quoted, text }) => {
      const piece = document.createElement(quoted ? "code" : "span");
      piece.textContent = text;
      return piece;
    });
    this.remark.replaceChildren(...pieces);
  }
}
