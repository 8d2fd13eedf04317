/** What stops this process from outside: Ctrl-C, an ending session, a closed terminal. */
const SIGNALS = ["SIGINT", "SIGTERM", "SIGHUP"] as const;

/** How often to look whether npm, which started this process, is still there, ms. */
const LOOK = 500;

/**
 * Calls `stop` at the first interrupt and ends the process with its result. Further ones change nothing: npm passes an interrupt
 * on, so that one Ctrl-C can arrive twice. Under npm, the end of npm is an interrupt as well, since it may be killed alone.
 */
export function onInterrupt(stop: () => Promise<number>): void {
  let stopping = false;
  const interrupt = () => {
    if (stopping) return;
    stopping = true;
    stop().then(
      (code) => process.exit(code),
      (error) => {
        console.error(error);
        process.exit(1);
      },
    );
  };
  for (const signal of SIGNALS) process.on(signal, interrupt);
  if (process.env.npm_lifecycle_event === undefined) return;
  const parent = process.ppid;
  setInterval(() => process.ppid !== parent && interrupt(), LOOK).unref();
}
