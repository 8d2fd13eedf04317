"use client";

import Link from "next/link";
import { Button } from "@/app/_components/ui/button";
import { StateMark } from "@/app/_components/ui/state-mark";
import type { FileResult } from "./send-file";

/** One line a file: added and where, still waiting, or refused and why. Stays until closed. */
export function UploadResults({
  workspace,
  results,
  onClose,
}: {
  readonly workspace: string;
  readonly results: readonly FileResult[];
  readonly onClose: () => void;
}) {
  const added = results.filter((result) => result.state === "added").length;
  const refused = results.filter((result) => result.state === "refused").length;
  return (
    <section aria-label="Upload" className="border bg-surface px-4 py-3">
      <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <h2 className="grow text-sm">
          Upload{" "}
          <span role="status" className="font-normal text-quiet">
            {added} of {results.length} added{refused > 0 && `, ${refused} refused`}
          </span>
        </h2>
        <Button size="small" tone="quiet" onClick={onClose}>
          Close
        </Button>
      </div>
      <ul className="mt-2 grid gap-1 text-sm">
        {results.map((result, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: two files may have one name; the order never changes
          <li key={index} className="flex items-baseline gap-2">
            {result.state === "added" && (
              <>
                <span className="text-holds">
                  <StateMark shape="check" />
                </span>
                <span>
                  <Link className="link" href={`/${workspace}/netlists/${result.id}`}>
                    {result.name}
                  </Link>{" "}
                  added
                </span>
              </>
            )}
            {result.state === "refused" && (
              <>
                <span className="text-broken">
                  <StateMark shape="cross" />
                </span>
                <span>
                  {result.name} refused: {result.reason}
                </span>
              </>
            )}
            {result.state === "waiting" && (
              <>
                <span className="text-quiet">
                  <StateMark shape="ring" />
                </span>
                <span>{result.name} waiting</span>
              </>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
