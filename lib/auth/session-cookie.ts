import { decode } from "next-auth/jwt";
import { webEnv } from "@/lib/env";

/** The cookie that next-auth sets; "Secure" exactly when the service is reached by https. */
export function sessionCookie() {
  const secure = process.env.NEXTAUTH_URL?.startsWith("https://") ?? false;
  return {
    name: `${secure ? "__Secure-" : ""}sweepwright-session`,
    options: { httpOnly: true, sameSite: "lax", path: "/", secure },
  } as const;
}

/** The session id that a `Cookie` header carries; null when there is none or its seal is broken or out of date. */
export async function sessionIdIn(cookieHeader: string | null): Promise<string | null> {
  const prefix = `${sessionCookie().name}=`;
  const cookie = cookieHeader?.split(/;\s*/).find((part) => part.startsWith(prefix));
  if (cookie === undefined) return null;
  try {
    const token = decodeURIComponent(cookie.slice(prefix.length));
    const claims = await decode({ token, secret: webEnv().NEXTAUTH_SECRET });
    return typeof claims?.sid === "string" ? claims.sid : null;
  } catch {
    return null;
  }
}
