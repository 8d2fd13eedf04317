import type { DraftStore, KeptDraft } from "./drafts";

const DATABASE = "sweepwright";
const DRAFTS = "drafts";

/**
 * Drafts in the browser's database. Unlike `localStorage`, which a browser writes to the disk when it finds time, a finished transaction
 * is with the system: it outlives a browser that is killed the moment after.
 */
export function browserStore(): DraftStore {
  let opened: Promise<IDBDatabase> | null = null;
  const database = () => {
    opened ??= open().catch((error: unknown) => {
      opened = null;
      throw error;
    });
    return opened;
  };
  const change = async (deed: (drafts: IDBObjectStore) => void): Promise<void> => {
    const db = await database();
    await new Promise<void>((resolve, reject) => {
      const transaction = db.transaction(DRAFTS, "readwrite");
      transaction.oncomplete = () => resolve();
      transaction.onabort = () => reject(transaction.error);
      deed(transaction.objectStore(DRAFTS));
    });
  };
  return {
    all: async (netlist) => {
      const db = await database();
      const index = db.transaction(DRAFTS).objectStore(DRAFTS).index("netlist");
      return answerOf<KeptDraft[]>(index.getAll(netlist));
    },
    put: (draft) => change((drafts) => drafts.put(draft)),
    remove: (id) => change((drafts) => drafts.delete(id)),
  };
}

function open(): Promise<IDBDatabase> {
  const asked = indexedDB.open(DATABASE, 1);
  asked.onupgradeneeded = () => {
    asked.result.createObjectStore(DRAFTS, { keyPath: "id" }).createIndex("netlist", "netlist");
  };
  return answerOf(asked);
}

function answerOf<T>(asked: IDBRequest<T>): Promise<T> {
  return new Promise((resolve, reject) => {
    asked.onsuccess = () => resolve(asked.result);
    asked.onerror = () => reject(asked.error);
  });
}

const LOCK = "sweepwright-draft ";

/** A name for this visit of this tab, and a lock that the browser takes back when the tab is closed, killed or left. */
export function enterTab(): { readonly tab: string; readonly leave: () => void } {
  const tab = [...crypto.getRandomValues(new Uint32Array(4))].map((n) => n.toString(36)).join("");
  let leave = () => {};
  const stays = new Promise<void>((resolve) => {
    leave = resolve;
  });
  // Only pages of a secure context have locks; without them every other draft counts as left behind, and is offered.
  void navigator.locks?.request(LOCK + tab, () => stays);
  return { tab, leave };
}

/** The tabs that are being written in at this moment. */
export async function livingTabs(): Promise<ReadonlySet<string>> {
  const { held = [] } = (await navigator.locks?.query()) ?? {};
  return new Set(held.flatMap(({ name }) => (name?.startsWith(LOCK) ? [name.slice(LOCK.length)] : [])));
}
