import { type Algorithm, hash, verify } from "@node-rs/argon2";

/** Argon2id with the parameters of the product's design: 19 MiB, two passes, one lane (RFC 9106). */
const OPTIONS = {
  algorithm: 2 satisfies Algorithm,
  memoryCost: 19_456,
  timeCost: 2,
  parallelism: 1,
} as const;

/** What a password may be. A longer one is refused before it costs anything to hash. */
export const PASSWORD_LENGTH = { shortest: 8, longest: 128 } as const;

let decoy: Promise<string> | undefined;

/** The PHC string to store for `password`. */
export function hashPassword(password: string): Promise<string> {
  return hash(password, OPTIONS);
}

/**
 * Whether `password` belongs to `stored`. With no account (null) a decoy is verified instead, so that the answer takes as long and
 * does not tell whether the account exists.
 */
export async function passwordMatches(stored: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword("no account has this password");
  const against = stored ?? (await decoy);
  const offered = password.slice(0, PASSWORD_LENGTH.longest);
  const same = await verify(against, offered);
  return same && stored !== null && offered.length === password.length;
}
