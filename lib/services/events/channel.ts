import { runStatus } from "@/db/schema/run";

type RunStatus = (typeof runStatus.enumValues)[number];

/** The channel on which every event of every run is announced. */
export const RUN_CHANNEL = "sweepwright_run";

/** What an announcement says. It only wakes: the tables are the truth. */
export interface Announcement {
  readonly runId: string;
  readonly status: RunStatus;
}

/** Reads "RUN-ID STATUS", the payload of an announcement; null when it is anything else. */
export function readAnnouncement(payload: string | undefined): Announcement | null {
  const [runId, word] = payload?.split(" ") ?? [];
  const status = runStatus.enumValues.find((one) => one === word);
  return runId === undefined || status === undefined ? null : { runId, status };
}
