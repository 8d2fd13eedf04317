import { createHash } from "node:crypto";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { type Answer, answerOnce } from "@/lib/services/answers/answer-once";
import { json } from "./route";

/** Characters of a key: anything visible in ASCII. */
const KEY = /^[\x21-\x7e]{1,200}$/;

/**
 * The answer of `work` to a request that makes something. With an Idempotency-Key (draft-ietf-httpapi-idempotency-key-header), the same
 * request sent again within a day gets the same answer, and nothing is made twice; another request with that key is 422.
 * `headers` are worked out from the body, which is plain data.
 */
export async function once<T>(
  request: Request,
  actor: Actor,
  wish: unknown,
  work: () => Promise<{ readonly status: number; readonly body: T }>,
  headers: (body: T) => Record<string, string> = () => ({}),
): Promise<Response> {
  const key = keyOf(request);
  const answer: Answer =
    key === null ? await work() : await answerOnce(actor, { key, request: digestOf(request, wish) }, work);
  return json(answer.body, { status: answer.status, headers: headers(answer.body as T) });
}

/** Null without the header. Throws "invalid" for a key that is no key. */
function keyOf(request: Request): string | null {
  const sent = request.headers.get("idempotency-key");
  if (sent === null) return null;
  const key = /^".*"$/.test(sent.trim()) ? sent.trim().slice(1, -1) : sent.trim();
  if (KEY.test(key)) return key;
  throw new AppError(
    "invalid",
    "An Idempotency-Key has 1 to 200 visible ASCII characters without spaces, such as a UUID.",
  );
}

function digestOf(request: Request, wish: unknown): string {
  const condition = request.headers.get("if-match");
  const said = [request.method, new URL(request.url).pathname, condition, wish];
  return createHash("sha256").update(JSON.stringify(said)).digest("hex");
}
