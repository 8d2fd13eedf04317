import { type NextRequest, NextResponse } from "next/server";
import { PATH_HEADER } from "@/lib/auth/requested-path";

/**
 * Sets the content policy of a page with a nonce of its own, which Next.js puts on its scripts, and tells layouts which page was
 * asked for, so that signing in leads there. Who may see what is decided by the services, never here. /api is left out: it answers no pages, and a proxy before it would cut large bodies.
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(18))).toString("base64");
  const policy = policyWith(nonce);
  const headers = new Headers(request.headers);
  headers.set("Content-Security-Policy", policy);
  headers.set(PATH_HEADER, request.nextUrl.pathname + request.nextUrl.search);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set("Content-Security-Policy", policy);
  return response;
}

function policyWith(nonce: string): string {
  const development = process.env.NODE_ENV === "development";
  const rules = [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    // The editor sets styles without a nonce; styles alone cannot run anything.
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "font-src 'self' data:",
    "worker-src 'self' blob:",
    "connect-src 'self'",
    "object-src 'none'",
    "base-uri 'self'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ];
  return rules.join("; ");
}

export const config = {
  matcher: [
    {
      source: "/((?!api/|_next/static/|_next/image/|icon.svg|favicon.ico).*)",
      missing: [{ type: "header", key: "next-router-prefetch" }],
    },
  ],
};
