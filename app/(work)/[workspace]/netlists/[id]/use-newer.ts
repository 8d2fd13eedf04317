"use client";

import { useQuery } from "@tanstack/react-query";
import { ask } from "./ask";
import type { RevisionLines } from "./revisions/revision-line";

/** Ms between two looks, while the sheet is looked at. */
const REST = 6000;

/** A revision that was saved since. */
export interface Newer {
  readonly number: number;
  readonly author: string;
  /** ISO 8601. */
  readonly savedAt: string;
}

/** The newest revision when it is newer than the one the text stands upon; null otherwise. */
export function useNewer(netlistId: string, revision: number): Newer | null {
  const { data } = useQuery({
    queryKey: ["newest revision", netlistId],
    queryFn: async (): Promise<Newer | null> => {
      const answer = await ask<RevisionLines>(`/api/v1/netlists/${netlistId}/revisions?page=1&size=1`);
      if (!answer.ok) throw new Error(answer.detail);
      const [newest] = answer.body.rows;
      return newest === undefined
        ? null
        : { number: newest.number, author: newest.author, savedAt: newest.savedAt };
    },
    refetchInterval: REST,
    retry: false,
  });
  return data != null && data.number > revision ? data : null;
}
