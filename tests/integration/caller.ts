import { encode } from "next-auth/jwt";
import type { Actor } from "@/lib/permissions/actor";

export const SECRET = "a secret for the tests only";
export const ADDRESS = "http://127.0.0.1:3000";

/** A route handler as its file exports it. */
type Handler<P> = (request: Request, context: { params: Promise<P> }) => Promise<Response>;

interface Call<P> {
  readonly params?: P;
  readonly search?: Record<string, string>;
  readonly body?: unknown;
  readonly headers?: Record<string, string>;
  readonly method?: string;
  /** Of a caller who leaves. */
  readonly signal?: AbortSignal;
}

/** Calls a route handler as the browser of `actor` would from a page of ours; as nobody when it is null. */
export async function call<P>(
  handler: Handler<P>,
  actor: Actor | null,
  {
    params,
    search = {},
    body,
    headers = {},
    method = body === undefined ? "GET" : "POST",
    signal,
  }: Call<P> = {},
): Promise<Response> {
  const cookie =
    actor === null
      ? {}
      : {
          cookie: `sweepwright-session=${await encode({ token: { sid: actor.sessionId }, secret: SECRET })}`,
          origin: ADDRESS,
        };
  const request = new Request(`${ADDRESS}/api/v1/x?${new URLSearchParams(search)}`, {
    method,
    ...(signal === undefined ? {} : { signal }),
    headers: { ...cookie, ...(body === undefined ? {} : { "content-type": "application/json" }), ...headers },
    ...(body === undefined ? {} : { body: typeof body === "string" ? body : JSON.stringify(body) }),
  });
  return handler(request, { params: Promise.resolve((params ?? {}) as P) });
}
