import { z } from "zod";
import { runStatus } from "@/db/schema/run";
import { netlistText, paging, searchQuery } from "../netlists/schemas";

export const startInput = z.object({
  netlistId: z.string(),
  base: z.coerce.number().int().min(1).max(2_147_483_647),
  text: netlistText.optional(),
});

export const listInput = z.object({
  query: searchQuery,
  status: z.enum(runStatus.enumValues).optional(),
  netlistId: z.uuid().optional(),
  /** Of that netlist; without one it means nothing. */
  revision: z.coerce.number().int().min(1).max(2_147_483_647).optional(),
  ...paging,
});
