/** Where a browser keeps a text that was changed: for a visit, or until it is put back. */
export interface Keeping {
  readonly until: "the tab closes" | "it is put back";
  readonly name: string;
}

function storeOf({ until }: Keeping): Storage {
  return until === "it is put back" ? localStorage : sessionStorage;
}

/** What is kept under a name; null where nothing is, or where the browser keeps nothing. */
export function keptText(keeping: Keeping): string | null {
  try {
    return storeOf(keeping).getItem(keeping.name);
  } catch {
    return null;
  }
}

/** Keeps a text under a name; null forgets it. A browser that keeps nothing loses the text at a reload, and nothing else. */
export function keepText(keeping: Keeping, text: string | null): void {
  try {
    if (text === null) storeOf(keeping).removeItem(keeping.name);
    else storeOf(keeping).setItem(keeping.name, text);
  } catch {
    return;
  }
}
