"use client";

import { useRouter } from "next/navigation";
import { type FormEvent, useState, useTransition } from "react";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Button } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { Field } from "@/app/_components/ui/field";
import { makeNetlist } from "./actions";

/** "New netlist": asks for a title, makes it, and opens its sheet. */
export function CreateNetlist({ workspace }: { readonly workspace: string }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [problem, setProblem] = useState<string>();
  const [making, start] = useTransition();

  useDeeds("here", [{ id: "new", words: "New netlist", also: "make create add", does: () => setOpen(true) }]);

  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const title = String(new FormData(event.currentTarget).get("title") ?? "");
    start(async () => {
      try {
        const made = await makeNetlist(workspace, { title });
        if ("problem" in made) setProblem(made.problem);
        else router.push(`/${workspace}/netlists/${made.id}`);
      } catch {
        setProblem("The service did not answer. Nothing was made; try again.");
      }
    });
  };

  return (
    <>
      <Button tone="primary" onClick={() => setOpen(true)}>
        New netlist
      </Button>
      <Dialog
        open={open}
        onOpenChange={(next) => {
          setOpen(next);
          setProblem(undefined);
        }}
        title="New netlist"
        description="It starts with a small logarithmic converter that runs as it stands."
        actions={
          <>
            <Button onClick={() => setOpen(false)}>Cancel</Button>
            <Button tone="primary" type="submit" form="new-netlist" busy={making}>
              {making ? "Making…" : "Make netlist"}
            </Button>
          </>
        }
      >
        <form id="new-netlist" onSubmit={submit} noValidate>
          <Field label="Title" name="title" maxLength={120} autoComplete="off" error={problem} required />
        </form>
      </Dialog>
    </>
  );
}
