import { migrate } from "@/db/migrate";
import { seed } from "@/db/seed";

/**
 * Brings the database of DATABASE_URL up to date and, with --seed, puts the demo into it. A process of its own, so that whatever
 * the services open ends with it.
 */
const url = process.env.DATABASE_URL ?? "";
await migrate(url);
if (process.argv.includes("--seed")) await seed(url);
