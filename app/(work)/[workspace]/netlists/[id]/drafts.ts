/** A text that is on this machine and in no revision. */
export interface Draft {
  readonly text: string;
  /** The revision it was written upon. */
  readonly base: number;
  /** When it was last changed, ISO 8601. */
  readonly at: string;
}

interface Kept {
  readonly present: Draft | null;
  readonly aside: readonly Draft[];
}

/** Texts set aside that are kept for a netlist; older ones go. */
const MOST_ASIDE = 5;

/** What a store of drafts stands on: `localStorage`, or a stand-in of a test. */
export type Shelf = Pick<Storage, "getItem" | "setItem" | "removeItem">;

/**
 * The unsaved texts of one netlist on this machine. The present draft follows the typing; one found at the start of a visit, or
 * replaced by somebody else's revision, is set aside until the reader takes it back or drops it. A full or forbidden store
 * loses the safety net, never the text on the screen.
 */
export class Drafts {
  private readonly key: string;

  constructor(
    private readonly shelf: Shelf,
    netlistId: string,
  ) {
    this.key = `sweepwright-draft ${netlistId}`;
  }

  /** The newest text set aside; null when there is none. Drafts that equal `savedText` are dropped on the way. */
  begin(savedText: string): Draft | null {
    const { present, aside } = this.read();
    const all = [...(present === null ? [] : [present]), ...aside].filter(({ text }) => text !== savedText);
    this.write({ present: null, aside: all });
    return all[0] ?? null;
  }

  /** Keeps the text being written; false when the browser would not. */
  keep(text: string, base: number, now: Date): boolean {
    return this.write({ ...this.read(), present: { text, base, at: now.toISOString() } });
  }

  /** The text being written is in a revision now, or back at one. */
  clear(): void {
    this.write({ ...this.read(), present: null });
  }

  /** Puts the text being written aside, because another takes its place on the screen. */
  setAside(text: string, base: number, now: Date): Draft {
    const one = { text, base, at: now.toISOString() };
    this.write({ present: null, aside: [one, ...this.read().aside] });
    return one;
  }

  /** Forgets the newest text set aside; gives the next one. */
  dropAside(): Draft | null {
    const { present, aside } = this.read();
    this.write({ present, aside: aside.slice(1) });
    return aside[1] ?? null;
  }

  private read(): Kept {
    try {
      const found: Partial<Kept> = JSON.parse(this.shelf.getItem(this.key) ?? "{}");
      const aside = Array.isArray(found.aside) ? found.aside.filter(isDraft) : [];
      return { present: isDraft(found.present) ? found.present : null, aside };
    } catch {
      return { present: null, aside: [] };
    }
  }

  private write({ present, aside }: Kept): boolean {
    try {
      if (present === null && aside.length === 0) this.shelf.removeItem(this.key);
      else this.shelf.setItem(this.key, JSON.stringify({ present, aside: aside.slice(0, MOST_ASIDE) }));
      return true;
    } catch {
      return false;
    }
  }
}

function isDraft(value: unknown): value is Draft {
  const one = value as Draft | null | undefined;
  return typeof one?.text === "string" && typeof one.base === "number" && typeof one.at === "string";
}
