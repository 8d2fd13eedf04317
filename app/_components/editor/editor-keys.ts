import type { EditorEvents } from "./editor-handle";
import { isApple } from "./keyboard";
import { monaco } from "./monaco";

/** What the keys of the editor do beside writing. */
export interface KeyActions {
  readonly tell: () => void;
  readonly rename: (() => void) | null;
  readonly mend: (() => void) | null;
  readonly definition: () => void;
  readonly format: (() => void) | null;
  readonly outline: () => void;
  readonly places: () => void;
}

/** Gives the editor its keys; those for completion, comments and folding come with the editor. */
export function addKeys(
  editor: monaco.editor.IStandaloneCodeEditor,
  events: EditorEvents,
  actions: KeyActions,
): void {
  const { CtrlCmd, WinCtrl, Shift, Alt } = monaco.KeyMod;
  const { Enter, KeyF, KeyM, KeyO, KeyS, Period, F1, F2, F12 } = monaco.KeyCode;
  const add = (id: string, label: string, key: number, run: (() => void) | null) => {
    if (run !== null) editor.addAction({ id, label, keybindings: [key], run });
  };
  add("queue-run", "Queue run", CtrlCmd | Enter, events.onQueue);
  add("save-revision", "Save revision", CtrlCmd | KeyS, events.onSave);
  add("tell", "Tell what stands here", F1, actions.tell);
  add("rename", "Rename", F2, actions.rename);
  add("mend", "Mend what is wrong here", CtrlCmd | Period, actions.mend);
  add("definition", "Go to where it is declared", F12, actions.definition);
  add("places", "List its places", Shift | F12, actions.places);
  add("outline", "Outline", CtrlCmd | Shift | KeyO, actions.outline);
  add("format", "Format", Shift | Alt | KeyF, actions.format);
  let moves = false;
  const turnTab = () => {
    moves = !moves;
    editor.updateOptions({ tabFocusMode: moves });
    events.onTab(moves ? "moves on" : "indents");
  };
  // On Apple's keyboards ⌘ M puts the window away and Ctrl M ends a line.
  add("turn-tab", "Let Tab move on or indent", isApple() ? WinCtrl | Shift | KeyM : CtrlCmd | KeyM, turnTab);
}

/** The list of problems that comes below takes room from the editor; the line one writes in must not go under it. */
export function keepCursorInView(editor: monaco.editor.IStandaloneCodeEditor): void {
  let height = editor.getLayoutInfo().height;
  editor.onDidLayoutChange((layout) => {
    const position = editor.getPosition();
    if (layout.height < height && position !== null && editor.hasTextFocus()) {
      editor.revealPosition(position, monaco.editor.ScrollType.Immediate);
    }
    height = layout.height;
  });
}
