import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { runPackage } from "./command";
import { countReport, single, type Tally } from "./tally";

/** Where a test run keeps what it builds and reports; git does not see it. */
export const TEST_FOLDER = ".test";
const TEST_DIST = `${TEST_FOLDER}/next`;
const TEST_TSCONFIG = `${TEST_FOLDER}/tsconfig.json`;

type Environment = Readonly<Record<string, string>>;

/** Format and lint of every file that git sees. */
export async function checkFormat(): Promise<Tally> {
  const ended = await runPackage("@biomejs/biome/bin/biome", [
    "ci",
    "--error-on-warnings",
    `--colors=${process.stdout.isTTY ? "force" : "off"}`,
    ".",
  ]);
  return single(ended.code === 0);
}

/** Types of the whole tree, with the types that Next.js makes from the routes. */
export async function checkTypes(): Promise<Tally> {
  writeTestTsconfig();
  const env = { SWEEPWRIGHT_DIST: TEST_DIST };
  const routes = await runPackage("next/dist/bin/next", ["typegen"], { env, output: "keep" });
  if (routes.code !== 0) {
    console.error(routes.text);
    return single(false);
  }
  const types = await runPackage("typescript/bin/tsc", ["--noEmit", "-p", TEST_TSCONFIG]);
  return single(types.code === 0);
}

/** The tests of one project of vitest.config.ts. */
export async function runTests(project: string, env: Environment = {}): Promise<Tally> {
  mkdirSync(TEST_FOLDER, { recursive: true });
  const report = `${TEST_FOLDER}/${project}.json`;
  rmSync(report, { force: true });
  const args = ["run", "--project", project, "--reporter=default", "--reporter=json"];
  const ended = await runPackage("vitest/vitest.mjs", [...args, `--outputFile.json=${report}`], { env });
  return countReport(report, ended.code);
}

/** Next.js writes its own folders into the tsconfig it is given; this one stands beside the test build and is made anew. */
export function writeTestTsconfig(): void {
  mkdirSync(TEST_FOLDER, { recursive: true });
  const config = {
    extends: "../tsconfig.json",
    compilerOptions: { tsBuildInfoFile: "types.tsbuildinfo" },
    include: [
      "../next-env.d.ts",
      "../**/*.ts",
      "../**/*.tsx",
      "next/types/**/*.ts",
      "next/dev/types/**/*.ts",
    ],
    exclude: ["../node_modules", "../.build", "../.data"],
  };
  writeFileSync(TEST_TSCONFIG, `${JSON.stringify(config, null, 2)}\n`);
}
