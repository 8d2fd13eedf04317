"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { ask } from "../../ask";
import type { NetlistFacts } from "./revision-shapes";

/** What came of the last deed. */
export interface Remark {
  readonly tone: "plain" | "holds" | "broken";
  readonly title: string;
  readonly detail: string;
  readonly link?: { readonly href: string; readonly label: string };
  /** Where there is a way back: the revision whose text to have again, and the newest one now. */
  readonly undo?: { readonly number: number; readonly base: number };
}

type Busy = "restoring" | "undoing" | "duplicating" | "queueing";

interface Saved {
  readonly revision: number;
  readonly changed: boolean;
}

/** What can be done with a revision, and what came of it. Nothing is asked twice: restoring can be undone, which is a revision too. */
export function useRevisionDeeds(workspace: string, netlist: NetlistFacts, number: number) {
  const router = useRouter();
  const [busy, setBusy] = useState<Busy | null>(null);
  const [remark, setRemark] = useState<Remark | null>(null);
  const path = `/api/v1/netlists/${netlist.id}/revisions`;
  const base = `/${workspace}/netlists/${netlist.id}`;

  const attempt = async <T>(
    what: Busy,
    to: string,
    body: unknown,
    failure: string,
    done: (body: T) => Remark | null,
  ) => {
    if (busy !== null) return;
    setBusy(what);
    setRemark(null);
    const answer = await ask<T>(to, body);
    setBusy(null);
    if (answer.ok) return setRemark(done(answer.body));
    const latest = answer.status === 409 ? Number(answer.problem.latest) : Number.NaN;
    if (!Number.isInteger(latest))
      return setRemark({ tone: "broken", title: failure, detail: answer.detail });
    router.refresh();
    setRemark({
      tone: "broken",
      title: failure,
      detail: `Revision ${latest} was saved meanwhile. Look at what changed, then try again.`,
      link: { href: `${base}/compare/${Math.min(number, latest)}..${latest}`, label: "See what changed" },
    });
  };

  const restore = () =>
    attempt<Saved>(
      "restoring",
      `${path}/${number}/restore`,
      { base: netlist.latest },
      "The revision was not restored",
      ({ revision, changed }) => {
        router.refresh();
        if (!changed) return same(number, revision);
        return {
          tone: "holds",
          title: `Revision ${revision} has the text of revision ${number} now`,
          detail: `Revision ${revision - 1} stays in the history.`,
          link: { href: base, label: "Open sheet" },
          undo: { number: revision - 1, base: revision },
        };
      },
    );

  const undo = async () => {
    const back = remark?.undo;
    if (back === undefined) return;
    const message = `Restoring of revision ${number} undone`;
    await attempt<Saved>(
      "undoing",
      `${path}/${back.number}/restore`,
      { base: back.base, message },
      "It was not undone",
      ({ revision }) => {
        router.refresh();
        return {
          tone: "plain",
          title: `Undone: revision ${revision} has the text of revision ${back.number}`,
          detail: "Both steps stay in the history.",
        };
      },
    );
  };

  const duplicate = () =>
    attempt<{ id: string }>(
      "duplicating",
      `${path}/${number}/duplicate`,
      {},
      "The netlist was not duplicated",
      ({ id }) => ({
        tone: "holds",
        title: `A new netlist has the text of revision ${number}`,
        detail: `It is called “Copy of ${netlist.title}”; rename it in its text.`,
        link: { href: `/${workspace}/netlists/${id}`, label: "Open the copy" },
      }),
    );

  const queue = () =>
    attempt<{ id: string }>(
      "queueing",
      "/api/v1/runs",
      { netlistId: netlist.id, base: number },
      "The run was not queued",
      ({ id }) => {
        router.push(`/${workspace}/runs/${id}`);
        return null;
      },
    );

  return { busy, remark, restore, undo, duplicate, queue, close: () => setRemark(null) };
}

function same(number: number, newest: number): Remark {
  return {
    tone: "plain",
    title: `Revision ${newest} means the same as revision ${number}`,
    detail: "Nothing was added, since there is nothing to restore.",
  };
}
