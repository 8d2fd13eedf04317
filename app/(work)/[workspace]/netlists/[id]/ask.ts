/** What a route handler answered: its body, or the sentence that says why not, with its details. */
export type Answer<T> =
  | { readonly ok: true; readonly body: T }
  | {
      readonly ok: false;
      readonly status: number;
      readonly detail: string;
      readonly problem: Readonly<Record<string, unknown>>;
    };

/** Asks a route of this service, with a JSON body when there is one. Never throws: no answer at all has status 0. */
export async function ask<T>(path: string, body?: unknown): Promise<Answer<T>> {
  const headers = {
    accept: "application/json",
    ...(body === undefined ? {} : { "content-type": "application/json" }),
  };
  const sent = body === undefined ? {} : { method: "POST", body: JSON.stringify(body) };
  try {
    const response = await fetch(path, { headers, ...sent });
    if (response.ok) return { ok: true, body: await response.json() };
    const problem = await response.json().catch(() => ({}));
    const detail =
      typeof problem.detail === "string"
        ? problem.detail
        : `The service answered with status ${response.status}.`;
    return { ok: false, status: response.status, detail, problem };
  } catch {
    return {
      ok: false,
      status: 0,
      detail: "The service did not answer. Your text is kept on this machine; try again.",
      problem: {},
    };
  }
}
