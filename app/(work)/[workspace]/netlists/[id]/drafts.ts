/** A text that is on this machine and in no revision. */
export interface Draft {
  readonly text: string;
  /** The revision it was written upon. */
  readonly base: number;
  /** When it was last changed, ISO 8601. */
  readonly at: string;
}

/** A draft as it is kept: under the tab it is being written in, or set aside (`tab` null) until its writer takes it back. */
export interface KeptDraft extends Draft {
  readonly id: string;
  readonly netlist: string;
  readonly writer: string;
  readonly tab: string | null;
}

/** Where drafts are kept: the database of the browser, or a stand-in of a test. Each deed may fail, as in a full store. */
export interface DraftStore {
  all(netlist: string): Promise<KeptDraft[]>;
  put(draft: KeptDraft): Promise<void>;
  remove(id: string): Promise<void>;
}

/** The draft that was typed last, and how many more of the same writer are kept. */
export interface NewestDraft {
  readonly draft: Draft;
  readonly others: number;
}

/** The newest draft of `writer` on a netlist, being written or set aside; null where there is none. Fails where the store does. */
export async function newestDraft(
  store: Pick<DraftStore, "all">,
  netlist: string,
  writer: string,
): Promise<NewestDraft | null> {
  const own = (await store.all(netlist))
    .filter((one) => one.writer === writer)
    .sort((a, b) => b.at.localeCompare(a.at));
  const [draft] = own;
  return draft === undefined ? null : { draft, others: new Set(own.map(({ text }) => text)).size - 1 };
}

/** Texts set aside that are kept of a netlist; older ones go. */
const MOST_ASIDE = 20;

interface Whose {
  readonly netlist: string;
  readonly writer: string;
  readonly tab: string;
}

/**
 * The unsaved texts of one writer on one netlist. Each tab keeps its own, so that two of them never write over one another; one whose
 * tab is gone is set aside and offered at the next visit. A full or forbidden store loses the safety net, never the text on the screen.
 */
export class Drafts {
  private asides: KeptDraft[] = [];
  private last: Promise<void> = Promise.resolve();
  /** What is to be written when the store is free; null: that nothing is. */
  private wanted: { readonly draft: KeptDraft | null } | null = null;

  /** `onKept` is told after each write whether the store took it. */
  constructor(
    private readonly store: DraftStore,
    private readonly whose: Whose,
    private readonly onKept: (isKept: boolean) => void,
  ) {}

  /**
   * The newest text set aside; null when there is none. Drafts of tabs that are not among `living` are set aside now; those that equal
   * `savedText` are dropped on the way.
   */
  async begin(savedText: string, living: ReadonlySet<string>): Promise<Draft | null> {
    const { netlist, writer, tab } = this.whose;
    const found = (await this.store.all(netlist))
      .filter((one) => one.writer === writer && one.tab !== tab)
      .filter((one) => one.tab === null || !living.has(one.tab))
      .sort((a, b) => b.at.localeCompare(a.at));
    const known = new Set(this.asides.map(({ id }) => id));
    const texts = new Set([savedText]);
    for (const one of found) {
      const isSpare = texts.has(one.text);
      texts.add(one.text);
      if (isSpare) this.after(() => this.store.remove(one.id));
      else if (!known.has(one.id)) this.asides.push({ ...one, tab: null });
      if (!isSpare && one.tab !== null) this.after(() => this.store.put({ ...one, tab: null }));
    }
    this.trim();
    return this.asides[0] ?? null;
  }

  /** Keeps the text being written. While the store is busy, only the newest text waits. */
  keep(text: string, base: number, now: Date): void {
    const { netlist, writer, tab } = this.whose;
    this.write({ id: tab, netlist, writer, tab, text, base, at: now.toISOString() });
  }

  /** The text being written is in a revision now, or back at one. */
  clear(): void {
    this.write(null);
  }

  /** Puts a text aside, because another takes its place on the screen. */
  setAside(text: string, base: number, now: Date): Draft {
    const { netlist, writer, tab } = this.whose;
    const at = now.toISOString();
    const one = { id: `${tab} ${at} ${this.asides.length}`, netlist, writer, tab: null, text, base, at };
    this.asides.unshift(one);
    this.after(() => this.store.put(one));
    this.trim();
    return one;
  }

  /** Forgets the newest text set aside; gives the next one. */
  dropAside(): Draft | null {
    const gone = this.asides.shift();
    // After what is waiting: the text may have been taken back into the sheet a moment ago.
    if (gone !== undefined) this.after(() => this.store.remove(gone.id));
    return this.asides[0] ?? null;
  }

  /** Resolves when everything asked for so far is in the store, or was refused. */
  settled(): Promise<void> {
    return this.last;
  }

  private trim(): void {
    for (const { id } of this.asides.splice(MOST_ASIDE)) this.after(() => this.store.remove(id));
  }

  private write(draft: KeptDraft | null): void {
    const isWaiting = this.wanted !== null;
    this.wanted = { draft };
    if (isWaiting) return;
    this.after(() => {
      const next = this.wanted?.draft ?? null;
      this.wanted = null;
      return next === null ? this.store.remove(this.whose.tab) : this.store.put(next);
    });
  }

  /** One deed after another, in the order in which they were asked for. */
  private after(deed: () => Promise<void>): void {
    this.last = this.last.then(deed).then(
      () => this.onKept(true),
      () => this.onKept(false),
    );
  }
}
