import { NextRequest } from "next/server";
import NextAuth from "next-auth";
import { readBytes } from "@/lib/api/body";
import { route } from "@/lib/api/route";
import { authOptions } from "@/lib/auth/options";

interface Params {
  readonly nextauth: readonly string[];
}

/** Bytes of a form that signs in or out, many times over. */
const MOST_BYTES = 16 * 1024;

/** next-auth's own endpoints. Its options are read at the request, since a build has no secret. */
function answer(request: Request, params: Params): Promise<Response> {
  return NextAuth(request as never, { params } as never, authOptions());
}

export const GET = route<Params>(answer);

/** next-auth reads a body of any length, so it is handed one that has been read with a limit. */
export const POST = route<Params>(async (request, params) => {
  const body = await readBytes(request, MOST_BYTES);
  const { url, method, headers } = request;
  return answer(new NextRequest(url, { method, headers, body }), params);
});
