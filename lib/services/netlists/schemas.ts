import { z } from "zod";
import { AppError } from "@/lib/errors";
import { count, MOST_TEXT } from "@/lib/language/limits";

const whole = (low: number, high: number) => z.coerce.number().int().min(low).max(high);

/** PostgreSQL stores no NUL, and a half of a surrogate pair would come back as another character. */
export const storable = (value: string) => !value.includes("\0") && !/\p{Surrogate}/u.test(value);

/** A page of a list: `page` counts from 1. */
export const paging = {
  page: whole(1, 1_000_000).default(1),
  size: whole(1, 100).default(25),
};

/** What one searches for: words that all have to occur. */
export const searchQuery = z
  .string()
  .max(200, "A search has at most 200 characters.")
  .refine(storable, "A search cannot contain characters that are no text.")
  .default("");

export const listInput = z.object({
  query: searchQuery,
  which: z.enum(["in use", "archived"]).default("in use"),
  sort: z.enum(["title", "updated", "owner", "status"]).default("updated"),
  direction: z.enum(["ascending", "descending"]).default("descending"),
  ...paging,
});

const title = z.string().trim().max(120, "A title has at most 120 characters.").refine(storable, {
  message: "A title cannot contain characters that are no text.",
});

/** A netlist text. Its size is judged by `fitText`, since that has an answer of its own. */
export const netlistText = z.string().refine(storable, {
  message: "The text contains characters that are no text (NUL, or half a surrogate pair). Save it as UTF-8.",
});

const message = z
  .string()
  .trim()
  .max(500, "A message has at most 500 characters.")
  .refine(storable, "A message cannot contain characters that are no text.");

export const createInput = z.object({
  title: title.optional(),
  text: netlistText,
  message: message.optional(),
});

export const saveInput = z.object({
  netlistId: z.string(),
  base: whole(1, 2_147_483_647),
  text: netlistText,
  message: message.optional(),
});

const number = whole(1, 2_147_483_647);

export const revisionsInput = z.object({ netlistId: z.string(), ...paging });

export const restoreInput = z.object({
  netlistId: z.string(),
  number,
  base: number,
  message: message.optional(),
});

export const duplicateInput = z.object({ netlistId: z.string(), number });

export const netlistFile = z.object({ name: z.string().min(1).max(255), text: z.string() });

/** Throws "too large" for a text longer than a netlist can be. */
export function fitText(text: string): void {
  if (text.length <= MOST_TEXT) return;
  throw new AppError(
    "too large",
    `The text has ${count(text.length)} characters, and a netlist can have ${count(MOST_TEXT)} at most. Split it.`,
  );
}
