import type { Colours } from "./theme-colours";

/** The tokens of the look for files, which no style sheet reaches; the same as in globals.css, which a test holds. */
export const THEMES: Readonly<Record<"light" | "dark", Colours>> = {
  light: {
    "--trace-1": "#0072b2",
    "--trace-2": "#d55e00",
    "--trace-3": "#00805e",
    "--trace-4": "#a8578a",
    "--trace-5": "#17202a",
    "--trace-6": "#8f6400",
    "--grid": "#e8e5dc",
    "--rule": "#dad6cb",
    "--edge": "#8b8a82",
    "--paper": "#fbfaf6",
    "--surface": "#ffffff",
    "--ink": "#17202a",
    "--quiet": "#5b6672",
    "--holds": "#1f7a4d",
    "--broken": "#b3261e",
  },
  dark: {
    "--trace-1": "#56b4e9",
    "--trace-2": "#e69f00",
    "--trace-3": "#2bbf94",
    "--trace-4": "#d993b9",
    "--trace-5": "#f0e442",
    "--trace-6": "#e8804a",
    "--grid": "#222d38",
    "--rule": "#2b3743",
    "--edge": "#667482",
    "--paper": "#10161d",
    "--surface": "#17202a",
    "--ink": "#e9e6de",
    "--quiet": "#9aa6b2",
    "--holds": "#5cc593",
    "--broken": "#f08a80",
  },
};
