import type { editor } from "monaco-editor/editor";
import { TOKEN_INKS } from "./palette";

export const THEME = "sweepwright";

/** `rgb(251, 250, 246)`, as browsers give a computed colour, as `#fbfaf6`. */
export function hexOf(computed: string): string {
  const parts = computed.match(/\d+/g) ?? [];
  return `#${parts
    .slice(0, 3)
    .map((part) => Number(part).toString(16).padStart(2, "0"))
    .join("")}`;
}

/** Colour tokens as `#rrggbb`, as the page has them now; a stylesheet may spell them in any other way. */
function inks(names: readonly string[]): string[] {
  const probe = document.body.appendChild(document.createElement("span"));
  const found = names.map((name) => {
    probe.style.color = `var(${name})`;
    return hexOf(getComputedStyle(probe).color);
  });
  probe.remove();
  return found;
}

/** The editor's theme from the colour tokens of the page, light or dark as they stand at this moment. */
export function currentTheme(): editor.IStandaloneThemeData {
  const dark = getComputedStyle(document.documentElement).colorScheme === "dark";
  const [paper, surface, wash, rule, edge] = inks(["--paper", "--surface", "--wash", "--rule", "--edge"]);
  const [text, quiet, accent, broken, caution] = inks([
    "--ink",
    "--quiet",
    "--accent",
    "--broken",
    "--nodata",
  ]);
  const clear = "#00000000";
  const colors: Record<string, string | undefined> = {
    foreground: text,
    focusBorder: accent,
    "widget.shadow": clear,
    "widget.border": edge,
    "icon.foreground": quiet,
    "editor.background": surface,
    "editor.foreground": text,
    "editorCursor.foreground": text,
    "editorLineNumber.foreground": quiet,
    "editorLineNumber.activeForeground": text,
    "editor.selectionBackground": `${accent}40`,
    "editor.inactiveSelectionBackground": `${accent}26`,
    "editor.findMatchBackground": `${accent}59`,
    "editor.findMatchHighlightBackground": `${accent}2e`,
    "editorBracketMatch.background": wash,
    "editorBracketMatch.border": edge,
    ...Object.fromEntries([1, 2, 3, 4, 5, 6].map((n) => [`editorBracketHighlight.foreground${n}`, text])),
    "editorBracketHighlight.unexpectedBracket.foreground": broken,
    "editorError.foreground": broken,
    "editorWarning.foreground": caution,
    "editorWidget.background": surface,
    "editorWidget.foreground": text,
    "editorWidget.border": edge,
    "editorSuggestWidget.background": surface,
    "editorSuggestWidget.foreground": text,
    "editorSuggestWidget.border": edge,
    "editorSuggestWidget.selectedBackground": wash,
    "editorSuggestWidget.selectedForeground": text,
    "editorSuggestWidget.highlightForeground": accent,
    "editorSuggestWidget.focusHighlightForeground": accent,
    "editor.snippetTabstopHighlightBackground": `${accent}1f`,
    "editor.snippetFinalTabstopHighlightBorder": clear,
    "editor.foldBackground": `${wash}`,
    "editor.foldPlaceholderForeground": quiet,
    "editorGutter.foldingControlForeground": quiet,
    "editorHoverWidget.background": surface,
    "editorHoverWidget.border": edge,
    "input.background": surface,
    "input.border": edge,
    "input.foreground": text,
    "inputOption.activeBackground": wash,
    "inputOption.activeBorder": accent,
    "inputOption.activeForeground": text,
    "menu.background": surface,
    "menu.foreground": text,
    "menu.border": edge,
    "menu.selectionBackground": wash,
    "menu.selectionForeground": text,
    "menu.separatorBackground": rule,
    "list.hoverBackground": wash,
    "list.focusBackground": wash,
    "list.focusForeground": text,
    "editorActionList.background": surface,
    "editorActionList.foreground": text,
    "editorActionList.focusBackground": wash,
    "editorActionList.focusForeground": text,
    "scrollbar.shadow": clear,
    "scrollbarSlider.background": `${edge}66`,
    "scrollbarSlider.hoverBackground": `${edge}99`,
    "scrollbarSlider.activeBackground": `${edge}cc`,
    "editorOverviewRuler.border": clear,
    "editorGutter.background": surface,
    "editorStickyScroll.background": paper,
  };
  const colours = inks(Object.values(TOKEN_INKS));
  const rules = Object.keys(TOKEN_INKS).map((token, index) => ({
    token,
    foreground: colours[index]!.replace("#", ""),
  }));
  return {
    base: dark ? "vs-dark" : "vs",
    inherit: false,
    rules: [{ token: "", foreground: text!.replace("#", "") }, ...rules],
    colors: Object.fromEntries(
      Object.entries(colors).filter((entry): entry is [string, string] => entry[1] !== undefined),
    ),
  };
}

/** Calls `change` whenever the page turns light or dark, by the reader's choice or the system's. Gives the way to stop. */
export function watchTheme(change: () => void): () => void {
  const system = matchMedia("(prefers-color-scheme: dark)");
  const chosen = new MutationObserver(change);
  system.addEventListener("change", change);
  chosen.observe(document.documentElement, { attributeFilter: ["data-theme"] });
  return () => {
    system.removeEventListener("change", change);
    chosen.disconnect();
  };
}
