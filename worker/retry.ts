/** First and longest wait between two tries, ms. */
const WAIT = { first: 100, longest: 1_000 } as const;

/** Codes of the operating system for a connection that is refused, broken or too slow. */
const BROKEN = new Set(["ECONNREFUSED", "ECONNRESET", "EPIPE", "ETIMEDOUT", "ENOENT", "EHOSTUNREACH"]);
/** SQLSTATE by its start: connection, rollback, resources, operator's intervention, a database closed for a while. */
const PASSING = ["08", "40", "53", "57P", "55000"];

/** Whether `error`, or what caused it, is the database being away or overfull for a while, so that a later try may succeed. */
export function isPassing(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const { code } = error as { code?: unknown };
  if (typeof code === "string" && (BROKEN.has(code) || PASSING.some((start) => code.startsWith(start)))) {
    return true;
  }
  if (/connection (terminated|ended|timeout)|timeout exceeded when trying to connect/i.test(error.message)) {
    return true;
  }
  return error instanceof AggregateError ? error.errors.some(isPassing) : isPassing(error.cause);
}

/** Tries `action` until it succeeds, as long as it fails only because the database is away, or until `signal`. */
export async function persist<T>(signal: AbortSignal, action: () => Promise<T>): Promise<T> {
  for (let wait: number = WAIT.first; ; wait = Math.min(2 * wait, WAIT.longest)) {
    try {
      return await action();
    } catch (error) {
      if (!isPassing(error) || signal.aborted) throw error;
    }
    await new Promise((resolve) => setTimeout(resolve, wait));
  }
}
