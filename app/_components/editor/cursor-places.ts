import type { editor, IDisposable } from "monaco-editor/editor";
import type { Span } from "@/lib/language/span";
import { rangeOf } from "./markers";
import { readModel } from "./providers";
import type { Told } from "./questions";

/** Milliseconds of rest after which the cursor is looked at. */
const REST = 90;

interface Watched {
  readonly tell: (offset: number) => Promise<Told | null>;
  /** Where the cursor rests, and what stands there. */
  readonly onRest: (offset: number, told: Told | null) => void;
}

/** Follows the cursor: marks every place of the name it stands on, and says what that is. */
export class CursorPlaces {
  private readonly marks: editor.IEditorDecorationsCollection;
  private readonly shown: editor.IEditorDecorationsCollection;
  private readonly listeners: IDisposable[];
  private timer: ReturnType<typeof setTimeout> | undefined;
  private asked = 0;

  constructor(
    private readonly owner: editor.IStandaloneCodeEditor,
    private readonly watched: Watched,
  ) {
    this.marks = owner.createDecorationsCollection();
    this.shown = owner.createDecorationsCollection();
    this.listeners = [
      owner.onDidChangeCursorPosition(() => this.rest()),
      owner.onDidChangeModelContent(() => {
        this.marks.clear();
        this.shown.clear();
        this.rest();
      }),
    ];
  }

  /** Marks the lines of a span and brings them into view; null takes the mark away. */
  show(span: Span | null): void {
    this.shown.clear();
    if (span === null) return;
    const range = rangeOf(readModel(this.owner.getModel()!), span);
    this.shown.set([{ range, options: { isWholeLine: true, className: "shown-line" } }]);
    this.owner.revealRangeInCenterIfOutsideViewport(range);
  }

  dispose(): void {
    clearTimeout(this.timer);
    for (const listener of this.listeners) listener.dispose();
  }

  private rest(): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.look(), REST);
  }

  private async look(): Promise<void> {
    const model = this.owner.getModel();
    const position = this.owner.getPosition();
    if (model === null || position === null) return;
    this.asked += 1;
    const { asked } = this;
    const offset = model.getOffsetAt(position);
    const told = await this.watched.tell(offset);
    if (asked !== this.asked || model.isDisposed()) return;
    const text = readModel(model);
    const places = told === null || told.places.length < 2 ? [] : told.places;
    this.marks.set(
      places.map((place) => ({ range: rangeOf(text, place), options: { className: "name-place" } })),
    );
    this.watched.onRest(offset, told);
  }
}
