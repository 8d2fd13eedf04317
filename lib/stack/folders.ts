import { createHash } from "node:crypto";
import { chownSync, mkdirSync, realpathSync } from "node:fs";
import { join, resolve } from "node:path";
import { run } from "./command";
import { Complaint } from "./complaint";
import type { Account } from "./machine";

/** Where things are kept between two starts. */
export interface Folders {
  readonly data: string;
  /** PostgreSQL's cluster. */
  readonly cluster: string;
  readonly logs: string;
  /** Port, password and secret. */
  readonly settings: string;
  /** Says which process uses the folder at present. */
  readonly holder: string;
}

/**
 * The data folder of a checkout: SWEEPWRIGHT_DATA when given; `.data` in the checkout; for root a folder of its own below
 * /var/lib, since PostgreSQL runs as another user there, who may not be able to enter the checkout.
 */
export function dataFolder(checkout: string, root: boolean, given = process.env.SWEEPWRIGHT_DATA): string {
  if (given !== undefined && given !== "") return resolve(checkout, given);
  if (!root) return join(checkout, ".data");
  const name = createHash("sha256").update(realpathSync(checkout)).digest("hex").slice(0, 12);
  return join("/var/lib/sweepwright", name);
}

export function foldersIn(data: string): Folders {
  return {
    data,
    cluster: join(data, "postgres"),
    logs: join(data, "log"),
    settings: join(data, "settings.json"),
    holder: join(data, "running.json"),
  };
}

/** Makes the folders; the cluster's belongs to the account that runs PostgreSQL, which must be able to get there. */
export async function makeFolders(folders: Folders, account: Account | undefined): Promise<void> {
  mkdirSync(folders.data, { recursive: true });
  mkdirSync(folders.logs, { recursive: true });
  mkdirSync(folders.cluster, { recursive: true, mode: 0o700 });
  if (account === undefined) return;
  chownSync(folders.cluster, account.uid, account.gid);
  const reached = await run("test", ["-w", folders.cluster], { user: account, output: "keep", folder: "/" });
  if (reached.code === 0) return;
  throw new Complaint(
    `The user \`postgres\`, which runs the database for root, cannot enter ${folders.data}. Set SWEEPWRIGHT_DATA to a folder that it can enter, such as /var/lib/sweepwright.`,
  );
}
