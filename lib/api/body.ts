import { AppError } from "@/lib/errors";
import { count } from "@/lib/language/limits";

/** Bytes of a request body: a netlist text at its longest, every character escaped, and a little beside it. */
const MOST_BYTES = 2 * 1024 * 1024;

/**
 * The JSON a request carries. Throws "too large" as soon as more than 2 MiB have come, and "invalid" for what is no JSON object in
 * UTF-8 or is not declared as JSON.
 */
export async function readJson(request: Request): Promise<Record<string, unknown>> {
  const type = request.headers.get("content-type")?.split(";")[0]?.trim().toLowerCase();
  if (type !== "application/json")
    throw new AppError("invalid", "Send JSON, with the content type application/json.");
  const bytes = await readBytes(request, MOST_BYTES);
  let value: unknown;
  try {
    value = JSON.parse(new TextDecoder("utf-8", { fatal: true }).decode(bytes));
  } catch {
    throw new AppError("invalid", "The body is not JSON in UTF-8.");
  }
  if (typeof value !== "object" || value === null || Array.isArray(value)) {
    throw new AppError("invalid", "The body has to be a JSON object.");
  }
  return value as Record<string, unknown>;
}

/** The bytes of a request's body. Throws "too large" as soon as more than `most` have come. */
export async function readBytes(request: Request, most: number): Promise<Buffer<ArrayBuffer>> {
  const tooLarge = () =>
    new AppError(
      "too large",
      `The request is larger than ${count(most)} bytes. Split it and send the parts.`,
    );
  if (Number(request.headers.get("content-length") ?? 0) > most) throw tooLarge();
  const pieces: Uint8Array[] = [];
  let size = 0;
  for await (const piece of request.body ?? []) {
    size += piece.length;
    if (size > most) throw tooLarge();
    pieces.push(piece);
  }
  return Buffer.concat(pieces);
}
