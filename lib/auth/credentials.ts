import { z } from "zod";
import { AppError } from "@/lib/errors";
import { findAccount } from "@/lib/services/sessions/find-account";
import { openSession } from "@/lib/services/sessions/open-session";
import { passwordMatches } from "./password";
import { throttle } from "./throttle";

/** PostgreSQL takes no NUL, so no account has one in its address. */
const email = z
  .string()
  .trim()
  .min(1)
  .max(254)
  .refine((text) => !text.includes("\0"));
const given = z.object({ email, password: z.string().min(1).max(1_000) });

export interface SignedIn {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly sessionId: string;
}

/**
 * Proves an e-mail address and a password and opens a session. Null when they do not belong together, whichever of the two is
 * wrong. Throws "too many" when the account or the address is throttled.
 */
export async function signIn(
  credentials: unknown,
  from: { readonly address: string; readonly userAgent: string | null },
): Promise<SignedIn | null> {
  const read = given.safeParse(credentials);
  if (!read.success) return null;
  const { email, password } = read.data;
  await throttle().attempt(email, from.address);
  const account = await findAccount(email);
  if (!(await passwordMatches(account?.passwordHash ?? null, password)) || account === null) return null;
  await throttle().succeeded(email, from.address);
  const { userId, name } = account;
  const sessionId = await openSession({ userId, ...from });
  return { userId, name, email: account.email, sessionId };
}

/** What the sign-in page is told of an error: "too many:SECONDS" or "unavailable". */
export function refusalCode(error: unknown): string {
  if (error instanceof AppError && error.code === "too many") return `too many:${error.details.retryAfter}`;
  return "unavailable";
}
