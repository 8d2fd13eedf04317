import type { Service } from "./service";

/** So many unexpected ends within so many milliseconds and a program is given up. */
const ENDS = 5;
const WITHIN = 60_000;

export interface Keeper {
  readonly name: string;
  /** Ends the program for good. */
  stop(): Promise<void>;
}

/** What a keeper tells. */
export interface Told {
  readonly say: (sentence: string) => void;
  /** The program ends again and again. */
  readonly givenUp: (sentence: string) => void;
}

/**
 * Keeps a program running: when it ends unasked it is started again, at once the first time and later after a growing pause.
 * `start` resolves when the program is ready.
 */
export async function keep(name: string, start: () => Promise<Service>, told: Told): Promise<Keeper> {
  let stopping = false;
  let service = await start();
  let ends: number[] = [];
  const watching = watch();

  async function watch(): Promise<void> {
    while (!stopping) {
      const how = await service.ended;
      if (stopping) return;
      ends = [...ends.filter((time) => Date.now() - time < WITHIN), Date.now()];
      if (ends.length >= ENDS) {
        told.givenUp(
          `The ${name} ended ${ENDS} times within a minute (${how}). Its log, ${service.log}, ends with:\n${service.tail()}`,
        );
        return;
      }
      told.say(`The ${name} ended unexpectedly (${how}); starting it again.`);
      await new Promise((next) => setTimeout(next, (ends.length - 1) * 1_000));
      if (stopping) return;
      await again();
    }
  }

  async function again(): Promise<void> {
    try {
      service = await start();
      if (!stopping) told.say(`The ${name} runs again.`);
    } catch (error) {
      told.say(error instanceof Error ? error.message : String(error));
    }
  }

  return {
    name,
    async stop() {
      stopping = true;
      await service.stop();
      await Promise.race([watching, new Promise((next) => setTimeout(next, 5_000).unref())]);
      await service.stop();
    },
  };
}
