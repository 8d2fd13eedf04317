import RedisMock from "ioredis-mock";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { openThrottle, type Throttle } from "@/lib/auth/throttle";
import { AppError } from "@/lib/errors";

/** Counters of this process, in ioredis-mock, which all of its clients share: emptied before each test. */
let throttle: Throttle;
beforeEach(async () => {
  await new RedisMock().flushall();
  throttle = openThrottle(undefined);
});
afterEach(() => throttle.close());

async function attempts(count: number, email: (i: number) => string, address: (i: number) => string) {
  const answers: (AppError | null)[] = [];
  for (let i = 0; i < count; i++) {
    answers.push(
      await throttle.attempt(email(i), address(i)).then(
        () => null,
        (error) => error as AppError,
      ),
    );
  }
  return answers;
}

describe("the throttle of sign-in", () => {
  it("lets ten attempts at an account through in any spelling and from any address, and refuses the eleventh", async () => {
    const spellings = ["erik@bench.example", "ERIK@bench.example ", " Erik@Bench.Example"];
    const answers = await attempts(
      11,
      (i) => spellings[i % 3]!,
      (i) => `192.0.2.${i}`,
    );
    expect(answers.slice(0, 10)).toEqual(Array(10).fill(null));
    expect(answers[10]).toBeInstanceOf(AppError);
    expect(answers[10]?.code).toBe("too many");
    const wait = answers[10]?.details.retryAfter as number;
    expect(wait).toBeGreaterThan(0);
    expect(wait).toBeLessThanOrEqual(15 * 60);
  });

  it("refuses the 61st attempt from an address, whatever the account", async () => {
    const answers = await attempts(
      61,
      (i) => `person-${i}@bench.example`,
      () => "192.0.2.7",
    );
    expect(answers.findIndex((answer) => answer !== null)).toBe(60);
    expect(answers[60]?.code).toBe("too many");
  });

  it("does not hold one account's failures against another", async () => {
    await attempts(
      11,
      () => "erik@bench.example",
      () => "192.0.2.1",
    );
    expect(
      await attempts(
        1,
        () => "rosa@bench.example",
        () => "192.0.2.1",
      ),
    ).toEqual([null]);
  });

  it("starts an account afresh after a right password", async () => {
    await attempts(
      9,
      () => "erik@bench.example",
      () => "192.0.2.1",
    );
    await throttle.succeeded("erik@bench.example", "192.0.2.1");
    expect(
      await attempts(
        10,
        () => "erik@bench.example",
        () => "192.0.2.1",
      ),
    ).toEqual(Array(10).fill(null));
  });

  it("refuses with 'unavailable' when the store of counters does not answer", async () => {
    const away = openThrottle("redis://127.0.0.1:9");
    await expect(away.attempt("erik@bench.example", "192.0.2.1")).rejects.toMatchObject({
      code: "unavailable",
    });
    await away.close().catch(() => undefined);
  });
});
