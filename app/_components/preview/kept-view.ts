"use client";

import { createContext } from "react";
import type { CurveView } from "@/app/_components/curves/curve-view";

/** How the curves of a preview are looked at, where the page keeps it (in its address); without one the preview keeps it itself. */
export const KeptView = createContext<{
  readonly view: CurveView;
  readonly onView: (change: Partial<CurveView>) => void;
} | null>(null);
