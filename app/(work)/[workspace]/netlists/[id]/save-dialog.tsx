"use client";

import { type FormEvent, useId } from "react";
import { Button } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { Field } from "@/app/_components/ui/field";
import type { SheetState } from "./use-sheet";

/** "Save revision": asks what changed, which one may leave empty, and saves. */
export function SaveDialog({ sheet }: { readonly sheet: SheetState }) {
  const form = useId();
  const { saved, changed, busy, saving, openSave, errors } = sheet;

  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const message = String(new FormData(event.currentTarget).get("message") ?? "").trim();
    void sheet.save(message);
  };

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
        <form id={form} onSubmit={submit}>
          <Field label="What changed (optional)" name="message" maxLength={500} autoComplete="off" />
        </form>
      </Dialog>
    </>
  );
}
