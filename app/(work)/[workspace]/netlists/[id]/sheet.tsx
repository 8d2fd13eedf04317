"use client";

import { useCallback, useEffect, useMemo, useState } from "react";
import type { CursorAt } from "@/app/_components/drawing/text-connections";
import type { TabDoes } from "@/app/_components/editor/editor-handle";
import { NetlistEditor } from "@/app/_components/editor/netlist-editor";
import { ProblemList } from "@/app/_components/editor/problem-list";
import { KeptView } from "@/app/_components/preview/kept-view";
import { PreviewPane } from "@/app/_components/preview/preview-pane";
import { usePreviewing } from "@/app/_components/preview/use-preview";
import { type WrittenKnob, writeKnobs } from "@/app/_components/preview/write-knobs";
import type { Role } from "@/lib/permissions/actor";
import { ConflictDialog } from "./conflict-dialog";
import { LastRuns } from "./last-runs";
import { PlanView } from "./plan-view";
import type { RunLines } from "./run-line";
import type { Saved } from "./saved";
import { SheetHeader } from "./sheet-header";
import { SheetRemarks } from "./sheet-remarks";
import { SheetSide } from "./sheet-side";
import { StatusLine } from "./status-line";
import { useAskedLine } from "./use-asked-line";
import { useSheet } from "./use-sheet";
import { useSheetDeeds } from "./use-sheet-deeds";
import { KeepSheetAddress, useSheetView } from "./use-sheet-view";

interface Props {
  readonly workspace: string;
  readonly netlist: { readonly id: string; readonly number: number; readonly owner: string };
  readonly latest: Saved;
  readonly runs: RunLines;
  /** Who reads or writes here; drafts are theirs alone. */
  readonly writer: string;
  readonly role: Role;
  readonly mayQueue: boolean;
  /** The search part of the address the page was asked for with. */
  readonly search: string;
}

/** The sheet of a netlist: its text to write in, what is wrong with it, a preview of its curves, what a run would compute, and the runs so far. */
export function Sheet({ workspace, netlist, latest, runs, writer, role, mayQueue, search }: Props) {
  const sheet = useSheet({ workspace, netlistId: netlist.id, writer, latest, mayQueue });
  const { editor, examined, text } = sheet;
  useAskedLine(editor);
  useSheetDeeds(sheet, mayQueue);
  const previewing = usePreviewing(latest.text);
  const [tab, setTab] = useState<TabDoes>("indents");
  const { side, view, asked, onView, onSide } = useSheetView(search);
  const kept = useMemo(() => ({ view, onView }), [view, onView]);
  const [cursor, setCursor] = useState<CursorAt | null>(null);
  const problems = examined?.diagnostics ?? [];

  useEffect(() => {
    // The editor answers these keys itself; here they work from anywhere else on the sheet.
    const press = (event: KeyboardEvent) => {
      if (event.defaultPrevented || !(event.ctrlKey || event.metaKey) || event.altKey) return;
      if (event.target instanceof Element && event.target.closest("[role=dialog]") !== null) return;
      if (event.key === "Enter") void sheet.queue();
      else if (event.key === "s" && mayQueue) sheet.openSave(true);
      else return;
      event.preventDefault();
    };
    window.addEventListener("keydown", press);
    return () => window.removeEventListener("keydown", press);
  });

  const edited = () => {
    sheet.edited();
    if (editor.current !== null) previewing.setText(editor.current.text());
  };
  const write = useCallback(
    (knobs: readonly WrittenKnob[]) => {
      const now = editor.current?.text() ?? "";
      const change = writeKnobs(now, knobs);
      if (change !== null) editor.current?.mend({ title: "Write the knobs", ...change }, now);
    },
    [editor],
  );

  return (
    <div className="flex grow flex-col">
      <SheetHeader sheet={sheet} title={latest.title} netlist={netlist} role={role} mayQueue={mayQueue} />
      <SheetRemarks sheet={sheet} workspace={workspace} netlistId={netlist.id} />
      <div className="grid grow lg:grid-cols-2 lg:grid-rows-[minmax(480px,1fr)]">
        <div className="flex h-[min(75dvh,720px)] min-w-0 flex-col border-b lg:h-0 lg:min-h-full lg:border-r lg:border-b-0">
          <div className="min-h-0 grow">
            <NetlistEditor
              ref={editor}
              initial={latest.text}
              readOnly={!mayQueue}
              isPatient
              problems={sheet.newest}
              onEdit={edited}
              onQueue={() => void sheet.queue()}
              onSave={() => mayQueue && sheet.openSave(true)}
              onTab={setTab}
              onCursor={(offset, names) => setCursor({ offset, names })}
              valueAtCursor={previewing.valueAt}
            />
          </div>
          {examined !== null && problems.length > 0 && (
            <ProblemList
              text={examined.text}
              diagnostics={problems}
              mayMend={mayQueue}
              onGoTo={sheet.goTo}
              onMend={(one) => one.fix !== undefined && editor.current?.mend(one.fix, examined.text)}
            />
          )}
        </div>
        <div className="min-w-0 px-4 py-2 md:px-6 lg:h-0 lg:min-h-full lg:overflow-y-auto">
          <SheetSide
            text={text}
            cursor={cursor}
            editor={editor}
            side={side}
            onSide={onSide}
            preview={
              <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-8">
                <KeptView value={kept}>
                  <PreviewPane previewing={previewing} onWrite={mayQueue ? write : undefined} />
                </KeptView>
                <PlanView examined={examined} />
                <LastRuns workspace={workspace} netlistId={netlist.id} title={latest.title} first={runs} />
              </div>
            }
          />
        </div>
      </div>
      <StatusLine
        examined={examined}
        stale={examined?.text !== text}
        previewing={previewing}
        tab={tab}
        readOnly={!mayQueue}
      />
      <KeepSheetAddress side={side} view={view} asked={asked} previewing={previewing} />
      <ConflictDialog sheet={sheet} />
    </div>
  );
}
