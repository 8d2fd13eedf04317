"use client";

import { usePathname } from "next/navigation";
import { Button, ButtonLink, Keys } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { PageHeader } from "@/app/_components/ui/page-header";
import type { Role } from "@/lib/permissions/actor";
import { SaveDialog } from "./save-dialog";
import { shortHash } from "./saved";
import { useKeyNames } from "./use-key-names";
import type { SheetState } from "./use-sheet";

interface Props {
  readonly sheet: SheetState;
  readonly title: string;
  readonly netlist: { readonly number: number; readonly owner: string };
  readonly role: Role;
  readonly mayQueue: boolean;
}

/** The netlist's name, the revision the text stands upon, and what can be done with it. */
export function SheetHeader({ sheet, title, netlist, role, mayQueue }: Props) {
  const { saved, changed, errors, busy, editor } = sheet;
  const keys = useKeyNames();
  const path = usePathname();
  const remark = (
    <>
      <span aria-live="polite">
        {changed ? "draft on " : ""}revision {saved.revision}
      </span>
      {", "}
      <code title={`Hash of the text of revision ${saved.revision}: ${saved.hash}`}>
        {shortHash(saved.hash)}
      </code>
      , netlist {netlist.number}, {netlist.owner}
      {changed && (
        <>
          {", "}
          <a
            href={`${path}/compare/${saved.revision}..draft`}
            target="_blank"
            rel="noopener"
            className="link"
          >
            what the draft changes <span className="sr-only">(opens a tab of its own)</span>
          </a>
        </>
      )}
    </>
  );
  const blocked = errors.length > 0;
  const reason = !mayQueue
    ? `As ${role} you read this netlist. An engineer, a reviewer or an admin can change and queue it.`
    : blocked
      ? `${counted(errors.length, "error")} to mend before it can run`
      : null;
  return (
    <PageHeader
      title={title}
      remark={remark}
      actions={
        <>
          {reason !== null && (
            <p id="queue-reason" className={mayQueue ? "sr-only" : "text-quiet text-sm"}>
              {reason}
            </p>
          )}
          <ButtonLink href={`${path}/revisions`}>History</ButtonLink>
          {mayQueue && (
            <>
              <Button onClick={() => editor.current?.format()}>Format</Button>
              <SaveDialog sheet={sheet} />
            </>
          )}
          <Button
            tone="primary"
            disabled={!mayQueue}
            aria-disabled={blocked || undefined}
            aria-describedby={reason === null ? undefined : "queue-reason"}
            busy={busy === "queueing"}
            onClick={() => void sheet.queue()}
          >
            {busy === "queueing" ? "Queueing…" : "Queue run"} <Keys>{keys.queue}</Keys>
          </Button>
        </>
      }
    />
  );
}
