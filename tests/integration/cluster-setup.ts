import { migrate } from "@/db/migrate";
import { throwaway } from "@/lib/stack/throwaway";

/**
 * Runs once before the integration tests. `npm test` gives them a migrated database by TEST_DATABASE_URL; a single file run by
 * hand gets one made here, and it is gone afterwards.
 */
export async function setup(): Promise<(() => Promise<void>) | undefined> {
  const given = process.env.TEST_DATABASE_URL;
  if (given !== undefined && given !== "") {
    process.env.DATABASE_URL = given;
    return undefined;
  }
  const cluster = await throwaway();
  const url = await cluster.database("sweepwright_test");
  await migrate(url);
  process.env.TEST_DATABASE_URL = url;
  process.env.DATABASE_URL = url;
  return () => cluster.remove();
}
