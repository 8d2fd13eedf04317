import NextAuth from "next-auth";
import { authOptions } from "@/lib/auth/options";

interface Context {
  readonly params: Promise<{ readonly nextauth: readonly string[] }>;
}

/** next-auth's own endpoints. Its options are read at the request, since a build has no secret. */
function handler(request: Request, context: Context): Promise<Response> {
  return NextAuth(request as never, context as never, authOptions());
}

export { handler as GET, handler as POST };
