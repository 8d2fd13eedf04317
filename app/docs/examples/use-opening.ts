"use client";

import { usePathname, useRouter } from "next/navigation";
import { useState, useTransition } from "react";
import { type Opened, openInWorkspace, type Room } from "./open-action";

/** Opens a text as a netlist of the reader's own: signs in first where need be, asks which workspace where there are several. */
export function useOpening(onMade: (made: Extract<Opened, { is: "made" }>) => void): {
  readonly open: (text: string, workspace?: string) => void;
  readonly isOpening: boolean;
  readonly problem: string | null;
  readonly rooms: readonly Room[];
} {
  const router = useRouter();
  const path = usePathname();
  const [isOpening, start] = useTransition();
  const [problem, setProblem] = useState<string | null>(null);
  const [rooms, setRooms] = useState<readonly Room[]>([]);

  const open = (text: string, workspace?: string) =>
    start(async () => {
      setProblem(null);
      try {
        const opened = await openInWorkspace({ text, ...(workspace === undefined ? {} : { workspace }) });
        if (opened.is === "signed out") router.push(`/sign-in?next=${encodeURIComponent(path)}`);
        else if (opened.is === "to choose") setRooms(opened.rooms);
        else if (opened.is === "refused") setProblem(opened.why);
        else onMade(opened);
      } catch {
        setProblem("The service did not answer. Nothing was made; try again.");
      }
    });
  return { open, isOpening, problem, rooms };
}
