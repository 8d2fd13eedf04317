"use client";

import Link from "next/link";
import { useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { Notice } from "@/app/_components/ui/notice";
import { When } from "@/app/_components/ui/when";
import { useNewer } from "./use-newer";
import type { SheetState } from "./use-sheet";

interface Props {
  readonly sheet: SheetState;
  readonly workspace: string;
  readonly netlistId: string;
}

/** Says that somebody saved a revision since, before one writes much upon the older one: to load it, or to merge it. */
export function NewerNotice({ sheet, workspace, netlistId }: Props) {
  const { saved, changed, busy, theirs } = sheet;
  const newer = useNewer(netlistId, saved.revision);
  const [fetching, setFetching] = useState(false);
  // While something of one's own is on its way, the newest revision may be that.
  if (newer === null || busy !== null || theirs !== null) return null;
  const take = async () => {
    setFetching(true);
    await sheet.takeNewest();
    setFetching(false);
  };
  return (
    <div data-stale="sheet">
      <Notice tone="caution" title={`Revision ${newer.number} was saved meanwhile`} announce>
        <p>
          By {newer.author}, <When iso={newer.savedAt} />; this sheet stands upon revision {saved.revision}.
        </p>
        <div className="mt-2 flex flex-wrap gap-2">
          <Button size="small" busy={fetching} onClick={() => void take()}>
            {fetching ? "Fetching…" : changed ? "Bring the two together" : `Load revision ${newer.number}`}
          </Button>
          <Link
            href={`/${workspace}/netlists/${netlistId}/compare/${saved.revision}..${newer.number}`}
            className="link inline-flex min-h-7 items-center"
          >
            See what changed
          </Link>
        </div>
      </Notice>
    </div>
  );
}
