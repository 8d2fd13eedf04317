import type { editor } from "monaco-editor/editor";
import { TOKEN_INKS } from "./palette";

export const THEME = "sweepwright";

/** A colour token as `#rrggbb`, as the page has it now. */
function ink(name: string): string {
  return getComputedStyle(document.documentElement).getPropertyValue(name).trim();
}

/** The editor's theme from the colour tokens of the page, light or dark as they stand at this moment. */
export function currentTheme(): editor.IStandaloneThemeData {
  const dark = getComputedStyle(document.documentElement).colorScheme === "dark";
  const [paper, surface, wash, rule, edge] = ["--paper", "--surface", "--wash", "--rule", "--edge"].map(ink);
  const [text, quiet, accent, broken, caution] = ["--ink", "--quiet", "--accent", "--broken", "--nodata"].map(
    ink,
  );
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
    "editorError.foreground": broken,
    "editorWarning.foreground": caution,
    "editorWidget.background": surface,
    "editorWidget.foreground": text,
    "editorWidget.border": edge,
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
  const rules = Object.entries(TOKEN_INKS).map(([token, name]) => ({
    token,
    foreground: ink(name).replace("#", ""),
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
