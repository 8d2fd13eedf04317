import type { ToastMessage } from "@/app/_components/ui/toast";

/** A run that ended. */
export interface EndedRun {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly netlistId: string;
  readonly status: "queued" | "running" | "done" | "failed" | "cancelled";
  readonly verdict: "holds" | "broken" | "no data" | null;
  readonly pointsFailed: number;
  readonly requestedBy: string;
  readonly isOwn: boolean;
}

/** A revision that somebody else saved. */
export interface SavedRevision {
  readonly netlistId: string;
  readonly number: number;
  readonly title: string;
  readonly author: string;
}

export interface News {
  readonly now: string;
  readonly runs: readonly EndedRun[];
  readonly revisions: readonly SavedRevision[];
}

/** What one looks at, of an address in a workspace. */
export interface Place {
  readonly netlistId: string | null;
  readonly runId: string | null;
  /** The page follows its runs, or its text, by itself. */
  readonly showsRuns: boolean;
  readonly showsText: boolean;
}

export function placeOf(path: string): Place {
  const [, , part, id = null, deeper] = path.split("/");
  return {
    netlistId: part === "netlists" ? id : null,
    runId: part === "runs" && id !== "compare" ? id : null,
    showsRuns: part === undefined || (part === "runs" && id === null),
    showsText: part === "netlists" && id !== null && deeper === undefined,
  };
}

/** Tells news apart. */
export function newsKeys({ runs, revisions }: News): string[] {
  return [...runs.map(({ id }) => id), ...revisions.map(({ netlistId, number }) => `${netlistId} ${number}`)];
}

/** The messages for what is news to somebody at a place: nothing that this page shows by itself. */
export function messagesOf(
  news: News,
  workspace: string,
  place: Place,
  isKnown: (key: string) => boolean,
): ToastMessage[] {
  const runs = news.runs
    .filter(({ id }) => !isKnown(id) && id !== place.runId && !place.showsRuns)
    .map((run) => ({
      title: `Run ${run.number} ${cameTo(run)}`,
      detail: `${run.title}${run.isOwn ? "" : `, queued by ${run.requestedBy}`}`,
      ...toneOf(run),
      open: { href: `/${workspace}/runs/${run.id}`, words: `Open run ${run.number}` },
    }));
  const revisions = news.revisions
    .filter(({ netlistId, number }) => !isKnown(`${netlistId} ${number}`) && !place.showsText)
    .map(({ netlistId, number, title, author }) => ({
      title: `${author} saved revision ${number}`,
      detail: title,
      open: {
        href: `/${workspace}/netlists/${netlistId}/compare/${number - 1}..${number}`,
        words: "See what changed",
      },
    }));
  return [...runs, ...revisions];
}

function cameTo({ status, verdict, pointsFailed }: EndedRun): string {
  if (status === "failed") return "has failed";
  if (status === "cancelled") return "was cancelled";
  if (verdict === "broken") return "breaks a requirement";
  if (verdict === "no data") return "has no data for a requirement";
  if (pointsFailed > 0) return "is done, with failed points";
  return verdict === "holds" ? "holds" : "is done";
}

function toneOf({ status, verdict, pointsFailed }: EndedRun): Pick<ToastMessage, "tone"> {
  if (status === "failed" || verdict === "broken") return { tone: "broken" };
  return status === "done" && verdict !== "no data" && pointsFailed === 0 ? { tone: "holds" } : {};
}
