import { eq, sql } from "drizzle-orm";
import RedisMock from "ioredis-mock";
import type { NextAuthOptions } from "next-auth";
import { encode } from "next-auth/jwt";
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { POST as signInRoute } from "@/app/api/auth/[...nextauth]/route";
import { database } from "@/db/client";
import { makeActor, makeUser, PASSWORD } from "@/db/factories";
import { membership } from "@/db/schema/membership";
import { session } from "@/db/schema/session";
import { actorFor, currentUser } from "@/lib/auth/actor";
import { authOptions } from "@/lib/auth/options";
import { endSession } from "@/lib/services/sessions/end-session";
import { ownDatabase } from "./own-database";

const SECRET = "a secret for the tests only";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", "http://127.0.0.1:3000");
  vi.stubEnv("REDIS_URL", "");
});
afterAll(() => void vi.unstubAllEnvs());
beforeEach(async () => void (await new RedisMock().flushall()));

type Authorize = (
  credentials: Record<string, unknown>,
  request: { headers: Record<string, string> },
) => Promise<{ id: string } | null>;

/** What next-auth calls when the form is sent. */
function authorize(credentials: Record<string, unknown>, address = "192.0.2.1") {
  const provider = authOptions().providers[0] as unknown as { options: { authorize: Authorize } };
  return provider.options.authorize(credentials, {
    headers: { "x-forwarded-for": address, "user-agent": "a test" },
  });
}

async function requestWith(sessionId: string, secret = SECRET): Promise<Request> {
  const token = await encode({ token: { sid: sessionId }, secret });
  return new Request("http://127.0.0.1:3000/api/v1/runs", {
    headers: { cookie: `a=b; sweepwright-session=${token}` },
  });
}

describe("sign-in", () => {
  it("opens a session for the right password, in any spelling of the address, and remembers where from", async () => {
    const { id, email } = await makeUser();
    const opened = await authorize({ email: ` ${email.toUpperCase()} `, password: PASSWORD }, "192.0.2.9");
    const [row] = await database().select().from(session).where(eq(session.id, opened!.id));
    expect(row).toMatchObject({ userId: id, endedAt: null, userAgent: "a test", address: "192.0.2.9" });
    expect(await currentUser(await requestWith(opened!.id))).toMatchObject({ userId: id, email });
  });

  it.each([
    ["a wrong password", { password: "wrong" }],
    ["an unknown address", { email: "nobody@bench.example" }],
    ["no password", { password: "" }],
    ["what is no text", { password: { $ne: "" } }],
    ["an address that PostgreSQL cannot hold", { email: "a\0@bench.example" }],
  ])("answers %s with null, and opens nothing", async (_, wrong) => {
    const { id, email } = await makeUser();
    expect(await authorize({ email, password: PASSWORD, ...wrong })).toBeNull();
    expect(await database().select().from(session).where(eq(session.userId, id))).toEqual([]);
  });

  it("is throttled after ten wrong passwords, also for the right one, and says how long", async () => {
    const { email } = await makeUser();
    for (let i = 0; i < 10; i++) expect(await authorize({ email, password: "wrong" })).toBeNull();
    await expect(authorize({ email, password: PASSWORD })).rejects.toThrow(/^too many:\d+$/);
  });
});

describe("the endpoints of sign-in", () => {
  it("refuse a form of more than 16 KiB, which next-auth would read to its end, and one from another site", async () => {
    const send = (headers: Record<string, string>, password: string) =>
      signInRoute(
        new Request("http://127.0.0.1:3000/api/auth/callback/credentials", {
          method: "POST",
          headers: { "content-type": "application/x-www-form-urlencoded", ...headers },
          body: new URLSearchParams({ password }),
        }),
        { params: Promise.resolve({ nextauth: ["callback", "credentials"] }) },
      );
    const large = await send({}, "x".repeat(16 * 1024));
    expect([large.status, (await large.json()).code]).toEqual([413, "too large"]);
    const foreign = await send({ cookie: "a=b", origin: "https://evil.example" }, "x");
    expect([foreign.status, (await foreign.json()).code]).toEqual([403, "not allowed"]);
  });
});

