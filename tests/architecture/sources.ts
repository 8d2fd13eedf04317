import { execFileSync } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { builtinModules } from "node:module";
import { dirname, join, normalize } from "node:path";

/** One import or re-export of a file. */
export interface Import {
  /** As it is written, e.g. "@/lib/errors" or "pg". */
  readonly wanted: string;
  /** Path in the repository, or null for a package or a built-in of Node. */
  readonly file: string | null;
  /** Erased when the file is compiled. */
  readonly typeOnly: boolean;
}

export interface Source {
  readonly path: string;
  readonly text: string;
  /** `text` without its comments. */
  readonly code: string;
  readonly imports: readonly Import[];
  /** "use client", "use server" or none. */
  readonly directive: "client" | "server" | null;
}

function read(path: string): Source {
  const text = readFileSync(path, "utf8");
  const directive = /^\s*"use (client|server)"/.exec(text)?.[1] ?? null;
  return {
    path,
    text,
    code: text.replace(/\/\*[\s\S]*?\*\//g, "").replace(/(^|\s)\/\/.*$/gm, "$1"),
    imports: importsOf(path, text),
    directive: directive as Source["directive"],
  };
}

const STATEMENT = /^\s*(import|export)\s+(type\s+)?([^;"']*?\s+from\s+)?["']([^"'\n]+)["']/gm;
const CALL = /\bimport\(\s*["']([^"'\n]+)["']/g;
const WORKER = /new URL\(\s*["'](\.[^"'\n]+)["'],\s*import\.meta\.url/g;

function importsOf(path: string, text: string): Import[] {
  const statements = [...text.matchAll(STATEMENT)].map((found) => {
    const names =
      found[3]
        ?.match(/\{([^}]*)\}/)?.[1]
        ?.split(",")
        .map((name) => name.trim()) ?? [];
    const onlyTypes = names.length > 0 && names.every((name) => name === "" || name.startsWith("type "));
    return { wanted: found[4]!, typeOnly: found[2] !== undefined || onlyTypes };
  });
  const calls = [...text.matchAll(CALL), ...text.matchAll(WORKER)].map((found) => ({
    wanted: found[1]!,
    typeOnly: false,
  }));
  return [...statements, ...calls].map((one) => ({ ...one, file: resolveImport(path, one.wanted) }));
}

const ENDINGS = ["", ".ts", ".tsx", ".mjs", "/index.ts"];

function resolveImport(from: string, wanted: string): string | null {
  const base = wanted.startsWith("@/")
    ? wanted.slice(2)
    : wanted.startsWith(".")
      ? join(dirname(from), wanted)
      : null;
  if (base === null) return null;
  const full = normalize(base);
  // The worker names its thread as it is called once built.
  const names = [...ENDINGS.map((ending) => full + ending), full.replace(/\.mjs$/, ".ts")];
  return names.find((file) => /\.\w+$/.test(file) && existsSync(file)) ?? full;
}

/** Paths of everything that is committed or about to be. */
export const PATHS: readonly string[] = execFileSync(
  "git",
  ["ls-files", "-z", "--cached", "--others", "--exclude-standard"],
  { encoding: "utf8", maxBuffer: 2 ** 26 },
)
  .split("\0")
  .filter((path) => path !== "" && existsSync(path));

/** Every TypeScript and JavaScript file by its path. */
export const SOURCES: ReadonlyMap<string, Source> = new Map(
  PATHS.filter((path) => /\.(ts|tsx|mjs)$/.test(path)).map((path) => [path, read(path)]),
);

/** Whether an import is a module of Node itself, with or without "node:". */
export function isBuiltin(wanted: string): boolean {
  return wanted.startsWith("node:") || builtinModules.includes(wanted);
}

/** Name of the package an import comes from. */
export function packageOf(wanted: string): string {
  return wanted
    .split("/")
    .slice(0, wanted.startsWith("@") ? 2 : 1)
    .join("/");
}

/** Files of the repository below one of the folders, or that are one of the files. */
export function within(path: string, places: readonly string[]): boolean {
  return places.some((place) => path === place || path.startsWith(`${place}/`));
}

/** A file's imports with those of all that it imports, as far as they are run: each with the path that leads to it. */
export function reached(start: string, stop: (source: Source) => boolean = () => false): Map<string, string> {
  const trail = new Map<string, string>();
  const visit = (path: string, way: string): void => {
    const source = SOURCES.get(path);
    if (source === undefined || (path !== start && stop(source))) return;
    for (const { wanted, file, typeOnly } of source.imports) {
      const name = file ?? wanted;
      if (typeOnly || trail.has(name)) continue;
      trail.set(name, `${way} → ${name}`);
      if (file !== null) visit(file, `${way} → ${name}`);
    }
  };
  visit(start, start);
  return trail;
}
