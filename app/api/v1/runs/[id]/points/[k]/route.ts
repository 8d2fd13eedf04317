import { route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { getPoint } from "@/lib/services/runs/get-point";

/** GET → everything kept about the flat point `k`, counted from 0. */
export const GET = route<{ id: string; k: string }>(async (request, { id, k }) =>
  getPoint(await actorForRun(id, request), id, /^\d{1,9}$/.test(k) ? Number(k) : Number.NaN),
);
