"use client";

import { createContext, useContext, useEffect, useRef } from "react";
import type { Deed, Group } from "./deeds";

interface Source {
  readonly group: Group;
  readonly order: number;
  readonly deeds: () => readonly Deed[];
}

/** What the parts of the present page offer, asked for when somebody looks. */
export class DeedRegistry {
  private readonly sources = new Set<Source>();

  add(source: Source): () => void {
    this.sources.add(source);
    return () => this.sources.delete(source);
  }

  of(group: Group): readonly Deed[] {
    const found = new Map<string, Deed>();
    const sources = [...this.sources].filter((source) => source.group === group);
    for (const source of sources.sort((a, b) => a.order - b.order)) {
      for (const deed of source.deeds()) found.set(deed.id, deed);
    }
    return [...found.values()];
  }
}

export const DeedContext = createContext<DeedRegistry | null>(null);

/**
 * Offers deeds under "Find or do…" for as long as the component stands: those of its last render. Where there is no palette above
 * it, on a page of the reference for one, nothing happens. `order` places them among what other parts of the page offer.
 */
export function useDeeds(group: Group, deeds: readonly Deed[], order = 0): void {
  const registry = useContext(DeedContext);
  const latest = useRef(deeds);
  useEffect(() => {
    latest.current = deeds;
  });
  useEffect(() => registry?.add({ group, order, deeds: () => latest.current }), [registry, group, order]);
}
