import { afterEach, beforeEach, expect, it, vi } from "vitest";
import { GET as ready } from "@/app/api/health/ready/route";
import { GET as live } from "@/app/api/health/route";
import { closeDatabase } from "@/db/client";
import { call } from "./caller";

const given = process.env.DATABASE_URL;

/** The server of the tests, but a database that it does not have. */
function elsewhere(): string {
  const url = new URL(given!);
  url.pathname = "/there_is_none";
  return url.href;
}

beforeEach(async () => {
  vi.spyOn(console, "warn").mockImplementation(() => undefined);
  await closeDatabase();
});
afterEach(async () => {
  vi.restoreAllMocks();
  await closeDatabase();
  process.env.DATABASE_URL = given;
});

it("is live and ready while the database answers", async () => {
  expect([live().status, (await call(ready, null)).status]).toEqual([200, 200]);
});

it.each([
  ["is not there", elsewhere],
  ["does not answer", () => "postgresql://nobody@127.0.0.1:9/none"],
])("is live but not ready (503, with Retry-After) while the database %s", async (_, url) => {
  process.env.DATABASE_URL = url();
  const answer = await call(ready, null);
  expect([live().status, answer.status, answer.headers.get("retry-after")]).toEqual([200, 503, "5"]);
});
