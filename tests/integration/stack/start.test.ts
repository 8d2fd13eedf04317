import { type ChildProcess, spawn } from "node:child_process";
import { chmodSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { identityOf } from "@/lib/stack/identity";
import { freePort } from "@/lib/stack/ports";

let data: string;
const started: ChildProcess[] = [];

beforeEach(() => {
  data = mkdtempSync(join(tmpdir(), "sweepwright-start-"));
  // Under root the database's user must be able to enter.
  chmodSync(data, 0o755);
});
afterEach(() => {
  for (const child of started.splice(0)) child.kill("SIGKILL");
  rmSync(data, { recursive: true, force: true });
});

/** Runs what `npm start` runs, in a data folder of its own; resolves with its exit code and all that it printed. */
function start(env: Record<string, string>): Promise<{ code: number | null; text: string }> {
  const child = spawn(process.execPath, ["lib/stack/start.mjs"], {
    env: { ...process.env, SWEEPWRIGHT_DATA: data, ...env },
  });
  started.push(child);
  let text = "";
  child.stdout.on("data", (part) => {
    text += part;
  });
  child.stderr.on("data", (part) => {
    text += part;
  });
  return new Promise((resolve) => child.once("close", (code) => resolve({ code, text: text.trim() })));
}

describe("a start that cannot be", () => {
  it("says in one sentence that the port is taken", async () => {
    const server = createServer();
    const port = await freePort();
    await new Promise<void>((done) => server.listen(port, "127.0.0.1", done));
    try {
      expect(await start({ PORT: String(port) })).toEqual({
        code: 1,
        text: `Port ${port} is taken by another program. Stop that one, or choose another port: PORT=${port + 1} npm start`,
      });
    } finally {
      server.close();
    }
  });

  it("says in one sentence that another start holds the folder, and leaves that one its folder", async () => {
    const file = join(data, "running.json");
    const record = {
      name: "npm start",
      pid: process.pid,
      identity: identityOf(process.pid),
      address: "http://localhost:4399",
    };
    writeFileSync(file, JSON.stringify({ ...record, children: [] }));
    expect(await start({})).toEqual({
      code: 1,
      text: `Sweepwright already runs from this folder, at http://localhost:4399 (process ${process.pid}). Use that one, or stop it first: kill ${process.pid}`,
    });
    expect(JSON.parse(readFileSync(file, "utf8"))).toMatchObject(record);
  });

  it("says in one sentence that the settings are damaged, and lets go of the folder", async () => {
    writeFileSync(join(data, "settings.json"), "{");
    const { code, text } = await start({ PORT: String(await freePort()) });
    expect(code).toBe(1);
    expect(text).toMatch(/settings\.json is damaged; it holds the database's password\. [^\n]*$/);
    expect(() => readFileSync(join(data, "running.json"))).toThrow();
  });
});
