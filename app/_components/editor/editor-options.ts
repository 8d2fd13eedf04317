import { monaco } from "./monaco";
import { THEME } from "./monaco-theme";
import { FONT_FAMILY, FONT_SIZE, LINE_HEIGHT } from "./palette";

/** How every netlist editor stands: one column of text on ruled lines, and nothing beside it. */
export const EDITOR_OPTIONS: monaco.editor.IStandaloneEditorConstructionOptions = {
  theme: THEME,
  fontFamily: FONT_FAMILY,
  fontSize: FONT_SIZE,
  lineHeight: LINE_HEIGHT,
  padding: { top: 8, bottom: 8 },
  automaticLayout: true,
  // What the language does not use, or what would draw over the ruled lines.
  minimap: { enabled: false },
  glyphMargin: false,
  renderLineHighlight: "none",
  renderFinalNewline: "on",
  guides: { indentation: false, bracketPairs: false, highlightActiveIndentation: false },
  bracketPairColorization: { enabled: false },
  occurrencesHighlight: "off",
  selectionHighlight: false,
  wordBasedSuggestions: "off",
  quickSuggestions: { other: "on", comments: "off", strings: "off" },
  quickSuggestionsDelay: 60,
  // A list that came by itself has nothing chosen, so that Enter still ends a line.
  suggest: {
    selectionMode: "whenQuickSuggestion",
    showIcons: false,
    showStatusBar: false,
    snippetsPreventQuickSuggestions: false,
    preview: false,
  },
  suggestLineHeight: 26,
  suggestFontSize: 13,
  acceptSuggestionOnEnter: "smart",
  acceptSuggestionOnCommitCharacter: false,
  tabCompletion: "off",
  parameterHints: { enabled: false },
  hover: { enabled: "off" },
  foldingHighlight: false,
  showFoldingControls: "mouseover",
  links: false,
  contextmenu: false,
  lightbulb: { enabled: monaco.editor.ShowLightbulbIconMode.Off },
  unicodeHighlight: { ambiguousCharacters: false, invisibleCharacters: false },
  overviewRulerLanes: 0,
  hideCursorInOverviewRuler: true,
  roundedSelection: false,
  lineNumbersMinChars: 3,
  // Folding takes 16 more.
  lineDecorationsWidth: 16,
  scrollBeyondLastLine: false,
  wordWrap: "on",
  wrappingIndent: "indent",
  // A quantity such as 25 °C stays whole.
  wordWrapBreakAfterCharacters: " \t,",
  wordWrapBreakBeforeCharacters: "{(",
  find: { addExtraSpaceOnTop: false },
  fixedOverflowWidgets: true,
  tabSize: 2,
  insertSpaces: true,
  scrollbar: {
    useShadows: false,
    verticalScrollbarSize: 10,
    horizontalScrollbarSize: 10,
    alwaysConsumeMouseWheel: false,
  },
};
