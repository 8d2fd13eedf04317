import { DEMO_PEOPLE } from "@/db/demo-people";
import type { Folders } from "./folders";

/** What is printed once everything runs. */
export function welcome(started: {
  readonly address: string;
  readonly password: string;
  readonly folders: Folders;
  readonly seconds: number;
}): string {
  const width = Math.max(...DEMO_PEOPLE.map((person) => person.email.length));
  return [
    "",
    `Sweepwright runs at ${started.address}  (ready in ${started.seconds.toFixed(1)} s)`,
    "",
    "The demo is an invented company. Sign in as one of its people:",
    ...DEMO_PEOPLE.map((person) => `  ${person.email.padEnd(width)}  ${person.role}`),
    `with the password  ${started.password}`,
    "",
    `Data and logs: ${started.folders.data}`,
    "Stop with Ctrl-C; what was made is there again at the next start.",
  ].join("\n");
}
