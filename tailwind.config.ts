import type { Config } from "tailwindcss";

/** The colour tokens of app/globals.css, each a class name such as `text-quiet` or `bg-surface`. */
const TOKENS = [
  "paper",
  "surface",
  "ink",
  "quiet",
  "rule",
  "edge",
  "wash",
  "accent",
  "holds",
  "broken",
  "nodata",
  "running",
  "grid",
];

/** Colours, type and spacing are variables in app/globals.css; this file says which of them are class names, and where they are used. */
export default {
  content: ["./app/**/*.{ts,tsx}"],
  theme: { extend: { colors: Object.fromEntries(TOKENS.map((name) => [name, `var(--${name})`])) } },
} satisfies Config;
