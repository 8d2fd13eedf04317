import type { z } from "zod";
import { AppError } from "@/lib/errors";

/** `value` as `shape` reads it. Throws "invalid" with the first fault as its sentence and all of them in `details.faults`. */
export function readInput<T>(shape: z.ZodType<T>, value: unknown): T {
  const read = shape.safeParse(value);
  if (read.success) return read.data;
  const faults = read.error.issues.map(({ path, message }) => ({ at: path.join("."), message }));
  const first = faults[0]!;
  throw new AppError("invalid", first.at === "" ? first.message : `${first.at}: ${first.message}`, {
    faults,
  });
}
