import { expect, test } from "vitest";
import { isPassing, persist } from "@/worker/retry";

const withCode = (code: string) => Object.assign(new Error("refused"), { code });

test("a database that is away, starting, overfull or in a deadlock passes", () => {
  // SQLSTATE codes as in PostgreSQL's manual, appendix A.
  for (const code of [
    "08006",
    "57P01",
    "57P02",
    "57P03",
    "53300",
    "53100",
    "40001",
    "40P01",
    "ECONNREFUSED",
  ]) {
    expect(isPassing(withCode(code)), code).toBe(true);
    expect(isPassing(new Error("Failed query", { cause: withCode(code) })), code).toBe(true);
  }
  expect(isPassing(new AggregateError([withCode("ECONNREFUSED")]))).toBe(true);
  expect(isPassing(new Error("Connection terminated unexpectedly"))).toBe(true);
});

test("a fault of ours does not pass", () => {
  for (const code of ["23505", "42601", "22003", "57014"])
    expect(isPassing(withCode(code)), code).toBe(false);
  expect(isPassing(new TypeError("undefined is not a function"))).toBe(false);
  expect(isPassing("a string")).toBe(false);
  expect(isPassing(undefined)).toBe(false);
});

test("an action is tried until it succeeds, and no longer", async () => {
  let tries = 0;
  const action = async () => {
    tries++;
    if (tries < 4) throw withCode("57P01");
    return "stored";
  };
  expect(await persist(new AbortController().signal, action)).toBe("stored");
  expect(tries).toBe(4);
});

test("a fault of ours is thrown at once", async () => {
  let tries = 0;
  const action = async () => {
    tries++;
    throw withCode("23505");
  };
  await expect(persist(new AbortController().signal, action)).rejects.toThrow("refused");
  expect(tries).toBe(1);
});

test("whoever stops is not kept by a database that stays away", async () => {
  const stopping = new AbortController();
  let tries = 0;
  const action = async () => {
    tries++;
    if (tries === 2) stopping.abort();
    throw withCode("57P03");
  };
  await expect(persist(stopping.signal, action)).rejects.toThrow("refused");
  expect(tries).toBe(2);
});
