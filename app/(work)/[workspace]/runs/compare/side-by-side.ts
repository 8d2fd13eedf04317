interface Labelled {
  readonly label: string;
}

/** What several lists have of one label: one entry a list, null where it has none. */
export interface SideBySide<T extends Labelled> {
  readonly label: string;
  readonly each: readonly (T | null)[];
}

/** Lists side by side by their labels, in the order of the first; the second of one label stands beside the second. */
export function sideBySide<T extends Labelled>(lists: readonly (readonly T[])[]): SideBySide<T>[] {
  const rows = new Map<string, (T | null)[]>();
  lists.forEach((list, k) => {
    const met = new Map<string, number>();
    for (const one of list) {
      const count = met.get(one.label) ?? 0;
      met.set(one.label, count + 1);
      const key = `${count} ${one.label}`;
      const row = rows.get(key) ?? lists.map(() => null);
      row[k] = one;
      rows.set(key, row);
    }
  });
  return [...rows].map(([key, each]) => ({ label: key.slice(key.indexOf(" ") + 1), each }));
}
