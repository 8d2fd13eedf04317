import { database } from "@/db/client";
import { session } from "@/db/schema/session";

/** Records a sign-in and gives its id. For lib/auth alone, once the password has been proved. */
export async function openSession(input: {
  readonly userId: string;
  readonly userAgent: string | null;
  readonly address: string | null;
}): Promise<string> {
  const values = { ...input, userAgent: input.userAgent?.slice(0, 400) ?? null };
  const [row] = await database().insert(session).values(values).returning({ id: session.id });
  return row!.id;
}
