import type { Page } from "playwright-core";
import { WORKSPACE } from "./harness";

/** A plot with curves on it. */
export const DRAWN = '[data-drawn]:not([data-drawn="0"])';

/** Sends JSON as the page itself would. */
export function send<T>(page: Page, url: string, body: unknown): Promise<T> {
  return page.evaluate(
    async ([to, text]) => {
      const headers = { "content-type": "application/json" };
      return (await fetch(to, { method: "POST", headers, body: text })).json();
    },
    [url, JSON.stringify(body)] as const,
  );
}

export interface Queued {
  readonly id: string;
  readonly text: string;
  readonly run: string;
  readonly address: string;
}

/** Makes a netlist and queues its first revision. */
export async function queue(page: Page, text: string): Promise<Queued> {
  const { id } = await send<{ id: string }>(page, "/api/v1/netlists", { workspace: WORKSPACE, text });
  const run = await send<{ id: string }>(page, "/api/v1/runs", { netlistId: id, base: 1 });
  return { id, text, run: run.id, address: `/${WORKSPACE}/runs/${run.id}` };
}

/** The address of a run of that text. */
export async function startRun(page: Page, text: string): Promise<string> {
  return (await queue(page, text)).address;
}

/** Opens a run and waits until it is solved and judged. */
export async function settled(page: Page, address: string): Promise<void> {
  await page.goto(address);
  await page.locator("[data-run-status=done]").waitFor();
  const id = address.split("/").at(-1);
  for (;;) {
    const summary = await (await page.request.get(`/api/v1/runs/${id}/summary`)).json();
    if (summary.judgement !== null || summary.error !== null) break;
    await page.waitForTimeout(200);
  }
  await page.reload();
}
