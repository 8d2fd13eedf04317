import { customType } from "drizzle-orm/pg-core";

/** PostgreSQL `bytea`, which Drizzle has no builder for; read and written as a Buffer. */
export const bytea = customType<{ data: Buffer; driverData: Buffer }>({
  dataType: () => "bytea",
});
