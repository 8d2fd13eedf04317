import type { NextAuthOptions } from "next-auth";
import CredentialsProvider from "next-auth/providers/credentials";
import { webEnv } from "@/lib/env";
import { endSession } from "@/lib/services/sessions/end-session";
import { findUser } from "@/lib/services/sessions/find-user";
import { refusalCode, signIn } from "./credentials";
import { sessionCookie } from "./session-cookie";

/** How long the cookie lasts; its session row may end before. */
const COOKIE_SECONDS = 30 * 24 * 3600;

/** One header of next-auth's request, which may repeat. */
function header(headers: Record<string, unknown> | undefined, name: string): string | null {
  const value = headers?.[name];
  return typeof value === "string" ? value : null;
}

/** The nearest hop that the server itself saw; what stands to its left was only claimed. */
function addressOf(headers: Record<string, unknown> | undefined): string {
  return header(headers, "x-forwarded-for")?.split(",").at(-1)?.trim() || "unknown";
}

/** next-auth with e-mail and password. The cookie carries a session id and nothing else. */
export function authOptions(): NextAuthOptions {
  return {
    secret: webEnv().NEXTAUTH_SECRET,
    session: { strategy: "jwt", maxAge: COOKIE_SECONDS },
    cookies: { sessionToken: sessionCookie() },
    pages: { signIn: "/sign-in", error: "/sign-in" },
    providers: [
      CredentialsProvider({
        name: "E-mail and password",
        credentials: { email: { type: "email" }, password: { type: "password" } },
        async authorize(credentials, request) {
          try {
            const headers = request.headers as Record<string, unknown> | undefined;
            const from = { address: addressOf(headers), userAgent: header(headers, "user-agent") };
            const user = await signIn(credentials, from);
            return user === null ? null : { id: user.sessionId };
          } catch (error) {
            const code = refusalCode(error);
            if (code === "unavailable") console.error("Sign-in failed.", error);
            throw new Error(code);
          }
        },
      }),
    ],
    callbacks: {
      async jwt({ token, user }) {
        return user === undefined ? { sid: token.sid } : { sid: user.id };
      },
      async session({ session, token }) {
        const user = typeof token.sid === "string" ? await findUser(token.sid) : null;
        if (user === null) return { expires: new Date(0).toISOString() };
        return { user: { name: user.name, email: user.email }, expires: session.expires };
      },
    },
    events: {
      async signOut({ token }) {
        if (typeof token?.sid === "string") await endSession(token.sid);
      },
    },
  };
}
