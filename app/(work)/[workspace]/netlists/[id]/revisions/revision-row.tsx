import Link from "next/link";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { When } from "@/app/_components/ui/when";
import { shortHash } from "../saved";
import type { RevisionLine } from "./revision-line";

interface Props {
  /** Path of the netlist, and of the runs of its workspace. */
  readonly base: string;
  readonly runs: string;
  readonly row: RevisionLine;
  readonly isNewest: boolean;
  readonly isChosen: boolean;
  readonly mayChoose: boolean;
  readonly onChoose: (number: number, isChosen: boolean) => void;
}

/** One revision: its message, what changed in it, who saved it when, and the verdict of its latest run. */
export function RevisionRow({ base, runs, row, isNewest, isChosen, mayChoose, onChoose }: Props) {
  const { number, hash, message, author, savedAt, lastRun, changes } = row;
  return (
    <li className="grid grid-cols-[2rem_minmax(0,1fr)] gap-x-2 border-b py-3 md:grid-cols-[2rem_8rem_minmax(0,1fr)_14rem_10rem]">
      <span className="row-span-4 md:row-span-1">
        {mayChoose && (
          <input
            type="checkbox"
            aria-label={`Choose revision ${number} to compare`}
            checked={isChosen}
            onChange={(event) => onChoose(number, event.target.checked)}
            className="size-6 accent-(--accent)"
          />
        )}
      </span>
      <p>
        <Link
          href={`${base}/revisions/${number}`}
          prefetch={false}
          className="inline-block min-h-6 font-semibold text-sm underline-offset-3 hover:underline"
        >
          Revision {number}
        </Link>
        {isNewest && <span className="ml-2 text-quiet text-xs">newest</span>}
      </p>
      <div className="min-w-0">
        {/* A message that was proposed from the changes says the same as they do. */}
        {message !== null && message !== changes && <p className="break-words text-sm">{message}</p>}
        <p className="break-words text-quiet text-sm">
          {changes ?? (number === 1 ? "The first text" : "Too long to be compared in this list")}
          {number > 1 && (
            <>
              {" "}
              <Link
                href={`${base}/compare/${number - 1}..${number}`}
                prefetch={false}
                className="link inline-block min-h-6 whitespace-nowrap"
              >
                Compare with {number - 1}
              </Link>
            </>
          )}
        </p>
      </div>
      <p className="text-quiet text-sm">
        {author}, <When iso={savedAt} />
        <br className="hidden md:inline" />
        <span className="md:hidden">, </span>
        <code title={`Hash of the text: ${hash}`}>{shortHash(hash)}</code>
      </p>
      <p className="md:justify-self-end md:text-right">
        {lastRun === null ? (
          <StateBadge state="never run" />
        ) : (
          <Link
            href={`${runs}/${lastRun.id}`}
            prefetch={false}
            className="inline-flex min-h-6 flex-wrap gap-x-2 underline-offset-3 hover:underline md:justify-end"
          >
            <StateBadge state={shownState(lastRun)} failed={lastRun.pointsFailed} />
            <span className="text-quiet text-xs leading-6">run {lastRun.number}</span>
          </Link>
        )}
      </p>
    </li>
  );
}
