import { spawn } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { dataFolder } from "@/lib/stack/folders";
import { hold } from "@/lib/stack/holder";
import { identityOf, isAlive } from "@/lib/stack/identity";
import { newSettings, readSettings, writeSettings } from "@/lib/stack/settings";

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "sweepwright-unit-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe("where the data is kept", () => {
  it("is in the checkout for an ordinary user, below /var/lib for root, and where one says", () => {
    expect(dataFolder(folder, false, "")).toBe(join(folder, ".data"));
    expect(dataFolder(folder, true, "")).toMatch(/^\/var\/lib\/sweepwright\/[0-9a-f]{12}$/);
    expect(dataFolder(folder, true, "elsewhere")).toBe(join(folder, "elsewhere"));
    expect(dataFolder(folder, false, "/srv/sweepwright")).toBe("/srv/sweepwright");
  });

  it("differs from one checkout to another", () => {
    expect(dataFolder(folder, true, "")).not.toBe(dataFolder(tmpdir(), true, ""));
    expect(dataFolder(folder, true, "")).toBe(dataFolder(`${folder}/.`, true, ""));
  });
});

describe("the settings", () => {
  it("are kept as they were, for their owner's eyes", () => {
    const file = join(folder, "settings.json");
    expect(readSettings(file)).toBeNull();
    const settings = newSettings(51_234);
    writeSettings(file, settings);
    expect(readSettings(file)).toEqual(settings);
    expect(statSync(file).mode & 0o777).toBe(0o600);
  });

  it("have secrets of their own each time", () => {
    const [one, two] = [newSettings(1), newSettings(1)];
    expect(new Set([one.databasePassword, one.secret, two.databasePassword, two.secret]).size).toBe(4);
  });

  it.each(["", "{", "{}", '{"databasePort": "x"}'])("that read %j are reported as damaged", (text) => {
    const file = join(folder, "settings.json");
    writeFileSync(file, text);
    expect(() => readSettings(file)).toThrow(`${file} is damaged; it holds the database's password.`);
  });
});

describe("a held data folder", () => {
  const file = () => join(folder, "running.json");

  it("refuses a second holder with a sentence that says where the first one is", async () => {
    const first = await hold(file());
    await expect(hold(file())).rejects.toThrow(`already runs from this folder (process ${process.pid})`);
    first.setAddress("http://localhost:4300");
    await expect(hold(file())).rejects.toThrow("already runs from this folder, at http://localhost:4300");
    first.release();
    expect(existsSync(file())).toBe(false);
    (await hold(file())).release();
  });

  it("is taken over from a process that is gone, also when its number is used again", async () => {
    writeFileSync(
      file(),
      JSON.stringify({ name: "npm start", pid: process.pid, identity: "another boot:1", children: [] }),
    );
    const taken = await hold(file());
    expect(JSON.parse(readFileSync(file(), "utf8"))).toMatchObject({
      pid: process.pid,
      identity: identityOf(process.pid),
    });
    taken.release();
  });

  it.each(["", "{", "null"])("is taken over from a record cut off at %j", async (text) => {
    writeFileSync(file(), text);
    (await hold(file())).release();
  });

  it("ends the programs that a killed holder left, and no others", async () => {
    const left = spawn("sleep", ["300"]);
    const other = spawn("sleep", ["300"]);
    const ended = new Promise((done) => left.once("exit", done));
    const children = [
      { name: "worker", pid: left.pid, identity: identityOf(left.pid ?? 0) },
      { name: "web service", pid: other.pid, identity: "another boot:1" },
    ];
    writeFileSync(
      file(),
      JSON.stringify({ name: "npm start", pid: 1, identity: "another boot:1", children }),
    );
    const taken = await hold(file());
    await ended;
    expect(isAlive(other.pid ?? 0)).toBe(true);
    other.kill();
    taken.release();
  });
});
