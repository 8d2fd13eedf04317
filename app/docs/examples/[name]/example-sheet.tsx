"use client";

import { useRouter } from "next/navigation";
import { type ReactNode, useMemo } from "react";
import { LiveSheet } from "@/app/_components/live-example/live-sheet";
import { useLive } from "@/app/_components/live-example/use-live";
import { OpenButton } from "../open-button";

interface Props {
  readonly name: string;
  readonly text: string;
  /** What stands over the sheet. */
  readonly head: ReactNode;
  /** The text as the server has rendered it. */
  readonly children: ReactNode;
}

/** An example as a sheet that anyone may write in; a text that was changed is there again after signing in. */
export function ExampleSheet({ name, text, head, children }: Props) {
  const router = useRouter();
  const keeping = useMemo(() => ({ until: "the tab closes", name: `example ${name}` }) as const, [name]);
  const live = useLive(text, true, keeping);
  return (
    <>
      <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-4 pb-6">
        {head}
        <OpenButton
          text={live.text}
          onMade={({ workspace, id }) => router.push(`/${workspace}/netlists/${id}`)}
        />
      </div>
      <LiveSheet live={live}>{children}</LiveSheet>
    </>
  );
}
