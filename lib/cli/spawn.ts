import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import { Worker } from "node:worker_threads";

/** Starts a solving thread. Its program lies beside this file: bundled once built, TypeScript in a checkout. */
export function spawn(): Worker {
  if (import.meta.url.endsWith(".mjs")) {
    return new Worker(new URL("./solve-thread.mjs", import.meta.url), { execArgv: [] });
  }
  const file = new URL("./solve-thread.ts", import.meta.url).href;
  const loader = createRequire(import.meta.url)
    .resolve("tsx/esm/api")
    .replace(/\.cjs$/, ".mjs");
  const tsconfig = join(dirname(fileURLToPath(import.meta.url)), "../../tsconfig.json");
  // A thread does not inherit the loader of TypeScript, so it registers its own first.
  const [api, options] = [pathToFileURL(loader).href, { tsconfig }].map((one) => JSON.stringify(one));
  const program = `import(${api}).then(({ register }) => { register(${options}); return import("${file}"); })`;
  return new Worker(program, { eval: true, execArgv: [] });
}
