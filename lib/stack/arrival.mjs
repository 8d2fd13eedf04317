/** The methods that anything here answers; Next.js itself trips over others, such as TRACE. */
const METHODS = ["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE", "OPTIONS"];

/** What only a proxy of ours may say about where a request came from and was sent to. */
const FORWARDED = ["forwarded", "x-forwarded-host", "x-forwarded-port", "x-forwarded-proto"];

/**
 * Makes a request that has just arrived fit to be believed: without a proxy of ours before this server, what it says of its way is
 * dropped, and X-Forwarded-For is what the socket says. Answers the status to refuse it with, or null where it may go on.
 */
export function arrive(request, behindProxy) {
  if (!behindProxy) {
    for (const name of FORWARDED) delete request.headers[name];
    request.headers["x-forwarded-for"] = request.socket.remoteAddress ?? "unknown";
  }
  if (!METHODS.includes(request.method)) return 405;
  return isPath(request.url) ? null : 400;
}

/** Whether a request's target is a path (RFC 9112, 3.2.1) whose escapes stand for UTF-8. */
function isPath(target) {
  if (!target.startsWith("/")) return false;
  try {
    decodeURIComponent(target.split("?", 1)[0]);
    return true;
  } catch {
    return false;
  }
}
