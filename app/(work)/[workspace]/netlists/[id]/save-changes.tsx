"use client";

import { useMemo, useState } from "react";
import { type DiffForm, TextDiff } from "@/app/_components/diff/text-diff";
import { Button } from "@/app/_components/ui/button";
import { asMessage } from "@/lib/language/changes/change";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import { ChangeList } from "./change-list";
import type { Saved } from "./saved";

interface Props {
  readonly saved: Saved;
  readonly text: string;
  readonly message: string;
  readonly onMessage: (message: string) => void;
}

/** What is about to be saved against the revision it was written upon: a message proposed, the changes in words, the lines. */
export function SaveChanges({ saved, text, message, onMessage }: Props) {
  const [form, setForm] = useState<DiffForm>("inline");
  const found = useMemo(() => changesOfTexts(saved.text, text), [saved.text, text]);
  const proposed = asMessage(found.changes);
  const names = [`Revision ${saved.revision}`, "Your text"] as const;
  return (
    <>
      {proposed !== "" && proposed !== message && (
        <p className="flex flex-wrap items-baseline gap-x-3 gap-y-1 text-quiet text-sm">
          <span className="min-w-0 break-words">{proposed}</span>
          <Button size="small" onClick={() => onMessage(proposed)}>
            Take this message
          </Button>
        </p>
      )}
      <section aria-labelledby="save-changes">
        <h3 id="save-changes" className="caption mb-2">
          Changed from revision {saved.revision}
        </h3>
        <ChangeList found={found} names={names} />
      </section>
      <details>
        <summary className="min-h-6 text-quiet text-sm">Line by line</summary>
        <div className="mt-2">
          <TextDiff
            before={{ text: saved.text, label: names[0] }}
            after={{ text, label: names[1] }}
            form={form}
            onForm={setForm}
          />
        </div>
      </details>
    </>
  );
}
