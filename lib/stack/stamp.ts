import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";

/** Everything that the built pages and the built worker are made from. */
const SOURCES = [
  "app",
  "db",
  "examples",
  "lib",
  "worker",
  "next.config.ts",
  "package-lock.json",
  "postcss.config.mjs",
  "proxy.ts",
  "tailwind.config.ts",
  "tsconfig.json",
];
/** The stack starts what was built and is itself no part of it. */
const NO_SOURCE = "lib/stack";

/** Hash of the contents of the sources, so that a change of time alone builds nothing again. */
export function sourceStamp(checkout: string, sources: readonly string[] = SOURCES): string {
  const hash = createHash("sha256").update(process.version);
  for (const file of sources.flatMap((source) => filesBelow(checkout, source))) {
    const content = readFileSync(join(checkout, file));
    hash.update(`${file}\n${content.length}\n`).update(content);
  }
  return hash.digest("hex");
}

/** Paths below `start`, which may itself be a file, relative to `top` and in a fixed order. */
function filesBelow(top: string, start: string): string[] {
  const full = join(top, start);
  if (start === NO_SOURCE || !existsSync(full)) return [];
  if (statSync(full).isFile()) return [start];
  return readdirSync(full)
    .sort()
    .flatMap((name) => filesBelow(top, join(start, name)));
}

/** Whether the stamp kept in `file` is this one: what was built then is still right. */
export function isStamped(file: string, stamp: string): boolean {
  return existsSync(file) && readFileSync(file, "utf8") === stamp;
}

/** To be called when a build has ended well. */
export function writeStamp(file: string, stamp: string): void {
  mkdirSync(dirname(file), { recursive: true });
  writeFileSync(file, stamp);
}
