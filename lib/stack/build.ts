import { existsSync, mkdirSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { build as bundle, stop as stopBundler } from "esbuild";
import { runPackage } from "./command";
import { Complaint, fullDisk } from "./complaint";
import { isStamped, sourceStamp, writeStamp } from "./stamp";

/** Where the built pages and the built worker are put, both within the checkout. */
export interface Outputs {
  /** Next.js's folder. */
  readonly pages: string;
  /** Folder of main.mjs and solve-thread.mjs. */
  readonly worker: string;
  /** Folder of main.mjs and solve-thread.mjs of the command line, where its launcher looks for them; null: not built. */
  readonly commandLine: string | null;
}

export const DEMO_OUTPUTS: Outputs = { pages: ".next", worker: ".build/worker", commandLine: ".build/cli" };

/** Builds what the sources have changed since. */
export async function buildAll(outputs: Outputs): Promise<void> {
  const stamp = sourceStamp(process.cwd());
  await unlessStamped(outputs.worker, stamp, () => buildWorker(outputs.worker));
  const { commandLine } = outputs;
  if (commandLine !== null) await unlessStamped(commandLine, stamp, () => buildCommandLine(commandLine));
  await unlessStamped(outputs.pages, stamp, async () => {
    console.log("Building the pages (about a minute the first time).");
    await buildPages(outputs.pages);
  });
}

async function unlessStamped(folder: string, stamp: string, build: () => Promise<void>): Promise<void> {
  const file = join(folder, "sources.stamp");
  if (isStamped(file, stamp)) return;
  rmSync(file, { force: true });
  await build();
  writeStamp(file, stamp);
}

async function buildPages(folder: string): Promise<void> {
  const env = { NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1", SWEEPWRIGHT_DIST: folder };
  const made = await runPackage("next/dist/bin/next", ["build"], { env, output: "keep" });
  if (made.code === 0 && existsSync(join(folder, "BUILD_ID"))) return;
  const log = join(dirname(folder), ".build", "pages.log");
  mkdirSync(dirname(log), { recursive: true });
  writeFileSync(log, made.text);
  const last = made.text.trim().split("\n").slice(-20).join("\n");
  throw new Complaint(
    fullDisk(made.text, process.cwd()) ?? `The pages could not be built (${log}):\n${last}`,
  );
}

/** One file for the worker and one for the thread that computes; packages stay in node_modules. */
export async function buildWorker(folder: string): Promise<void> {
  await bundleInto(folder, ["./worker/main.ts", "./worker/solve-thread.ts"]);
}

/** One file for the command line and one for the threads that solve. */
export async function buildCommandLine(folder: string): Promise<void> {
  await bundleInto(folder, ["./lib/cli/main.ts", "./lib/cli/solve-thread.ts"]);
}

async function bundleInto(folder: string, entryPoints: string[]): Promise<void> {
  await bundle({
    entryPoints,
    outdir: folder,
    outExtension: { ".js": ".mjs" },
    bundle: true,
    packages: "external",
    platform: "node",
    format: "esm",
    target: "node20",
    sourcemap: "linked",
    logLevel: "warning",
  });
  await stopBundler();
}
