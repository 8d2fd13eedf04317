import { AppError } from "@/lib/errors";

/** The entity tag of a revision, which is also that of the netlist whose newest one it is. */
export function revisionTag(netlistId: string, number: number): string {
  return `"1-${netlistId}-${number}"`;
}

/**
 * The revision that a change is to stand upon. `base` is what the body says; If-Match (RFC 9110, 13.1.1) names it by its entity tag
 * and wins. Throws "precondition required" where neither says it, since a change upon an unseen revision would put aside what others
 * saved, and "precondition failed" with `details.latest` where If-Match names no newest revision.
 */
export function baseOf(
  request: Request,
  { id, latest }: { readonly id: string; readonly latest: number },
  base: unknown,
): unknown {
  const condition = request.headers.get("if-match");
  if (condition === null) {
    if (base !== undefined) return base;
    throw new AppError(
      "precondition required",
      "Say upon which revision the text was written: its entity tag in If-Match, or its number as base.",
      { latest },
    );
  }
  if (condition.trim() === "*") return base ?? latest;
  // Strong comparison: a weak tag never matches.
  const named = condition.split(",").some((tag) => tag.trim() === revisionTag(id, latest));
  if (named) return latest;
  throw failed(latest);
}

function failed(latest: number): AppError {
  return new AppError(
    "precondition failed",
    `Revision ${latest} is the newest one, and If-Match does not name it. Load it and bring your change into it.`,
    { latest },
  );
}

/** `work`, in which a revision that somebody saved a moment before counts as it would have before that moment: If-Match fails then. */
export async function upon<T>(request: Request, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const isTagged = (request.headers.get("if-match") ?? "*").trim() !== "*";
    const { code, details } = error instanceof AppError ? error : { code: null, details: {} };
    if (isTagged && code === "conflict" && typeof details.latest === "number") throw failed(details.latest);
    throw error;
  }
}
