import { type ColumnsDocument, decodeColumns } from "@/lib/analyses/columns-document";
import type { RunDocument } from "@/lib/analyses/result";
import type { PointAccount, RunState } from "./run-shapes";

async function refusal(response: Response): Promise<Error> {
  const problem = await response.json().catch(() => null);
  return new Error(problem?.detail ?? `The service answered with status ${response.status}.`);
}

/** The run document when it is not the version `etag` already; null when it is. */
export async function fetchDocument(
  id: string,
  etag: string | null,
): Promise<{ document: RunDocument; etag: string | null } | null> {
  const headers = { accept: "application/json", ...(etag === null ? {} : { "if-none-match": etag }) };
  const response = await fetch(`/api/v1/runs/${id}`, { headers, cache: "no-store" });
  if (response.status === 304) return null;
  if (!response.ok) throw await refusal(response);
  return { document: await response.json(), etag: response.headers.get("etag") };
}

/** Where the columns of a run are. */
export function columnsPath(id: string): string {
  return `/api/v1/runs/${id}/columns`;
}

/** The same with its columns as numbers of the machine, which is many times as fast for a large run. */
export async function fetchColumns(
  id: string,
  etag: string | null,
): Promise<{ document: ColumnsDocument; etag: string | null } | null> {
  const headers: Record<string, string> = etag === null ? {} : { "if-none-match": etag };
  const response = await fetch(columnsPath(id), { headers });
  if (response.status === 304) return null;
  if (!response.ok) throw await refusal(response);
  return { document: decodeColumns(await response.arrayBuffer()), etag: response.headers.get("etag") };
}

/** Where what a large run looks like from afar is. */
export function overviewPath(workspace: string, id: string): string {
  return `/${workspace}/runs/${id}/overview`;
}

export async function fetchOverview(workspace: string, id: string): Promise<ColumnsDocument> {
  const response = await fetch(overviewPath(workspace, id));
  if (!response.ok) throw await refusal(response);
  return decodeColumns(await response.arrayBuffer());
}

export async function fetchSummary(id: string): Promise<RunState> {
  const response = await fetch(`/api/v1/runs/${id}/summary`, { cache: "no-store" });
  if (!response.ok) throw await refusal(response);
  return response.json();
}

export async function fetchPoint(id: string, point: number): Promise<PointAccount> {
  const response = await fetch(`/api/v1/runs/${id}/points/${point}`, { cache: "no-store" });
  if (!response.ok) throw await refusal(response);
  return response.json();
}

export async function cancel(id: string): Promise<RunState> {
  const response = await fetch(`/api/v1/runs/${id}/cancel`, { method: "POST" });
  if (!response.ok) throw await refusal(response);
  return response.json();
}

/** Queues the same revision once more. */
export async function runAgain(run: RunState): Promise<{ readonly id: string }> {
  const response = await fetch("/api/v1/runs", {
    method: "POST",
    headers: { "content-type": "application/json" },
    body: JSON.stringify({ netlistId: run.netlistId, base: run.revision }),
  });
  if (!response.ok) throw await refusal(response);
  return response.json();
}
