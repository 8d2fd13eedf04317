import { headers } from "next/headers";

/** Where the proxy puts the path and query of the page that was asked for: a layout is not told them. */
export const PATH_HEADER = "x-sweepwright-path";

/** Path and query of the present request; `otherwise` where the proxy was not asked, as for a page fetched ahead. */
export async function requestedPath(otherwise: string): Promise<string> {
  return (await headers()).get(PATH_HEADER) ?? otherwise;
}
