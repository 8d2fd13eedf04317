import { createServer } from "node:http";
import next from "next";
import { arrive } from "./arrival.mjs";

/**
 * The web service: the built pages behind Node's own server (Next.js's guide "Custom Server"). It is ours for one reason:
 * `next start` believes the X-Forwarded-For that a client sends, and the limit of sign-ins per address rests on it. Here it is
 * what the socket says, unless SWEEPWRIGHT_BEHIND_PROXY says that a proxy of ours sets it.
 */
const hostname = process.env.HOST ?? "127.0.0.1";
const port = Number(process.env.PORT);
const behindProxy = process.env.SWEEPWRIGHT_BEHIND_PROXY === "1";

const app = next({ dev: false, hostname, port });
const handle = app.getRequestHandler();
await app.prepare();

const server = createServer((request, response) => {
  const refused = arrive(request, behindProxy);
  if (refused !== null) {
    response.writeHead(refused, { "content-type": "text/plain", connection: "close" });
    response.end(refused === 405 ? "This method is not answered.\n" : "This is no address of a page.\n");
    return;
  }
  handle(request, response).catch((error) => {
    console.error("A request broke off.", error);
    if (!response.headersSent) response.writeHead(500);
    response.end();
  });
});
server.on("error", (error) => {
  console.error(error.message);
  process.exit(1);
});
server.listen(port, hostname, () => console.log(`Listening at http://${hostname}:${port}`));

/** Answers what is under way, streams excepted, then ends. */
function stop() {
  server.close(() => process.exit(0));
  server.closeIdleConnections();
  setTimeout(() => server.closeAllConnections(), 1_500).unref();
}
process.once("SIGTERM", stop);
process.once("SIGINT", stop);
