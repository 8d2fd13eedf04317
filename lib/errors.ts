/** What went wrong, in words; each has one HTTP status (lib/api/problem.ts). */
export type ErrorCode =
  | "invalid"
  | "signed out"
  | "not allowed"
  | "not found"
  | "not acceptable"
  | "conflict"
  | "precondition failed"
  | "precondition required"
  | "key reused"
  | "too large"
  | "too many"
  | "unavailable";

/**
 * The one error that a service throws on purpose. `message` is a sentence for the reader: what is wrong and how to mend it.
 * `details` is serialisable and goes out beside it, such as `{ diagnostics }` or `{ retryAfter }` in seconds.
 */
export class AppError extends Error {
  override readonly name = "AppError";

  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly details: Readonly<Record<string, unknown>> = {},
  ) {
    super(message);
  }
}
