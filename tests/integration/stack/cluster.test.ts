import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { Client } from "pg";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { identityOf } from "@/lib/stack/identity";
import { type Throwaway, throwaway } from "@/lib/stack/throwaway";

let cluster: Throwaway;
let url: string;

beforeAll(async () => {
  cluster = await throwaway();
  url = await cluster.database("sweepwright");
});

afterAll(() => cluster.remove());

async function query<Row extends object>(text: string, address = url): Promise<Row[]> {
  const client = new Client({ connectionString: address });
  await client.connect();
  try {
    return (await client.query<Row>(text)).rows;
  } finally {
    await client.end();
  }
}

describe("a cluster of our own", () => {
  it("takes its password only, by scram-sha-256", async () => {
    const wrong = new URL(url);
    wrong.password = "something-else";
    await expect(query("SELECT 1", wrong.href)).rejects.toThrow(/password authentication failed/);
    const rules = await query<{ auth_method: string }>("SELECT auth_method FROM pg_hba_file_rules");
    expect(new Set(rules.map((rule) => rule.auth_method))).toEqual(new Set(["scram-sha-256"]));
  });

  it("listens on the loopback address and makes no socket file", async () => {
    const rows = await query<{ listen: string; sockets: string }>(
      "SELECT current_setting('listen_addresses') AS listen, current_setting('unix_socket_directories') AS sockets",
    );
    expect(rows).toEqual([{ listen: "127.0.0.1", sockets: "" }]);
  });

  it("makes a database once", async () => {
    expect(await cluster.database("sweepwright")).toBe(url);
  });

  it("keeps what was committed over a restart, on the same address", async () => {
    await query("CREATE TABLE kept AS SELECT 7 AS value");
    await cluster.restart();
    expect(await query("SELECT value FROM kept")).toEqual([{ value: 7 }]);
  });

  it("starts again after the server was killed, by itself and with everything it had begun", async () => {
    const sleeping = query("SELECT pg_sleep(60)").catch((error: Error) => error);
    await cluster.crash();
    expect(await sleeping).toBeInstanceOf(Error);
    expect(await query("SELECT 1 AS one")).toEqual([{ one: 1 }]);
  });

  it("writes its number down where the next start looks for it", async () => {
    const pid = cluster.pid() ?? 0;
    expect(readdirSync(cluster.folder)).toContain("log");
    expect(readFileSync(join(cluster.folder, "postgres", "postmaster.pid"), "utf8")).toMatch(
      new RegExp(`^${pid}\n`),
    );
    expect(identityOf(pid)).not.toBeNull();
  });
});
