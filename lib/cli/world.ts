/** What a command writes to. `columns` is 80 where there is no terminal. */
export interface Sink {
  write(text: string): void;
  readonly isTerminal: boolean;
  readonly columns: number;
}

/** Everything of the process that a command touches beside files and threads, so that a test can put its own in place. */
export interface World {
  /** Where relative paths begin. */
  readonly folder: string;
  readonly environment: Readonly<Record<string, string | undefined>>;
  /** All of standard input. */
  readonly input: () => Promise<Uint8Array>;
  /** Data. */
  readonly out: Sink;
  /** Progress and complaints. */
  readonly err: Sink;
  /** Aborted by an interrupt. */
  readonly signal: AbortSignal;
}

type Stream = NodeJS.WriteStream & { readonly fd: number };

function sinkOf(stream: Stream): Sink {
  return {
    write: (text) => void stream.write(text),
    get isTerminal() {
      return stream.isTTY === true;
    },
    get columns() {
      return stream.columns ?? 80;
    },
  };
}

/** The process itself. Ctrl-C aborts the signal; a second one ends at once. */
export function realWorld(): World {
  const interrupt = new AbortController();
  const stop = () => interrupt.abort();
  process.once("SIGINT", stop);
  process.once("SIGTERM", stop);
  // A reader such as `head` that has seen enough is no failure.
  process.stdout.on("error", (error: NodeJS.ErrnoException) => {
    if (error.code === "EPIPE") process.exit(0);
    throw error;
  });
  return {
    folder: process.cwd(),
    environment: process.env,
    input: async () => {
      const parts: Uint8Array[] = [];
      for await (const part of process.stdin) parts.push(part as Uint8Array);
      return Buffer.concat(parts);
    },
    out: sinkOf(process.stdout),
    err: sinkOf(process.stderr),
    signal: interrupt.signal,
  };
}
