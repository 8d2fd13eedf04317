import { spawnSync } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { dirname, join, resolve } from "node:path";
import { fileURLToPath } from "node:url";

/** Top of the checkout; every command works from there, wherever it was called. */
const ROOT = resolve(dirname(fileURLToPath(import.meta.url)), "../..");

/** Oldest Node.js that the packages in the lock run on. */
const OLDEST = [20, 20];

/**
 * Makes sure of Node.js and of the packages, then runs a TypeScript file of this folder in the same process. This file and the
 * three that call it use Node's own modules only, since they run before anything is installed.
 */
export async function handOver(file) {
  process.chdir(ROOT);
  requireNode(process.versions.node);
  if (!installed(ROOT)) install();
  const { register } = await import("tsx/esm/api");
  register();
  await import(new URL(file, import.meta.url).href);
}

function requireNode(version) {
  const [major, minor] = version.split(".").map(Number);
  if (major > OLDEST[0] || (major === OLDEST[0] && minor >= OLDEST[1])) return;
  giveUp(
    `Sweepwright needs Node.js ${OLDEST.join(".")} or newer; this is ${version}. Install it and start again.`,
  );
}

/**
 * Whether node_modules holds what package-lock.json asks for. npm writes a lock of its own into node_modules when an install has
 * ended, so one that was cut off is not taken for whole; packages for other machines may be absent.
 */
export function installed(root) {
  const wanted = packagesIn(join(root, "package-lock.json"));
  const present = packagesIn(join(root, "node_modules", ".package-lock.json"));
  if (wanted === null || present === null) return false;
  return Object.entries(wanted).every(
    ([path, entry]) => path === "" || entry.optional || present[path]?.version === entry.version,
  );
}

function packagesIn(file) {
  if (!existsSync(file)) return null;
  try {
    return JSON.parse(readFileSync(file, "utf8")).packages ?? null;
  } catch {
    return null;
  }
}

function install() {
  console.log("Installing the packages of package-lock.json.");
  const began = Date.now();
  const command = ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"];
  const made = spawnSync("npm", command, {
    cwd: ROOT,
    stdio: ["ignore", "inherit", "pipe"],
    encoding: "utf8",
  });
  if (made.error?.code === "ENOENT")
    giveUp("npm is missing. Install it (it comes with Node.js) and start again.");
  if (made.status !== 0) giveUp(`The packages could not be installed. ${reason(made.stderr ?? "")}`);
  console.log(`Installed in ${((Date.now() - began) / 1000).toFixed(1)} s.`);
}

/** What npm says, as a sentence where it is one of the usual causes. */
function reason(text) {
  if (/ENOSPC/.test(text)) return "The disk is full: free about 1.5 GB and start again.";
  if (/EACCES|EPERM|EROFS/.test(text))
    return `${ROOT} cannot be written by this user: give it the right, or copy the folder.`;
  if (/ENOTFOUND|EAI_AGAIN|ECONNREFUSED|ETIMEDOUT/.test(text))
    return "The npm registry cannot be reached: check the network.";
  return `npm says:\n${text.trim()}`;
}

function giveUp(sentence) {
  console.error(sentence);
  process.exit(1);
}
