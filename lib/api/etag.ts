/** Whether the reader says it already has the version `etag` (If-None-Match, weak comparison; RFC 9110, 13.1.2). */
export function alreadyHas(request: Request, etag: string): boolean {
  const known = request.headers.get("if-none-match");
  if (known === null) return false;
  if (known.trim() === "*") return true;
  const plain = (tag: string) => tag.trim().replace(/^W\//, "");
  return known.split(",").some((tag) => plain(tag) === plain(etag));
}

/** 304 for a reader that has the version already. */
export function notModified(etag: string): Response {
  return new Response(null, { status: 304, headers: { etag, "cache-control": "private, no-cache" } });
}
