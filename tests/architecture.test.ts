import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { isBuiltin, PATHS, packageOf, reached, SOURCES, type Source, within } from "./architecture/sources";

const TOP_FOLDERS = [".ci", "app", "worker", "lib", "db", "drizzle", "tests", "examples"];
const TOP_FILES = [
  ".gitignore",
  "DEVELOPERS.md",
  "README.md",
  "biome.json",
  "drizzle.config.ts",
  "next.config.ts",
  "package-lock.json",
  "package.json",
  "postcss.config.mjs",
  "proxy.ts",
  "tailwind.config.ts",
  "tsconfig.json",
  "vitest.config.ts",
];

/** Each part of the pure code with the parts that it may use: what is absent is forbidden. */
const PURE: Readonly<Record<string, readonly string[]>> = {
  "lib/units": [],
  "lib/language": ["lib/units"],
  "lib/devices": ["lib/units"],
  "lib/circuit": ["lib/units", "lib/language", "lib/devices"],
  "lib/solver": ["lib/units", "lib/language", "lib/devices", "lib/circuit"],
  "lib/analyses": ["lib/units", "lib/language", "lib/devices", "lib/circuit", "lib/solver"],
};
const PURE_PARTS = Object.keys(PURE);
/** Dense matrices at the edges of solving and of fitting. */
const PURE_PACKAGES = ["ml-matrix"];

const SHARED = ["lib/errors.ts", "lib/permissions", ...PURE_PARTS];
/** As PURE, for the code that touches the world. A part may always use itself. */
const ALLOWED: Readonly<Record<string, readonly string[]>> = {
  "lib/permissions": ["lib/errors.ts", "lib/units", "lib/language"],
  "lib/errors.ts": PURE_PARTS,
  "lib/env.ts": [],
  "lib/mail": ["lib/env.ts", ...SHARED],
  "lib/queue": ["lib/env.ts", ...SHARED],
  "lib/services": ["db", "lib/queue", "lib/mail", "lib/env.ts", ...SHARED],
  "lib/auth": ["lib/services", "lib/env.ts", ...SHARED],
  "lib/api": ["lib/services", "lib/auth", "lib/env.ts", ...SHARED],
  "lib/cli": PURE_PARTS,
  "lib/stack": ["db"],
  db: ["lib/services", "lib/auth", "lib/queue", "lib/env.ts", ...SHARED],
  worker: ["lib/services", "lib/queue", "lib/env.ts", ...SHARED],
  // The reference shows what the command line says of itself.
  app: [
    ...["lib/services", "lib/auth", "lib/api", "lib/env.ts", ...SHARED],
    ...["lib/cli/commands.ts", "lib/cli/options.ts"],
  ],
  "proxy.ts": ["lib/auth"],
};

const program = [...SOURCES.values()].filter((source) => !within(source.path, ["tests"]));
const pure = program.filter((source) => within(source.path, PURE_PARTS));

function partOf(path: string, rules: Readonly<Record<string, readonly string[]>>): string | undefined {
  return Object.keys(rules).find((part) => within(path, [part]));
}

function breaches(rules: Readonly<Record<string, readonly string[]>>, sources: readonly Source[]): string[] {
  return sources.flatMap((source) => {
    const part = partOf(source.path, rules);
    if (part === undefined) return [];
    return source.imports
      .filter(({ file }) => file !== null && !within(file, [part, ...rules[part]!]))
      .map(({ file }) => `${source.path} imports ${file}`);
  });
}

