"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { answering, type Entry } from "./deeds";

/** Ms that the typing rests before the service is asked. */
const REST = 150;
/** Rows of each kind; of the newest ones, while nothing is typed, fewer. */
const MOST = 6;
const NEWEST = 4;

interface NetlistFound {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly owner: string;
}

interface RunFound {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly revision: number;
  readonly status: string;
  readonly requestedBy: string;
}

interface Answer {
  readonly query: string;
  readonly netlists: readonly NetlistFound[];
  readonly runs: readonly RunFound[];
}

export interface Found {
  readonly entries: readonly Entry[];
  /** What is shown answers to what is typed, and nothing more is on its way. */
  readonly isSettled: boolean;
  /** Why the service could not be asked; null otherwise. */
  readonly problem: string | null;
  readonly again: () => void;
}

/**
 * Netlists and runs of the workspace that a query finds, and the newest ones for an empty one. A question that another has
 * overtaken is given up; until the next answer is there, what still fits of the last one stays.
 */
export function useFound(workspace: string, query: string): Found {
  const asked = useRested(query.trim());
  const { data, error, isFetching, isPlaceholderData, refetch } = useQuery({
    queryKey: ["find", workspace, asked],
    queryFn: async ({ signal }): Promise<Answer> => {
      const size = asked === "" ? NEWEST : MOST;
      const [netlists, runs] = await Promise.all([
        look<NetlistFound>("netlists", workspace, without("netlist", asked), size, signal),
        look<RunFound>("runs", workspace, without("run", asked), size, signal),
      ]);
      return { query: asked, netlists, runs };
    },
    placeholderData: keepPreviousData,
    retry: false,
  });
  const isOld = isPlaceholderData || asked !== query.trim();
  return {
    entries: data === undefined ? [] : entriesOf(data, workspace, isOld ? query : ""),
    isSettled: !isOld && !isFetching,
    problem: error === null || isFetching ? null : error.message,
    again: () => void refetch(),
  };
}

/** Narrowed to `left` where the answer is one to an earlier query. */
function entriesOf({ netlists, runs }: Answer, workspace: string, left: string): Entry[] {
  return [
    ...answering(
      "netlists",
      netlists.map(({ id, number, title, owner }) => ({
        id,
        words: title,
        note: `netlist ${number}, ${owner}`,
        does: `/${workspace}/netlists/${id}`,
      })),
      left,
    ),
    ...answering(
      "runs",
      runs.map(({ id, number, title, revision, status, requestedBy }) => ({
        id,
        words: `Run ${number}, ${title}`,
        note: `revision ${revision}, ${status}, ${requestedBy}`,
        does: `/${workspace}/runs/${id}`,
      })),
      left,
    ),
  ];
}

/** "run 348" means the run of that number: what says which kind is meant is not looked for in titles. */
export function without(kind: string, query: string): string {
  return query
    .split(/\s+/)
    .filter((word) => word.toLowerCase() !== kind && word.toLowerCase() !== `${kind}s`)
    .join(" ");
}

async function look<T>(
  what: "netlists" | "runs",
  workspace: string,
  query: string,
  size: number,
  signal: AbortSignal,
): Promise<readonly T[]> {
  const search = new URLSearchParams({ workspace, query, page: "1", size: String(size) });
  const headers = { accept: "application/json" };
  const response = await fetch(`/api/v1/${what}?${search}`, { headers, signal }).catch((error: unknown) => {
    if (signal.aborted) throw error;
    throw new Error("The service did not answer.");
  });
  const body = await response.json().catch(() => null);
  if (!response.ok) throw new Error(body?.detail ?? `The service answered with status ${response.status}.`);
  return body.rows;
}

function useRested(query: string): string {
  const [rested, setRested] = useState(query);
  useEffect(() => {
    const timer = setTimeout(() => setRested(query), REST);
    return () => clearTimeout(timer);
  }, [query]);
  return rested;
}
