import { createServer, type Server } from "node:http";

/**
 * Answers `GET /health` (200 as long as the process lives) and `GET /ready` (200 when it can take work, otherwise 503), on the
 * loopback address alone. Port 0 takes a free one; read it from the server's address.
 */
export function serveHealth(port: number, state: () => { readonly ready: boolean }): Promise<Server> {
  const server = createServer((request, response) => {
    const answer = (status: number, body: object) => {
      response.writeHead(status, { "content-type": "application/json", "cache-control": "no-store" });
      response.end(JSON.stringify(body));
    };
    if (request.method !== "GET") answer(405, { error: "Only GET is answered here." });
    else if (request.url === "/health") answer(200, { live: true });
    else if (request.url === "/ready") {
      const now = state();
      answer(now.ready ? 200 : 503, now);
    } else answer(404, { error: "There are /health and /ready." });
  });
  return new Promise((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, "127.0.0.1", () => {
      server.off("error", reject);
      resolve(server);
    });
  });
}
