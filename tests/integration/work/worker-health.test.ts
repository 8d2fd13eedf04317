import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import { makeActor, makeRun } from "@/db/factories";
import { type OwnDatabase, ownDatabase } from "./own-database";
import { ended, enqueue, runUntil } from "./runs";
import { endWorkers, startWorker } from "./worker-process";

let own: OwnDatabase;
beforeAll(async () => {
  own = await ownDatabase();
});
afterEach(endWorkers);
afterAll(() => own.drop());

const status = async (url: string) => (await fetch(url)).status;

test("a worker is live and ready, knows no other address, and answers GET only", async () => {
  const { health } = await startWorker();
  await expect.poll(() => status(`${health}/ready`), { timeout: 20_000 }).toBe(200);
  expect(await status(`${health}/health`)).toBe(200);
  expect(await (await fetch(`${health}/ready`)).json()).toEqual({ ready: true });
  expect(await status(`${health}/`)).toBe(404);
  expect((await fetch(`${health}/health`, { method: "POST" })).status).toBe(405);
});

test("an idle worker stops cleanly on either signal", async () => {
  const first = await startWorker();
  expect(await first.stop()).toBe(0);
  const second = await startWorker();
  second.process.kill("SIGINT");
  await expect.poll(() => second.process.exitCode, { timeout: 20_000 }).toBe(0);
});

test("without its database a worker stays live, is not ready, and is ready again afterwards", async () => {
  const worker = await startWorker();
  await expect.poll(() => status(`${worker.health}/ready`), { timeout: 20_000 }).toBe(200);
  await own.shut(true);
  await expect.poll(() => status(`${worker.health}/ready`), { timeout: 20_000 }).toBe(503);
  expect(await status(`${worker.health}/health`)).toBe(200);
  await own.shut(false);
  await expect.poll(() => status(`${worker.health}/ready`), { timeout: 20_000 }).toBe(200);
  const { id } = await makeRun(await makeActor());
  await enqueue(id);
  expect(await runUntil(id, ended)).toMatchObject({ status: "done" });
  expect(worker.process.exitCode).toBeNull();
});

test("a missing setting is named, and the worker does not start", async () => {
  await expect(startWorker({ DATABASE_URL: "" })).rejects.toThrow(/DATABASE_URL/);
});
