/** Read at every request, never at build. */
export const dynamic = "force-dynamic";

/** GET → 200 while the process answers at all. Whether it can do its work is for /api/health/ready. */
export function GET(): Response {
  return Response.json({ status: "live" }, { headers: { "cache-control": "no-store" } });
}
