import { AppError } from "@/lib/errors";

/** Methods that change nothing, so that another site's page may well cause them. */
const SAFE: readonly string[] = ["GET", "HEAD", "OPTIONS"];

/**
 * Throws "not allowed" for a request that changes something and carries cookies, unless it comes from our own pages: browsers say
 * so by `Origin` or `Sec-Fetch-Site`, and a page cannot forge either.
 */
export function requireSameOrigin(request: Request): void {
  if (SAFE.includes(request.method) || request.headers.get("cookie") === null) return;
  const origin = request.headers.get("origin");
  if (
    origin === null
      ? request.headers.get("sec-fetch-site") === "same-origin"
      : ownOrigins(request).has(origin)
  )
    return;
  throw new AppError(
    "not allowed",
    "A signed-in request that changes something has to come from this service's own pages (see its Origin header).",
  );
}

/** Where our pages are: the address the service was told, and the one this request was sent to. */
function ownOrigins(request: Request): Set<string> {
  const told = URL.parse(process.env.NEXTAUTH_URL ?? "");
  const own = new Set<string>(told === null ? [] : [told.origin]);
  const host = request.headers.get("host");
  if (host !== null) own.add(`${told?.protocol ?? "http:"}//${host}`);
  return own;
}
