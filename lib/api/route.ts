import { problem } from "./problem";
import { requireSameOrigin } from "./same-origin";

/** The second argument of a route handler. */
interface Context<P> {
  readonly params: Promise<P>;
}

/**
 * A route handler around `work`, which answers with a Response or with what is to be sent as JSON. Every error becomes problem
 * details; requests of other sites that would change something are refused. Answers are private to who asked.
 */
export function route<P>(work: (request: Request, params: P) => Promise<unknown>) {
  return async (request: Request, { params }: Context<P>): Promise<Response> => {
    try {
      requireSameOrigin(request);
      const answer = await work(request, await params);
      return answer instanceof Response ? kept(answer) : json(answer);
    } catch (error) {
      return problem(error);
    }
  };
}

/** `response`, which no cache keeps unless it says so itself. */
function kept(response: Response): Response {
  if (!response.headers.has("cache-control")) response.headers.set("cache-control", "private, no-store");
  return response;
}

/** `value` as a JSON answer that no shared cache keeps. */
export function json(
  value: unknown,
  init: { status?: number; headers?: Record<string, string> } = {},
): Response {
  const headers = { "cache-control": "private, no-store", ...init.headers };
  return Response.json(value, { status: init.status ?? 200, headers });
}