describe("a session", () => {
  it("is refused at the next request once it has been ended", async () => {
    const { sessionId, userId, workspaceSlug } = await makeActor();
    const request = await requestWith(sessionId);
    expect((await actorFor(workspaceSlug, request)).userId).toBe(userId);
    await endSession(sessionId);
    expect(await currentUser(request)).toBeNull();
    await expect(actorFor(workspaceSlug, request)).rejects.toMatchObject({ code: "signed out" });
  });

  it("ends by signing out, and next-auth's own session answers without a user from then on", async () => {
    const { sessionId, name, email } = await makeActor();
    const { callbacks, events } = authOptions();
    const token = { sid: sessionId };
    const ask = () =>
      callbacks!.session!({
        token,
        session: { expires: "2100-01-01T00:00:00.000Z" },
      } as unknown as Parameters<NonNullable<NonNullable<NextAuthOptions["callbacks"]>["session"]>>[0]);
    expect(await ask()).toMatchObject({ user: { name, email } });
    await events!.signOut!({ token, session: {} as never });
    expect(await ask()).toEqual({ expires: "1970-01-01T00:00:00.000Z" });
  });

  it("is over after thirty days without use, and remembers a use", async () => {
    const { sessionId } = await makeActor();
    const request = await requestWith(sessionId);
    const lay = (days: number) =>
      database()
        .update(session)
        .set({ lastSeenAt: sql`now() - make_interval(days => ${days})` })
        .where(eq(session.id, sessionId));
    await lay(29);
    expect(await currentUser(request)).not.toBeNull();
    const [used] = await database()
      .select({ recent: sql<boolean>`${session.lastSeenAt} > now() - interval '1 minute'` })
      .from(session)
      .where(eq(session.id, sessionId));
    expect(used?.recent).toBe(true);
    await lay(31);
    expect(await currentUser(request)).toBeNull();
  });

  it.each([
    ["sealed with another secret", async (id: string) => requestWith(id, "another secret of somebody")],
    ["of an id that never was", async () => requestWith("00000000-0000-4000-8000-000000000000")],
    ["of an id that is none", async () => requestWith("' OR 1=1 --")],
    [
      "that is no sealed text",
      async () => new Request("http://x", { headers: { cookie: "sweepwright-session=%E0%A4%A" } }),
    ],
  ])("%s is nobody's", async (_, make) => {
    const { sessionId } = await makeActor();
    expect(await currentUser(await make(sessionId))).toBeNull();
  });

  it("acts with the role the database holds at that request", async () => {
    const { sessionId, userId, workspaceSlug } = await makeActor("viewer");
    const request = await requestWith(sessionId);
    expect((await actorFor(workspaceSlug, request)).role).toBe("viewer");
    await database().update(membership).set({ role: "admin" }).where(eq(membership.userId, userId));
    expect((await actorFor(workspaceSlug, request)).role).toBe("admin");
    await database().delete(membership).where(eq(membership.userId, userId));
    await expect(actorFor(workspaceSlug, request)).rejects.toMatchObject({ code: "not found" });
  });
});

describe("the cookie", () => {
  it.each([
    ["http://127.0.0.1:3000", "sweepwright-session", false],
    ["https://bench.example", "__Secure-sweepwright-session", true],
  ])("at %s is %s, for this site's requests only and not for scripts", (url, name, secure) => {
    vi.stubEnv("NEXTAUTH_URL", url);
    expect(authOptions().cookies?.sessionToken).toEqual({
      name,
      options: { httpOnly: true, sameSite: "lax", path: "/", secure },
    });
    vi.stubEnv("NEXTAUTH_URL", "http://127.0.0.1:3000");
  });
});
