import { json, route } from "@/lib/api/route";
import { checkDatabase } from "@/lib/services/workspaces/check-database";

export const dynamic = "force-dynamic";

/** GET → 200 once the database answers and holds our tables, otherwise 503. */
export const GET = route(async () => {
  await checkDatabase();
  return json({ status: "ready" });
});
