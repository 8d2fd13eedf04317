import "monaco-editor/features/bracketMatching/register.js";
import "monaco-editor/features/caretOperations/register.js";
import "monaco-editor/features/clipboard/register.js";
import "monaco-editor/features/codeAction/register.js";
import "monaco-editor/features/codeEditor/register.js";
import "monaco-editor/features/comment/register.js";
import "monaco-editor/features/cursorUndo/register.js";
import "monaco-editor/features/find/register.js";
import "monaco-editor/features/folding/register.js";
import "monaco-editor/features/format/register.js";
import "monaco-editor/features/iPadShowKeyboard/register.js";
import "monaco-editor/features/indentation/register.js";
import "monaco-editor/features/lineSelection/register.js";
import "monaco-editor/features/linesOperations/register.js";
import "monaco-editor/features/longLinesHelper/register.js";
import "monaco-editor/features/multicursor/register.js";
import "monaco-editor/features/tokenization/register.js";
import "monaco-editor/features/unusualLineTerminators/register.js";
import "monaco-editor/features/wordOperations/register.js";
// The list of completions alone: its feature would bring completions drawn within the line as well.
import "monaco-editor/editor/contrib/suggest/browser/suggestController.js";
import * as monaco from "monaco-editor/editor";
import { StandaloneServices } from "monaco-editor/editor/standalone/browser/standaloneServices.js";
import { IStorageService } from "monaco-editor/platform/storage/common/storage.js";
import { currentTheme, THEME, watchTheme } from "./monaco-theme";
import { registerProviders } from "./providers";
import { tokenizeLine } from "./token-lines";

export const LANGUAGE = "netlist";

/** What the tokens provider remembers between two lines: the statement that may go on. */
class Open implements monaco.languages.IState {
  constructor(readonly text: string) {}
  clone(): Open {
    return this;
  }
  equals(other: monaco.languages.IState): boolean {
    return other instanceof Open && other.text === this.text;
  }
}

function setUp(): void {
  // The list of completions shows what each is about from the start.
  StandaloneServices.get(IStorageService).store("expandSuggestionDocs", true, 0, 0);
  self.MonacoEnvironment = {
    getWorker: () => new Worker(new URL("./editor.worker.ts", import.meta.url), { type: "module" }),
  };
  monaco.languages.register({ id: LANGUAGE, extensions: [".swn"] });
  monaco.languages.setLanguageConfiguration(LANGUAGE, {
    comments: { lineComment: "#" },
    brackets: [
      ["{", "}"],
      ["(", ")"],
    ],
    autoClosingPairs: [
      { open: "{", close: "}" },
      { open: "(", close: ")" },
      { open: '"', close: '"', notIn: ["string", "comment"] },
    ],
    wordPattern: /[\p{L}_][\p{L}0-9_]*/u,
  });
  monaco.languages.setTokensProvider(LANGUAGE, {
    getInitialState: () => new Open(""),
    tokenize: (line, state) => {
      const { tokens, open } = tokenizeLine(line, (state as Open).text);
      return {
        tokens: tokens.map((token) => ({ startIndex: token.at, scopes: token.class ?? "" })),
        endState: new Open(open),
      };
    },
  });
  registerProviders(LANGUAGE);
  const paint = () => {
    monaco.editor.defineTheme(THEME, currentTheme());
    monaco.editor.setTheme(THEME);
  };
  paint();
  watchTheme(paint);
}

setUp();

export { monaco };
