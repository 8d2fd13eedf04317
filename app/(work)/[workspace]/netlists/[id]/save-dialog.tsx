"use client";

import { type FormEvent, useId, useMemo, useState } from "react";
import { type DiffForm, TextDiff } from "@/app/_components/diff/text-diff";
import { Button } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { Field } from "@/app/_components/ui/field";
import { asMessage } from "@/lib/language/changes/change";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import { ChangeList } from "./change-list";
import type { SheetState } from "./use-sheet";

/** "Save revision": says what changed, asks for a message, which one may leave empty or take as it is proposed, and saves. */
export function SaveDialog({ sheet }: { readonly sheet: SheetState }) {
  const { saved, changed, busy, saving, openSave, errors } = sheet;
  const form = useId();
  return (
    <>
      <Button disabled={!changed} onClick={() => openSave(true)}>
        Save revision
      </Button>
      <Dialog
        open={saving}
        onOpenChange={openSave}
        title={`Save revision ${saved.revision + 1}`}
        description={
          errors.length > 0
            ? "A revision never changes afterwards. This text has errors: it is kept as it is, and cannot run."
            : "A revision never changes afterwards; runs and links point at it."
        }
        actions={
          <>
            <Button onClick={() => openSave(false)}>Cancel</Button>
            <Button tone="primary" type="submit" form={form} busy={busy === "saving"}>
              {busy === "saving" ? "Saving…" : "Save"}
            </Button>
          </>
        }
      >
        <SaveForm id={form} sheet={sheet} />
      </Dialog>
    </>
  );
}

/** Stands in the open dialog only, so that the texts are compared when somebody asks. */
function SaveForm({ id, sheet }: { readonly id: string; readonly sheet: SheetState }) {
  const { saved, text } = sheet;
  const [message, setMessage] = useState("");
  const [form, setForm] = useState<DiffForm>("inline");
  const found = useMemo(() => changesOfTexts(saved.text, text), [saved.text, text]);
  const proposed = asMessage(found.changes);
  const names = [`Revision ${saved.revision}`, "Your text"] as const;
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    void sheet.save(message.trim());
  };
  return (
    <form id={id} onSubmit={submit} className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <div className="grid gap-2">
        <Field
          label="What changed (optional)"
          name="message"
          maxLength={500}
          autoComplete="off"
          value={message}
          onChange={(event) => setMessage(event.target.value)}
        />
        {proposed !== "" && proposed !== message && (
          <p className="flex flex-wrap items-baseline gap-x-3 gap-y-1 text-quiet text-sm">
            <span className="min-w-0 break-words">{proposed}</span>
            <Button size="small" onClick={() => setMessage(proposed)}>
              Take this message
            </Button>
          </p>
        )}
      </div>
      <section aria-labelledby={`${id}-changes`}>
        <h3 id={`${id}-changes`} className="caption mb-2">
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
    </form>
  );
}
