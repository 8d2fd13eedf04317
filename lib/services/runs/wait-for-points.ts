import { database } from "@/db/client";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { listenToRun } from "../events/listen";
import { findRun } from "./find-run";

/**
 * Resolves as soon as a run has stored points or has ended, or after `longest` ms, whichever comes first. A page asked for right after
 * queueing can so be sent with its first curve, which spares the browser two round trips.
 */
export async function waitForPoints(actor: Actor, id: string, longest: number): Promise<void> {
  const until = Date.now() + longest;
  let woken = false;
  let wake: () => void = () => undefined;
  const unlisten = listenToRun(id, () => {
    woken = true;
    wake();
  });
  try {
    while (true) {
      woken = false;
      const asked = await findRun(database(), actor, id);
      authorize(actor, "run.read", asked);
      const left = until - Date.now();
      const live = asked.status === "queued" || asked.status === "running";
      if (asked.pointsDone > 0 || !live || left <= 0) return;
      if (woken) continue;
      await new Promise<void>((resolve) => {
        const timer = setTimeout(resolve, left);
        wake = () => {
          clearTimeout(timer);
          resolve();
        };
      });
    }
  } finally {
    unlisten();
  }
}
