import { Complaint } from "./complaint";
import type { Service } from "./service";

/** How long a service may take until it is ready. */
const READY_WITHIN = 90_000;
const PAUSE = 60;

/** Waits until `url` answers 200. Complains when the service ends before, or takes too long. */
export async function untilReady(service: Service, url: string, within = READY_WITHIN): Promise<void> {
  const until = Date.now() + within;
  let last = "no answer";
  while (service.running() && Date.now() < until) {
    const answer = await statusOf(url);
    if (answer === "200") return;
    last = answer;
    await new Promise((next) => setTimeout(next, PAUSE));
  }
  const how = service.running()
    ? `was not ready within ${within / 1000} s (${last})`
    : `ended (${await service.ended})`;
  throw new Complaint(`The ${service.name} ${how}. Its log, ${service.log}, ends with:\n${service.tail()}`);
}

async function statusOf(url: string): Promise<string> {
  try {
    const { status } = await fetch(url, { signal: AbortSignal.timeout(2_000), redirect: "manual" });
    return String(status);
  } catch (error) {
    return error instanceof Error ? String(error.cause ?? error.message) : String(error);
  }
}
