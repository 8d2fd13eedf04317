/** What stops this process from outside: Ctrl-C, an ending session, a closed terminal. */
const SIGNALS = ["SIGINT", "SIGTERM", "SIGHUP"] as const;

/**
 * Calls `stop` at the first interrupt and ends the process with its result. Further ones change nothing: npm passes an interrupt
 * on, so that one Ctrl-C can arrive twice.
 */
export function onInterrupt(stop: (signal: string) => Promise<number>): void {
  let stopping = false;
  for (const signal of SIGNALS) {
    process.on(signal, () => {
      if (stopping) return;
      stopping = true;
      stop(signal).then(
        (code) => process.exit(code),
        (error) => {
          console.error(error);
          process.exit(1);
        },
      );
    });
  }
}
