"use client";

import { useRouter } from "next/navigation";
import { useRef, useState, useTransition } from "react";
import type { EditorHandle } from "@/app/_components/editor/editor-handle";
import { useExamination } from "@/app/_components/editor/use-examination";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { ask } from "./ask";
import type { Saved } from "./saved";
import { useDrafts } from "./use-drafts";
import { useSettledText } from "./use-settled-text";

/** What stands over the sheet as the answer to what the reader last did. */
export interface Remark {
  readonly tone: "broken" | "plain";
  readonly title: string;
  readonly detail: string;
  /** A netlist to look at. */
  readonly made?: string;
  /** Nobody is signed in any more; the text waits as a draft. */
  readonly signedOut?: boolean;
  /** Takes back what the remark tells of. */
  readonly undo?: () => void;
}

/** How often a text is put into an editor that may still be loading, and ms between. */
const TRIES = 100;
const BETWEEN = 100;

interface Asked {
  readonly workspace: string;
  readonly netlistId: string;
  readonly writer: string;
  readonly latest: Saved;
  readonly mayQueue: boolean;
}

/** The state of a sheet: the text, what it was written upon, what the checker says, and what saving and queueing came to. */
export function useSheet({ workspace, netlistId, writer, latest, mayQueue }: Asked) {
  const router = useRouter();
  const editor = useRef<EditorHandle>(null);
  const [saved, setSaved] = useState(latest);
  const { text, edited: soon, settle } = useSettledText(editor, latest.text);
  const { examined, newest, broken, ask: examine } = useExamination(text);
  const drafts = useDrafts({ netlistId, writer, text, saved, mayWrite: mayQueue });
  const [working, setWorking] = useState<"saving" | "queueing" | null>(null);
  const [leaving, leave] = useTransition();
  const busy = leaving ? "queueing" : working;
  const [remark, setRemark] = useState<Remark | null>(null);
  const [saving, openSave] = useState(false);
  const [theirs, setTheirs] = useState<Saved | null>(null);
  /** The message that the reader gave when saving was refused. */
  const wish = useRef("");
  const changed = text !== saved.text;
  const errors = (examined?.diagnostics ?? []).filter(({ severity }) => severity === "error");

  const edited = () => {
    soon();
    // Each key stroke is kept, not only what stands when the typing rests: a crash comes unasked.
    if (editor.current === null) return;
    const now = editor.current.text();
    drafts.typed(now);
    examine(now);
  };
  const goTo = (problem: Diagnostic) => editor.current?.goTo(problem);
  const refuse = (title: string, detail: string) => setRemark({ tone: "broken", title, detail });

  const fetchLatest = async (): Promise<Saved | null> => {
    const answer = await ask<Saved>(`/api/v1/netlists/${netlistId}`);
    if (!answer.ok) return null;
    const { title, text: theirText, revision, hash } = answer.body;
    return { title, text: theirText.replaceAll("\r\n", "\n"), revision, hash };
  };

  const failed = async (title: string, answer: { status: number; detail: string }) => {
    setWorking(null);
    const newest = answer.status === 409 ? await fetchLatest() : null;
    if (newest !== null) return setTheirs(newest);
    setRemark({ tone: "broken", title, detail: answer.detail, signedOut: answer.status === 401 });
  };

  const queue = async () => {
    if (!mayQueue || busy !== null) return;
    setRemark(null);
    const now = settle();
    const first = errors[0];
    if (first !== undefined && examined?.text === now) return goTo(first);
    setWorking("queueing");
    const body = { netlistId, base: saved.revision, ...(now === saved.text ? {} : { text: now }) };
    const answer = await ask<{ id: string }>("/api/v1/runs", body);
    if (!answer.ok) return failed("The run was not queued", answer);
    drafts.forget();
    leave(() => router.push(`/${workspace}/runs/${answer.body.id}`));
    setWorking(null);
  };

  const save = async (message: string): Promise<void> => {
    if (!mayQueue || busy !== null) return;
    wish.current = message;
    setRemark(null);
    setWorking("saving");
    const now = settle();
    const body = { base: saved.revision, text: now, ...(message === "" ? {} : { message }) };
    const answer = await ask<{ revision: number; hash: string; changed: boolean }>(
      `/api/v1/netlists/${netlistId}/revisions`,
      body,
    );
    // Before the remark comes: behind an open dialog nobody could read it.
    openSave(false);
    if (!answer.ok) return failed("The revision was not saved", answer);
    setWorking(null);
    const { revision, hash, changed: made } = answer.body;
    setSaved({ ...saved, text: now, revision, hash });
    if (!made) {
      const detail = "Only its layout differs, so no new revision was needed.";
      setRemark({ tone: "plain", title: `The text means the same as revision ${revision}`, detail });
    }
    router.refresh();
  };

  /** Puts another text on the sheet; the one that stands there can be had back by undo. */
  const put = (next: string) => {
    editor.current?.replace(next);
    settle();
  };

  /** The newest revision takes the place of the text, or `merged` upon it does. The text that stood here is set aside. */
  const loadTheirs = (merged?: string) => {
    if (theirs === null) return;
    drafts.setAside(settle(), saved.revision);
    setSaved(theirs);
    put(merged ?? theirs.text);
    setTheirs(null);
    router.refresh();
  };

  /** Saves a merge upon the newest revision; false when it was not. What it leaves out of the text here is set aside. */
  const saveMerged = async (merged: string, leavesOut: boolean): Promise<boolean> => {
    if (theirs === null || busy !== null) return false;
    setWorking("saving");
    const own = Array.from(wish.current).slice(0, 440).join("");
    const message =
      own === ""
        ? `Merged with revision ${theirs.revision}`
        : `${own} (merged with revision ${theirs.revision})`;
    const answer = await ask<{ revision: number; hash: string }>(`/api/v1/netlists/${netlistId}/revisions`, {
      base: theirs.revision,
      text: merged,
      message,
    });
    if (!answer.ok) {
      if (answer.status !== 409) setTheirs(null);
      await failed("The merge was not saved", answer);
      return false;
    }
    setWorking(null);
    if (leavesOut) drafts.setAside(settle(), saved.revision);
    const { revision, hash } = answer.body;
    setSaved({ ...theirs, text: merged, revision, hash });
    put(merged);
    setTheirs(null);
    router.refresh();
    return true;
  };

  /** The newest revision instead of the one the text stands upon, where nothing was written; else the choice of a stale save. */
  const takeNewest = async () => {
    const newest = await fetchLatest();
    if (newest === null)
      return refuse("The newer revision did not come", "The service did not answer. Try again.");
    if (settle() !== saved.text) return setTheirs(newest);
    setSaved(newest);
    put(newest.text);
    router.refresh();
  };

  const dropAside = () => {
    const gone = drafts.aside;
    if (gone === null) return;
    drafts.dropAside();
    setRemark({
      tone: "plain",
      title: "The text was dropped",
      detail: `It was written upon revision ${gone.base}.`,
      undo: () => {
        drafts.setAside(gone.text, gone.base, new Date(gone.at));
        setRemark(null);
      },
    });
  };

  const keepAsCopy = async () => {
    if (theirs === null) return;
    const answer = await ask<{ id: string }>("/api/v1/netlists", { workspace, text: settle() });
    if (!answer.ok) {
      setTheirs(null);
      return refuse("The copy was not made", answer.detail);
    }
    setSaved(theirs);
    put(theirs.text);
    setTheirs(null);
    router.refresh();
    setRemark({
      tone: "plain",
      title: "Your text is a netlist of its own now",
      detail: `This sheet shows revision ${theirs.revision}.`,
      made: answer.body.id,
    });
  };

  const takeBack = async () => {
    const wanted = drafts.aside;
    if (wanted === null) return;
    const before = settle();
    // The editor may still be on its way; a text that it has not taken must not be forgotten.
    for (let tries = 0; editor.current?.text() !== wanted.text; tries += 1) {
      if (tries === TRIES)
        return refuse("The text was not restored", "The editor has not arrived. Try again.");
      if (tries > 0) await new Promise((resolve) => setTimeout(resolve, BETWEEN));
      put(wanted.text);
    }
    drafts.dropAside();
    if (before !== saved.text) drafts.setAside(before, saved.revision);
  };

  return {
    editor,
    saved,
    text,
    edited,
    examined,
    newest,
    broken,
    errors,
    changed,
    busy,
    remark,
    setRemark,
    theirs,
    closeConflict: () => setTheirs(null),
    loadTheirs,
    saveMerged,
    keepAsCopy,
    aside: drafts.aside,
    unsafe: drafts.unsafe,
    takeBack,
    dropAside,
    takeNewest,
    goTo,
    saving,
    openSave,
    queue,
    save,
  };
}

export type SheetState = ReturnType<typeof useSheet>;
