import type { IncomingHttpHeaders } from "node:http";

/** What is looked at of a request that has arrived. */
export interface Arrived {
  readonly method?: string | undefined;
  readonly url?: string | undefined;
  readonly headers: IncomingHttpHeaders;
  readonly socket: { readonly remoteAddress?: string | undefined };
}

export declare function arrive(request: Arrived, behindProxy: boolean): 400 | 405 | null;
