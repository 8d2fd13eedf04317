/** The reader's choice of light or dark; `system` follows the machine. */
export type Theme = "system" | "light" | "dark";

export const THEME_COOKIE = "sweepwright-theme";

/** The theme a cookie's value names; anything unknown is `system`. */
export function themeOf(value: string | undefined): Theme {
  return value === "light" || value === "dark" ? value : "system";
}
