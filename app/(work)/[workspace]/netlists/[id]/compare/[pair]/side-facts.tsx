import Link from "next/link";
import { classNames } from "@/app/_components/ui/class-names";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { When } from "@/app/_components/ui/when";
import { shortHash } from "../../saved";
import type { Side } from "./compare-shapes";

interface Props {
  readonly workspace: string;
  readonly netlistId: string;
  readonly side: Side;
  readonly word: string;
  readonly edge?: boolean;
}

/** Which revision stands on a side: its message, who saved it, and its latest run. */
export function SideFacts({ workspace, netlistId, side, word, edge = false }: Props) {
  const { number, hash, message, author, savedAt, newest } = side;
  return (
    <section
      aria-label={`${word}: revision ${number}`}
      className={classNames("min-w-0 px-4 py-3 md:px-6", edge && "border-t md:border-t-0 md:border-l")}
    >
      <p className="flex flex-wrap items-baseline gap-x-3">
        <span className="caption">{word}</span>
        <Link
          href={`/${workspace}/netlists/${netlistId}/revisions/${number}`}
          className="inline-block min-h-6 font-semibold text-sm underline-offset-3 hover:underline"
        >
          Revision {number}
        </Link>
        {newest === null ? (
          <StateBadge state="never run" />
        ) : (
          <Link
            href={`/${workspace}/runs/${newest.id}`}
            prefetch={false}
            className="inline-flex min-h-6 gap-2 underline-offset-3 hover:underline"
          >
            <StateBadge state={shownState(newest)} failed={newest.pointsFailed} />
            <span className="text-quiet text-xs leading-6">run {newest.number}</span>
          </Link>
        )}
      </p>
      {message !== null && <p className="break-words text-sm">{message}</p>}
      <p className="text-quiet text-xs">
        {author}, <When iso={savedAt} />, <code title={`Hash of the text: ${hash}`}>{shortHash(hash)}</code>
      </p>
    </section>
  );
}
