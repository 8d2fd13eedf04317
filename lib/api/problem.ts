import { randomUUID } from "node:crypto";
import { AppError, type ErrorCode } from "@/lib/errors";

/** The HTTP status of each error. */
export const STATUS: Readonly<Record<ErrorCode, number>> = {
  invalid: 400,
  "signed out": 401,
  "not allowed": 403,
  "not found": 404,
  "not acceptable": 406,
  conflict: 409,
  "precondition failed": 412,
  "too large": 413,
  "key reused": 422,
  "precondition required": 428,
  "too many": 429,
  unavailable: 503,
};

/** What PostgreSQL, its driver and the system call a database that is away or shutting down. */
const AWAY = /^(ECONN\w+|EPIPE|ETIMEDOUT|ENOENT|57P0[1-5]|08\w{3}|53300)$/;
const AWAY_SAYS = /connection (terminated|timeout|ended)|timeout exceeded when trying to connect/i;

/**
 * The answer to an error, as problem details (RFC 9457): `detail` is the sentence, `code` the word of `ErrorCode`, and what the
 * error has as details stands beside them. What nobody threw on purpose is logged, and told by a reference only.
 */
export function problem(error: unknown): Response {
  const known = error instanceof AppError ? error : awayError(error);
  if (known === null) {
    const reference = randomUUID();
    console.error(`Request failed (reference ${reference}).`, error);
    const detail =
      "Something went wrong on our side. Try again; if it stays, tell whoever looks after this service.";
    return answer(500, "internal error", detail, { reference });
  }
  const { code, message, details } = known;
  const retryAfter = code === "unavailable" ? 5 : details.retryAfter;
  return answer(STATUS[code], code, message, details, typeof retryAfter === "number" ? retryAfter : null);
}

function answer(
  status: number,
  title: string,
  detail: string,
  more: Readonly<Record<string, unknown>>,
  retryAfter: number | null = null,
): Response {
  const headers = new Headers({ "content-type": "application/problem+json", "cache-control": "no-store" });
  if (retryAfter !== null) headers.set("retry-after", String(retryAfter));
  const body = { ...more, type: "about:blank", title, status, code: title, detail };
  return new Response(JSON.stringify(body), { status, headers });
}

/** "unavailable" for an error that says the database does not answer; it may lie in a chain of causes. */
function awayError(error: unknown): AppError | null {
  for (let cause = error; cause instanceof Error; cause = cause.cause) {
    const code = "code" in cause ? String(cause.code) : "";
    if (AWAY.test(code) || AWAY_SAYS.test(cause.message)) {
      console.warn(`The database does not answer: ${cause.message}`);
      return new AppError(
        "unavailable",
        "The database does not answer at the moment. Try again in a few seconds.",
      );
    }
  }
  return null;
}
