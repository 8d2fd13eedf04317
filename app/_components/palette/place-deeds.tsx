"use client";

import { useContext } from "react";
import { useDeeds } from "./deed-registry";
import type { Deed } from "./deeds";
import { ShowContext } from "./palette-provider";

/** A page of the reference, as "Find or do…" lists it. */
export interface ReadingPage {
  readonly href: string;
  readonly title: string;
  readonly also?: string;
  readonly onlyAsked?: boolean;
}

/** Offers what every page offers: the other pages, the reference, the keys. Draws nothing. */
export function PlaceDeeds({
  workspace,
  reading,
}: {
  readonly workspace: string;
  readonly reading: readonly ReadingPage[];
}) {
  const show = useContext(ShowContext);
  const home = `/${workspace}`;
  useDeeds("places", [
    { id: "home", words: "Home", also: "start attention", does: home },
    { id: "netlists", words: "All netlists", also: "table list", does: `${home}/netlists` },
    { id: "runs", words: "All runs", also: "table list", does: `${home}/runs` },
    {
      id: "moving",
      words: "Runs under way",
      also: "running queued progress",
      does: `${home}/runs?status=running`,
    },
    { id: "failed", words: "Failed runs", also: "broken", does: `${home}/runs?status=failed` },
    { id: "compare", words: "Compare runs", also: "difference overlay", does: `${home}/runs/compare` },
  ]);
  useDeeds("reading", reading.map(readingDeed));
  useDeeds("self", [
    {
      id: "keys",
      words: "List of keys",
      also: "keyboard help shortcuts",
      keys: "?",
      does: () => show("keys"),
    },
  ]);
  return null;
}

function readingDeed({ href, title, ...rest }: ReadingPage): Deed {
  return { id: href, words: title, ...rest, does: href };
}
