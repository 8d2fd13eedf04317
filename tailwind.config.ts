import type { Config } from "tailwindcss";

/** Colours, type and spacing are variables in app/globals.css; this file only says where class names are looked for. */
export default { content: ["./app/**/*.{ts,tsx}"] } satisfies Config;
