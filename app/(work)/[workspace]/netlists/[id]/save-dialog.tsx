"use client";

import dynamic from "next/dynamic";
import { type FormEvent, useId, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { Field } from "@/app/_components/ui/field";
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

// Comes when somebody saves: what compares texts and what draws them is no part of the sheet before.
const SaveChanges = dynamic(() => import("./save-changes").then((found) => found.SaveChanges), {
  loading: () => <p className="text-quiet text-sm">Comparing with the revision before…</p>,
});

function SaveForm({ id, sheet }: { readonly id: string; readonly sheet: SheetState }) {
  const [message, setMessage] = useState("");
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    void sheet.save(message.trim());
  };
  return (
    <form id={id} onSubmit={submit} className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <Field
        label="What changed (optional)"
        name="message"
        maxLength={500}
        autoComplete="off"
        value={message}
        onChange={(event) => setMessage(event.target.value)}
      />
      <SaveChanges saved={sheet.saved} text={sheet.text} message={message} onMessage={setMessage} />
    </form>
  );
}
