import { AppError } from "@/lib/errors";

/** The workspace a request names. Throws "invalid" when it names none. */
export function workspaceIn(value: unknown): string {
  if (typeof value === "string" && value !== "") return value;
  throw new AppError("invalid", 'Say which workspace is meant: give its slug as "workspace".');
}
