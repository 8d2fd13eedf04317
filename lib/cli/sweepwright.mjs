#!/usr/bin/env node
import { existsSync, readdirSync, statSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";

const folder = dirname(fileURLToPath(import.meta.url));
const checkout = join(folder, "../..");
const built = join(checkout, ".build/cli/main.mjs");

/** Time at which the newest source in `top` was changed, ms. */
function newest(top) {
  return Math.max(
    ...readdirSync(top, { withFileTypes: true }).map((entry) => {
      const path = join(top, entry.name);
      return entry.isDirectory() ? newest(path) : statSync(path).mtimeMs;
    }),
  );
}

/** The program built by `npm start`, unless a source has been changed since; then that source, which takes a second longer. */
async function program() {
  const sources = ["units", "language", "devices", "circuit", "solver", "analyses", "cli"];
  const isBuilt =
    existsSync(built) &&
    Math.max(...sources.map((name) => newest(join(checkout, "lib", name)))) < statSync(built).mtimeMs;
  if (isBuilt) return import(pathToFileURL(built).href);
  const { register } = await import("tsx/esm/api");
  register({ tsconfig: join(checkout, "tsconfig.json") });
  return import("./main.ts");
}

const { main } = await program();
await main(process.argv.slice(2));
