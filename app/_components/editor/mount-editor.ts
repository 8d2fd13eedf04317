import type { Diagnostic } from "@/lib/language/diagnostic";
import { format } from "@/lib/language/format";
import type { EditorEvents, EditorHandle } from "./editor-handle";
import { EDITOR_OPTIONS } from "./editor-options";
import { isApple } from "./keyboard";
import { markersOf, rangeOf } from "./markers";
import { LANGUAGE, monaco } from "./monaco";
import { FONT_FAMILY, FONT_SIZE } from "./palette";
import { ProblemCard } from "./problem-card";
import { offerFixes } from "./quick-fixes";

/** The problems of one text. */
export interface Marked {
  readonly text: string;
  readonly diagnostics: readonly Diagnostic[];
}

/** An editor that stands on the page. */
export interface Mounted extends EditorHandle {
  /** Marks the problems of a text at their places. */
  mark(marked: Marked): void;
  dispose(): void;
}

/** Puts an editor into `place`. Waits for the fonts first: measured with another one, the cursor would stand beside the text. */
export async function mountEditor(
  place: HTMLElement,
  { text, readOnly, label }: { readonly text: string; readonly readOnly: boolean; readonly label: string },
  events: EditorEvents,
): Promise<Mounted> {
  await document.fonts.load(`${FONT_SIZE}px ${FONT_FAMILY}`);
  const model = monaco.editor.createModel(text.replaceAll("\r\n", "\n"), LANGUAGE);
  model.setEOL(monaco.editor.EndOfLineSequence.LF);
  const access = { model, readOnly, domReadOnly: readOnly, ariaLabel: label };
  // An element of its own: React may ask for a second editor in `place` before the first is gone.
  const host = place.appendChild(document.createElement("div"));
  host.className = "absolute inset-0";
  const editor = monaco.editor.create(host, { ...EDITOR_OPTIONS, ...access });

  let marked: Marked = { text: "", diagnostics: [] };
  const read = () => model.getValue(monaco.editor.EndOfLinePreference.LF);
  const current = () => (read() === marked.text ? marked : null);
  const edit = (range: monaco.IRange, replacement: string) => {
    editor.pushUndoStop();
    editor.executeEdits("sheet", [{ range, text: replacement }]);
    editor.pushUndoStop();
  };
  const handle: EditorHandle = {
    text: read,
    replace: (next) => edit(model.getFullModelRange(), next),
    goTo: (span) => {
      const range = rangeOf(read(), span);
      editor.setSelection(range);
      editor.revealRangeInCenterIfOutsideViewport(range);
      editor.focus();
    },
    mend: (fix, of) => {
      if (readOnly || read() !== of) return;
      edit(rangeOf(of, fix), fix.text);
      editor.focus();
    },
    format: () => {
      const next = format(read());
      if (next !== read()) edit(model.getFullModelRange(), next);
    },
  };

  const card = new ProblemCard(editor, current, readOnly ? null : handle.mend);
  const fixes = readOnly ? null : offerFixes(model, current);
  addKeys(editor, events);
  keepCursorInView(editor);
  model.onDidChangeContent(() => events.onEdit());
  return {
    ...handle,
    mark: (next) => {
      marked = next;
      monaco.editor.setModelMarkers(model, "checker", markersOf(next.text, next.diagnostics));
      card.refresh();
    },
    dispose: () => {
      fixes?.dispose();
      card.dispose();
      editor.dispose();
      model.dispose();
      host.remove();
    },
  };
}

function addKeys(editor: monaco.editor.IStandaloneCodeEditor, events: EditorEvents): void {
  const { CtrlCmd, WinCtrl, Shift } = monaco.KeyMod;
  const { Enter, KeyM, KeyS } = monaco.KeyCode;
  const queue = { id: "queue-run", label: "Queue run", keybindings: [CtrlCmd | Enter], run: events.onQueue };
  const save = {
    id: "save-revision",
    label: "Save revision",
    keybindings: [CtrlCmd | KeyS],
    run: events.onSave,
  };
  editor.addAction(queue);
  editor.addAction(save);
  let moves = false;
  const turnTab = () => {
    moves = !moves;
    editor.updateOptions({ tabFocusMode: moves });
    events.onTab(moves ? "moves on" : "indents");
  };
  // On Apple's keyboards ⌘ M puts the window away and Ctrl M ends a line.
  const tabKey = isApple() ? WinCtrl | Shift | KeyM : CtrlCmd | KeyM;
  editor.addAction({
    id: "turn-tab",
    label: "Let Tab move on or indent",
    keybindings: [tabKey],
    run: turnTab,
  });
}

/** The list of problems that comes below takes room from the editor; the line one writes in must not go under it. */
function keepCursorInView(editor: monaco.editor.IStandaloneCodeEditor): void {
  let height = editor.getLayoutInfo().height;
  editor.onDidLayoutChange((layout) => {
    const position = editor.getPosition();
    if (layout.height < height && position !== null && editor.hasTextFocus()) {
      editor.revealPosition(position, monaco.editor.ScrollType.Immediate);
    }
    height = layout.height;
  });
}
