import { createServer, type Server } from "node:net";
import { afterEach, describe, expect, it } from "vitest";
import { choosePort, freePort, isFree, keepPort, USUAL_PORT } from "@/lib/stack/ports";

const open: Server[] = [];

afterEach(async () => {
  for (const server of open.splice(0)) await new Promise((done) => server.close(done));
});

function listen(port: number, host: string): Promise<number> {
  const server = createServer();
  open.push(server);
  return new Promise((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, host, () => resolve((server.address() as { port: number }).port));
  });
}

describe("a port", () => {
  it("is free until somebody listens on it, by any address", async () => {
    const port = await freePort();
    expect(await isFree(port)).toBe(true);
    await listen(port, "0.0.0.0");
    expect(await isFree(port)).toBe(false);
  });

  it("that was asked for and is taken is a sentence with the way out", async () => {
    const port = await listen(0, "127.0.0.1");
    await expect(choosePort(String(port))).rejects.toThrow(
      `Port ${port} is taken by another program. Stop that one, or choose another port: PORT=${port + 1} npm start`,
    );
  });

  it("that was asked for and is free is taken", async () => {
    const port = await freePort();
    expect(await choosePort(String(port))).toBe(port);
  });

  it.each(["http", "0", "65536", "43.5", "-1"])("cannot be %s", async (given) => {
    await expect(choosePort(given)).rejects.toThrow(`PORT is "${given}", which is no port.`);
  });

  it("is looked at again after the build: kept while free, given up for another or refused when not", async () => {
    const port = await freePort();
    expect(await keepPort(port, String(port))).toBe(port);
    await listen(port, "127.0.0.1");
    await expect(keepPort(port, String(port))).rejects.toThrow(`Port ${port} is taken by another program.`);
    expect(await keepPort(port, undefined)).toBeGreaterThanOrEqual(USUAL_PORT);
  });

  it("is the usual one or a later one when none was asked for", async () => {
    const chosen = await choosePort(undefined);
    expect(chosen).toBeGreaterThanOrEqual(USUAL_PORT);
    await listen(chosen, "127.0.0.1");
    expect(await choosePort("")).toBeGreaterThan(chosen);
  });
});
