import { randomBytes } from "node:crypto";
import { existsSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import { z } from "zod";
import { Complaint } from "./complaint";

const shape = z.object({
  /** Loopback port of PostgreSQL, chosen once and kept while it is free. */
  databasePort: z.number().int().min(1).max(65_535),
  databasePassword: z.string().min(16),
  /** Seals the session cookies; a new one signs everybody out. */
  secret: z.string().min(32),
  /** The demo accounts' password, once the demo is in the database. */
  demoPassword: z.string().nullable(),
});

/** What is generated at the first start and kept beside the data. */
export type Settings = z.infer<typeof shape>;

/** Fresh settings with a port and secrets of their own. */
export function newSettings(databasePort: number): Settings {
  const secret = () => randomBytes(32).toString("base64url");
  return { databasePort, databasePassword: secret(), secret: secret(), demoPassword: null };
}

/** The settings kept in `file`; null before the first start. Complains about a file that cannot be read. */
export function readSettings(file: string): Settings | null {
  if (!existsSync(file)) return null;
  try {
    return shape.parse(JSON.parse(readFileSync(file, "utf8")));
  } catch {
    throw new Complaint(
      `${file} is damaged; it holds the database's password. Restore it, or move the folder around it away to start afresh.`,
    );
  }
}

/** Written whole or not at all, readable for its owner only. */
export function writeSettings(file: string, settings: Settings): void {
  writeFileSync(`${file}.new`, `${JSON.stringify(settings, null, 2)}\n`, { mode: 0o600 });
  renameSync(`${file}.new`, file);
}
