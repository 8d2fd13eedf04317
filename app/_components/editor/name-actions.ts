import type { Span } from "@/lib/language/span";
import { language } from "./language-thread";
import { rangeOf } from "./markers";
import { monaco } from "./monaco";
import { fixesAt, readModel } from "./providers";
import type { Told } from "./questions";
import { RenameBox } from "./rename-box";

/** What stands at an offset of a model's text; null where nothing does, or where the text has changed meanwhile. */
export async function tellOf(model: monaco.editor.ITextModel, offset: number): Promise<Told | null> {
  const version = model.getVersionId();
  const told = await language.ask("tell", readModel(model), { offset });
  return model.isDisposed() || model.getVersionId() !== version ? null : told;
}

/** Selects a span, with the cursor at its beginning, and brings it into view. */
export function goTo(editor: monaco.editor.IStandaloneCodeEditor, span: Span): void {
  const range = rangeOf(readModel(editor.getModel()!), span);
  const { startLineNumber, startColumn, endLineNumber, endColumn } = range;
  editor.setSelection(new monaco.Selection(endLineNumber, endColumn, startLineNumber, startColumn));
  editor.revealRangeInCenterIfOutsideViewport(range);
  editor.focus();
}

/** Goes to where the name at an offset is declared; from there, to the next place where it is written. */
export async function goToDefinition(
  editor: monaco.editor.IStandaloneCodeEditor,
  offset: number,
): Promise<void> {
  const told = await tellOf(editor.getModel()!, offset);
  if (told === null || told.definition === null) return;
  const { definition, places } = told;
  const isThere = definition.from <= offset && offset <= definition.to;
  const next = places.find(({ from }) => from > definition.from) ?? places[0];
  goTo(editor, isThere ? (next ?? definition) : definition);
}

/** Opens the box in which the name at the cursor gets another one. */
export async function rename(editor: monaco.editor.IStandaloneCodeEditor): Promise<void> {
  const model = editor.getModel()!;
  const offset = model.getOffsetAt(editor.getPosition()!);
  const told = await tellOf(model, offset);
  const place = told?.places.find(({ from, to }) => from <= offset && offset <= to);
  if (told === null || place === undefined) return;
  const text = readModel(model);
  const { startLineNumber, startColumn } = rangeOf(text, place);
  const named = { name: text.slice(place.from, place.to), places: told.places.length };
  new RenameBox(editor, { lineNumber: startLineNumber, column: startColumn }, named, {
    ask: (name) => language.ask("rename", text, { offset, name }),
    apply: ({ edits }) => {
      if (readModel(model) !== text) return false;
      editor.pushUndoStop();
      editor.executeEdits(
        "rename",
        edits.map((edit) => ({ range: rangeOf(text, edit), text: edit.text })),
      );
      editor.pushUndoStop();
      return true;
    },
    onClose: () => {},
  });
}

/** Puts the first fix at the cursor in and says what it did; null where there is none. Undo takes it back. */
export function mendHere(editor: monaco.editor.IStandaloneCodeEditor): string | null {
  const selection = editor.getSelection();
  const fix = selection === null ? undefined : fixesAt(editor.getModel()!, selection)[0];
  if (fix === undefined) return null;
  editor.pushUndoStop();
  editor.executeEdits("fix", [fix.edit]);
  editor.pushUndoStop();
  return fix.title;
}

/** Follows a name to its declaration when it is pressed with Ctrl or ⌘ held. */
export function followPresses(editor: monaco.editor.IStandaloneCodeEditor): monaco.IDisposable {
  return editor.onMouseDown(({ event, target }) => {
    const { position } = target;
    if (!(event.ctrlKey || event.metaKey) || !event.leftButton || position === null) return;
    void goToDefinition(editor, editor.getModel()!.getOffsetAt(position));
  });
}