describe("the layout", () => {
  it("has the top level of the house and nothing else", () => {
    const top = new Set(PATHS.map((path) => path.split("/")[0]!));
    expect([...top].filter((name) => ![...TOP_FOLDERS, ...TOP_FILES].includes(name))).toEqual([]);
  });

  it("has no folder for what has no name of its own", () => {
    const vague = PATHS.filter((path) => /(^|\/)(utils?|helpers?|types|misc|common)\//.test(path));
    expect(vague).toEqual([]);
  });

  it("has no index that only passes on what others export", () => {
    const passing = program.filter((source) => /(^|\/)index\.tsx?$/.test(source.path));
    expect(
      passing.filter((source) => !/\b(function|const|class)\b/.test(source.code)).map((s) => s.path),
    ).toEqual([]);
  });

  it("has no source file of more than 300 lines", () => {
    const long = [...SOURCES.values()].filter((source) => source.text.trimEnd().split("\n").length > 300);
    expect(long.map((source) => source.path)).toEqual([]);
  });

  it("pins every package to one version and its lock to no registry", () => {
    const { dependencies, devDependencies } = JSON.parse(readFileSync("package.json", "utf8"));
    const versions = Object.values<string>({ ...dependencies, ...devDependencies });
    expect(versions.length).toBeGreaterThan(20);
    expect(versions.filter((version) => !/^\d+\.\d+\.\d+$/.test(version))).toEqual([]);
    expect(readFileSync("package-lock.json", "utf8")).not.toContain('"resolved"');
  });

  it("names no path of a machine, no folder outside the checkout, and nothing left undone", () => {
    // Put together here, so that this file does not break its own rule.
    const outside = new RegExp(["shared/(checks", "design)"].join("|"));
    const machine = new RegExp([`/${"work"}/main`, `/${"root"}/`, `/${"home"}/[a-z]`].join("|"));
    const undone = new RegExp(
      `\\b(${["TO", "FIX", "X"].map((a, i) => a + ["DO", "ME", "XX"][i]).join("|")})\\b`,
    );
    const found = PATHS.filter(
      (path) => /\.(ts|tsx|mjs|md|json|css|sql|swn)$/.test(path) && path !== "package-lock.json",
    )
      .map((path) => ({ path, text: readFileSync(path, "utf8") }))
      .filter(({ text }) => outside.test(text) || machine.test(text) || undone.test(text));
    expect(found.map(({ path }) => path)).toEqual([]);
  });
});

describe("who may import whom", () => {
  it("is seen: the files are read and their imports found", () => {
    const imports = program.flatMap((source) => source.imports);
    expect(imports.filter(({ file }) => file !== null).length).toBeGreaterThan(300);
    expect(
      imports.filter(({ file }) => file !== null && !PATHS.includes(file)).map(({ file }) => file),
    ).toEqual([]);
  });

  it("keeps the pure parts in their order", () => {
    expect(breaches(PURE, program)).toEqual([]);
  });

  it("keeps every other part to what it may use", () => {
    expect(breaches(ALLOWED, program)).toEqual([]);
  });

  it("lets only tests import the stack, and nothing import tests", () => {
    const outer = program.filter((source) => !within(source.path, ["lib/stack"]));
    const wrong = outer.flatMap((source) =>
      source.imports
        .filter(({ file }) => file !== null && within(file, ["lib/stack", "tests"]))
        .map(() => source.path),
    );
    expect(wrong).toEqual([]);
  });

  it("keeps the pure parts free of Node, of the clock, of chance and of packages", () => {
    const wrong = pure.flatMap((source) => {
      const packages = source.imports.filter(({ file }) => file === null).map(({ wanted }) => wanted);
      const foreign = packages.filter(
        (wanted) => isBuiltin(wanted) || !PURE_PACKAGES.includes(packageOf(wanted)),
      );
      const impure = /\b(Date\.now|new Date|performance\.|Math\.random|process\.|setTimeout|fetch\()/.exec(
        source.code,
      );
      return [...foreign, ...(impure === null ? [] : [impure[0]])].map((what) => `${source.path}: ${what}`);
    });
    expect(wrong).toEqual([]);
  });

  it("keeps the solver's linear algebra package behind one file, so that it can be replaced", () => {
    const users = program.filter((source) => source.imports.some(({ wanted }) => wanted === "ml-matrix"));
    const solving = users.filter((source) => !within(source.path, ["lib/analyses"]));
    expect(solving.map((source) => source.path)).toEqual(["lib/solver/dense.ts"]);
  });

  it("keeps React and Next.js out of everything that the worker runs", () => {
    const workers = program
      .filter((source) => within(source.path, ["worker"]))
      .flatMap((source) => [...reached(source.path)]);
    const wrong = workers.filter(
      ([name]) =>
        ["next", "react", "react-dom", "next-auth"].includes(packageOf(name)) || within(name, ["app"]),
    );
    expect(wrong.map(([, way]) => way)).toEqual([]);
  });

  it("lets a page's client side reach pure parts, components and server actions only", () => {
    const server = [
      "db",
      "worker",
      "lib/services",
      "lib/auth",
      "lib/api",
      "lib/queue",
      "lib/mail",
      "lib/env.ts",
      "lib/stack",
    ];
    const clients = program.filter((source) => source.directive === "client");
    const wrong = clients
      .flatMap((source) => [...reached(source.path, (next) => next.directive === "server")])
      .filter(([name]) => within(name, server) || isBuiltin(name));
    expect(clients.length).toBeGreaterThan(0);
    expect(wrong.map(([, way]) => way)).toEqual([]);
  });
});
