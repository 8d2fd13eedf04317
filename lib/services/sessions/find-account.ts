import { eq, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { user } from "@/db/schema/user";

export interface Account {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly passwordHash: string;
}

/** The account of an e-mail address, in any case of letters. For lib/auth alone, which proves the password. */
export async function findAccount(email: string): Promise<Account | null> {
  const [row] = await database()
    .select({ userId: user.id, name: user.name, email: user.email, passwordHash: user.passwordHash })
    .from(user)
    .where(eq(sql`lower(${user.email})`, email.toLowerCase()));
  return row ?? null;
}
