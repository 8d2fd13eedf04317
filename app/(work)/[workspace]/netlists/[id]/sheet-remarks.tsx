"use client";

import Link from "next/link";
import { useEffect, useRef } from "react";
import { Button } from "@/app/_components/ui/button";
import { Notice } from "@/app/_components/ui/notice";
import { When } from "@/app/_components/ui/when";
import { NewerNotice } from "./newer-notice";
import type { SheetState } from "./use-sheet";

/** What stands between the header and the text when there is something to say; nothing otherwise. */
export function SheetRemarks({
  sheet,
  workspace,
  netlistId,
}: {
  readonly sheet: SheetState;
  readonly workspace: string;
  readonly netlistId: string;
}) {
  const { aside, remark, unsafe, broken, changed, saved } = sheet;
  const undo = useRef<HTMLButtonElement>(null);
  useEffect(() => {
    // The button that was pressed is gone, and the focus with it: the way back stands in its place.
    if (remark?.undo !== undefined && document.activeElement === document.body) undo.current?.focus();
  }, [remark]);
  return (
    <div className="grid gap-2 border-b px-4 py-3 empty:hidden md:px-6" data-print="never">
      <NewerNotice sheet={sheet} workspace={workspace} netlistId={netlistId} />
      {aside !== null && (
        <Notice tone="caution" title="A text of yours is not in any revision" announce>
          <p>
            It was written here upon revision {aside.base} and last changed <When iso={aside.at} />.
          </p>
          <div className="mt-2 flex flex-wrap gap-2">
            <Button size="small" onClick={() => void sheet.takeBack()}>
              Restore it
            </Button>
            <Button size="small" tone="quiet" onClick={sheet.dropAside}>
              Drop it
            </Button>
          </div>
        </Notice>
      )}
      {remark !== null && (
        <Notice tone={remark.tone} title={remark.title} announce>
          <p>{remark.detail}</p>
          <div className="mt-2 flex flex-wrap gap-2">
            {remark.undo !== undefined && (
              <Button ref={undo} size="small" onClick={remark.undo}>
                Undo
              </Button>
            )}
            {remark.made !== undefined && (
              <Link href={`/${workspace}/netlists/${remark.made}`} className="link min-h-7">
                Open your copy
              </Link>
            )}
            {remark.signedOut === true && (
              <Link
                href={`/sign-in?next=${encodeURIComponent(`/${workspace}/netlists/${netlistId}`)}`}
                className="link min-h-7"
              >
                Sign in
              </Link>
            )}
            <Button size="small" tone="quiet" onClick={() => sheet.setRemark(null)}>
              Close
            </Button>
          </div>
        </Notice>
      )}
      {unsafe && changed && (
        <Notice tone="caution" title="This browser keeps no draft">
          <p>
            Its storage is full or switched off. Save a revision before you leave; revision {saved.revision}{" "}
            is safe.
          </p>
        </Notice>
      )}
      {broken && (
        <Notice tone="caution" title="The text is not being checked while you type">
          <p>This browser could not start the checking. The service checks the text when you queue it.</p>
        </Notice>
      )}
    </div>
  );
}
