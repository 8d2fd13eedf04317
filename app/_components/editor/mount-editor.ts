import { CursorPlaces } from "./cursor-places";
import type { EditorEvents, EditorHandle, TextCommand } from "./editor-handle";
import { addKeys, keepCursorInView } from "./editor-keys";
import { EDITOR_OPTIONS } from "./editor-options";
import { language } from "./language-thread";
import { markersOf, rangeOf } from "./markers";
import { LANGUAGE, monaco } from "./monaco";
import { followPresses, goTo, goToDefinition, mendHere, rename, tellOf } from "./name-actions";
import { FONT_FAMILY, FONT_SIZE } from "./palette";
import { PlaceCard } from "./place-card";
import { type Marked, offerFixesOf, readModel } from "./providers";
import type { Told } from "./questions";

export interface MountedEvents extends EditorEvents {
  /** Where the cursor rests, and what stands there. */
  readonly onRest: (offset: number, told: Told | null) => void;
  readonly onOutline: () => void;
  /** The places of what stands at the cursor are asked for. */
  readonly onPlaces: (told: Told | null) => void;
  /** The value of a name at the cursor's point of the preview, as it is shown; null where there is none. */
  readonly valueAtCursor: (name: string) => string | null;
}

/** An editor that stands on the page. */
export interface Mounted extends Omit<EditorHandle, "openOutline"> {
  /** Marks the problems of a text at their places. */
  mark(marked: Marked): void;
  run(command: TextCommand): void;
  focus(): void;
  dispose(): void;
}

/** Commands of the editor's own. */
const BUILT_IN: Partial<Record<TextCommand, string>> = {
  complete: "editor.action.triggerSuggest",
  comment: "editor.action.commentLine",
  "fold all": "editor.foldAll",
  "unfold all": "editor.unfoldAll",
  find: "actions.find",
};

/** Puts an editor into `place`. Waits for the fonts first: measured with another one, the cursor would stand beside the text. */
export async function mountEditor(
  place: HTMLElement,
  { text, readOnly, label }: { readonly text: string; readonly readOnly: boolean; readonly label: string },
  events: MountedEvents,
): Promise<Mounted> {
  await document.fonts.load(`${FONT_SIZE}px ${FONT_FAMILY}`);
  const close = language.open();
  const model = monaco.editor.createModel(text.replaceAll("\r\n", "\n"), LANGUAGE);
  model.setEOL(monaco.editor.EndOfLineSequence.LF);
  const access = { model, readOnly, domReadOnly: readOnly, ariaLabel: label };
  // An element of its own: React may ask for a second editor in `place` before the first is gone.
  const host = place.appendChild(document.createElement("div"));
  host.className = "absolute inset-0";
  const editor = monaco.editor.create(host, { ...EDITOR_OPTIONS, ...access });

  let marked: Marked = { text: "", diagnostics: [] };
  const read = () => readModel(model);
  const current = () => (read() === marked.text ? marked : null);
  offerFixesOf(model, readOnly ? () => null : current);
  const tell = (offset: number) => tellOf(model, offset);
  const edit = (range: monaco.IRange, replacement: string) => {
    editor.pushUndoStop();
    editor.executeEdits("sheet", [{ range, text: replacement }]);
    editor.pushUndoStop();
  };
  const mend: EditorHandle["mend"] = (fix, of) => {
    if (readOnly || read() !== of) return;
    edit(rangeOf(of, fix), fix.text);
    editor.focus();
  };
  const card = new PlaceCard(editor, {
    marked: current,
    mend: readOnly ? null : mend,
    tell,
    valueAtCursor: events.valueAtCursor,
  });
  const cursor = new CursorPlaces(editor, { tell, onRest: events.onRest });
  const presses = followPresses(editor);
  const format = () => void editor.getAction("editor.action.formatDocument")?.run();
  const run = (command: TextCommand) => {
    editor.focus();
    const at = () => model.getOffsetAt(editor.getPosition()!);
    if (command === "tell") void card.showAtCursor();
    else if (command === "mend here") {
      const done = mendHere(editor);
      if (done === null) void card.showAtCursor("Nothing to mend here.");
      else card.say(done);
    } else if (command === "rename") void rename(editor);
    else if (command === "definition") void goToDefinition(editor, at());
    else if (command === "places") void tell(at()).then(events.onPlaces);
    else editor.trigger("menu", BUILT_IN[command]!, {});
  };
  addKeys(editor, events, {
    tell: () => run("tell"),
    rename: readOnly ? null : () => run("rename"),
    mend: readOnly ? null : () => run("mend here"),
    definition: () => run("definition"),
    format: readOnly ? null : format,
    outline: events.onOutline,
    places: () => run("places"),
  });
  keepCursorInView(editor);
  model.onDidChangeContent(() => events.onEdit());

  return {
    text: read,
    replace: (next) => edit(model.getFullModelRange(), next),
    goTo: (span) => goTo(editor, span),
    show: (span) => cursor.show(span),
    mend,
    format,
    run,
    focus: () => editor.focus(),
    mark: (next) => {
      marked = next;
      monaco.editor.setModelMarkers(model, "checker", markersOf(next.text, next.diagnostics));
      card.refresh();
    },
    dispose: () => {
      presses.dispose();
      cursor.dispose();
      card.dispose();
      editor.dispose();
      model.dispose();
      host.remove();
      close();
    },
  };
}
