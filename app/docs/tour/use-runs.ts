"use client";

import { useEffect, useState } from "react";
import type { Progress } from "./progress";
import type { TourRun } from "./steps";

/** Ms between two looks while a step waits for a run. */
const BETWEEN = 1500;
/** The flat point of the tour's sweep at 1 µA, nominal: three decades of 20 points. */
const AT_A_MICROAMPERE = 60;

type Netlist = NonNullable<Progress["netlist"]>;

/** The runs of the tour's netlist, looked at again and again while `isWanted`; null where there is no netlist or no answer. */
export function useRuns(netlist: Netlist | null, isWanted: boolean): readonly TourRun[] | null {
  const [runs, setRuns] = useState<readonly TourRun[] | null>(null);
  useEffect(() => {
    if (netlist === null || !isWanted) return;
    let timer: ReturnType<typeof setTimeout>;
    let isGone = false;
    const look = async () => {
      const found = document.hidden ? null : await runsOf(netlist);
      if (isGone) return;
      if (found !== null) setRuns(found);
      timer = setTimeout(look, BETWEEN);
    };
    void look();
    return () => {
      isGone = true;
      clearTimeout(timer);
    };
  }, [netlist, isWanted]);
  return netlist === null ? null : runs;
}

async function runsOf({ workspace, id }: Netlist): Promise<TourRun[] | null> {
  const found = await fetchJson<{ rows: Omit<TourRun, "bound">[] }>(
    `/api/v1/runs?workspace=${encodeURIComponent(workspace)}&netlistId=${id}&size=5`,
  );
  if (found === null) return null;
  return Promise.all(
    found.rows.map(async (row) => {
      const point =
        row.status === "done"
          ? await fetchJson<{ bound: number | null }>(`/api/v1/runs/${row.id}/points/${AT_A_MICROAMPERE}`)
          : null;
      return { ...row, bound: point?.bound ?? null };
    }),
  );
}

async function fetchJson<T>(path: string): Promise<T | null> {
  try {
    const response = await fetch(path, { headers: { accept: "application/json" } });
    return response.ok ? await response.json() : null;
  } catch {
    return null;
  }
}

/** Queues a run of the tour's netlist upon its newest revision; the sentence that says why not, or null. */
export async function queueRun({ id }: Netlist, change: (text: string) => string): Promise<string | null> {
  const netlist = await fetchJson<{ text: string; revision: number }>(`/api/v1/netlists/${id}`);
  if (netlist === null) return "The netlist cannot be read any more. Open the text anew.";
  const text = change(netlist.text);
  const body = { netlistId: id, base: netlist.revision, ...(text === netlist.text ? {} : { text }) };
  try {
    const response = await fetch("/api/v1/runs", {
      method: "POST",
      headers: { "content-type": "application/json", accept: "application/json" },
      body: JSON.stringify(body),
    });
    if (response.ok) return null;
    const { detail } = await response.json();
    return String(detail);
  } catch {
    return "The service did not answer. Try again.";
  }
}
