import { createHash } from "node:crypto";
import { Redis } from "ioredis";
import RedisMock from "ioredis-mock";
import { RateLimiterRedis, RateLimiterRes } from "rate-limiter-flexible";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";

/** Attempts within the window, then a wait until it has passed. An address may be shared by a whole team. */
const WINDOW_SECONDS = 15 * 60;
const ACCOUNT_ATTEMPTS = 10;
const ADDRESS_ATTEMPTS = 60;

/** Counts attempts to sign in. */
export interface Throttle {
  /** Counts one attempt; throws "too many" with `details.retryAfter` in seconds, or "unavailable" when it cannot count. */
  attempt(email: string, address: string): Promise<void>;
  /** Takes the attempt back, since the password was right; the account starts afresh. */
  succeeded(email: string, address: string): Promise<void>;
  close(): Promise<void>;
}

/** Counts in Redis at `url` for all processes together, or within this process by ioredis-mock when there is none. */
export function openThrottle(url: string | undefined): Throttle {
  const redis: Redis =
    url === undefined ? new RedisMock() : new Redis(url, { maxRetriesPerRequest: 1, connectTimeout: 2_000 });
  redis.on("error", (error) => console.warn(`The throttle's connection was lost: ${error.message}`));
  const limiter = (keyPrefix: string, points: number) =>
    new RateLimiterRedis({ storeClient: redis, keyPrefix, points, duration: WINDOW_SECONDS });
  const accounts = limiter("sign-in-account", ACCOUNT_ATTEMPTS);
  const addresses = limiter("sign-in-address", ADDRESS_ATTEMPTS);
  return {
    async attempt(email, address) {
      try {
        await addresses.consume(address);
        await accounts.consume(accountKey(email));
      } catch (refusal) {
        if (!(refusal instanceof RateLimiterRes)) {
          throw new AppError("unavailable", "Sign-in is not available at the moment. Try again in a minute.");
        }
        const retryAfter = Math.ceil(refusal.msBeforeNext / 1000);
        throw new AppError("too many", `Too many attempts to sign in. Wait ${retryAfter} seconds.`, {
          retryAfter,
        });
      }
    },
    async succeeded(email, address) {
      await Promise.all([accounts.delete(accountKey(email)), addresses.reward(address)]);
    },
    async close() {
      await redis.quit();
    },
  };
}

/** Addresses of people do not belong into a store of counters. */
function accountKey(email: string): string {
  return createHash("sha256").update(email.trim().toLowerCase()).digest("base64url");
}

const KEY = Symbol.for("sweepwright.throttle");
const held = globalThis as { [KEY]?: Throttle };

/** The throttle of this process. */
export function throttle(): Throttle {
  held[KEY] ??= openThrottle(env().REDIS_URL);
  return held[KEY];
}
