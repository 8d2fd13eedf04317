import { Client } from "pg";
import { env } from "@/lib/env";
import { type Announcement, RUN_CHANNEL, readAnnouncement } from "./channel";

/** Called with an announcement, or with null after a break, when announcements may have been missed. */
export type Listener = (announcement: Announcement | null) => void;

const KEY = Symbol.for("sweepwright.listener");
const held = globalThis as { [KEY]?: RunListener };

/** First and longest wait between two attempts to connect, ms. */
const WAIT = { first: 100, longest: 2_000 } as const;

/**
 * Calls `listener` whenever an event of any run is committed, until the function it returns is called. All listeners of the
 * process share one connection, which is opened anew whenever it breaks. An announcement only wakes: read the tables.
 */
export function listen(listener: Listener): () => void {
  held[KEY] ??= new RunListener(env().DATABASE_URL);
  const shared = held[KEY];
  shared.add(listener);
  return () => shared.remove(listener);
}

/** As `listen`, for the events of one run. */
export function listenToRun(runId: string, wake: () => void): () => void {
  return listen((announcement) => {
    if (announcement === null || announcement.runId === runId) wake();
  });
}

/** Ends the shared connection, when the process ends. */
export async function closeListener(): Promise<void> {
  const shared = held[KEY];
  delete held[KEY];
  await shared?.close();
}

class RunListener {
  readonly #listeners = new Set<Listener>();
  #client: Client | null = null;
  #closed = false;

  constructor(private readonly connectionString: string) {
    void this.#connect(WAIT.first);
  }

  add(listener: Listener): void {
    this.#listeners.add(listener);
  }

  remove(listener: Listener): void {
    this.#listeners.delete(listener);
  }

  async close(): Promise<void> {
    this.#closed = true;
    await this.#client?.end().catch(() => undefined);
  }

  async #connect(wait: number): Promise<void> {
    if (this.#closed) return;
    const client = new Client({
      connectionString: this.connectionString,
      connectionTimeoutMillis: 5_000,
      keepAlive: true,
      keepAliveInitialDelayMillis: 10_000,
      application_name: "sweepwright listener",
    });
    let again = false;
    const reconnect = () => {
      if (again || this.#closed) return;
      again = true;
      this.#client = null;
      client.end().catch(() => undefined);
      setTimeout(() => void this.#connect(Math.min(2 * wait, WAIT.longest)), wait);
    };
    client.on("error", reconnect);
    client.on("end", reconnect);
    client.on("notification", ({ payload }) => {
      const announcement = readAnnouncement(payload);
      if (announcement !== null) this.#tell(announcement);
    });
    try {
      await client.connect();
      await client.query(`LISTEN ${RUN_CHANNEL}`);
      if (this.#closed) return void (await client.end());
      this.#client = client;
      wait = WAIT.first;
      this.#tell(null);
    } catch {
      reconnect();
    }
  }

  #tell(announcement: Announcement | null): void {
    for (const listener of this.#listeners) listener(announcement);
  }
}
