import { createServer } from "node:net";
import { Complaint } from "./complaint";

/** Where the demo is found when nothing else is asked for. */
export const USUAL_PORT = 4300;
/** How many ports after the usual one are tried. */
const TRIES = 50;

/** Whether nothing listens on the port, by either loopback address: a browser that opens "localhost" may use both. */
export async function isFree(port: number, host = "127.0.0.1"): Promise<boolean> {
  return (
    (await canListen(port, host)) !== null &&
    (host !== "127.0.0.1" || (await canListen(port, "::1")) !== null)
  );
}

/** A port of the loopback address that nothing listens on at present. */
export async function freePort(): Promise<number> {
  const port = await canListen(0, "127.0.0.1");
  if (port === null) throw new Complaint("No port of this machine's loopback address is free.");
  return port;
}

/** The port that was listened on for a moment; null when it is taken. A machine without that address has it free. */
function canListen(port: number, host: string): Promise<number | null> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", (error: NodeJS.ErrnoException) => {
      if (error.code === "EADDRINUSE") resolve(null);
      else if (error.code === "EADDRNOTAVAIL" || error.code === "EAFNOSUPPORT") resolve(port);
      else if (error.code === "EACCES")
        reject(new Complaint(`This user may not listen on port ${port}. Choose one above 1023.`));
      else reject(error);
    });
    server.listen({ port, host, exclusive: true }, () => {
      const address = server.address();
      const got = typeof address === "object" && address !== null ? address.port : port;
      server.close(() => resolve(got));
    });
  });
}

/** The port that was chosen a while ago, where nobody else has taken it since; else another one, or a complaint, as at first. */
export async function keepPort(port: number, given: string | undefined, host?: string): Promise<number> {
  return (await isFree(port, host)) ? port : choosePort(given, host);
}

/**
 * The port for the web service. One that was asked for (`given`, as in PORT) must be free; otherwise the usual one, or the next
 * free one after it.
 */
export async function choosePort(given: string | undefined, host?: string): Promise<number> {
  if (given !== undefined && given !== "") {
    const port = Number(given);
    if (!Number.isInteger(port) || port < 1 || port > 65_535) {
      throw new Complaint(`PORT is "${given}", which is no port. Give a whole number from 1 to 65535.`);
    }
    if (await isFree(port, host)) return port;
    throw new Complaint(
      `Port ${port} is taken by another program. Stop that one, or choose another port: PORT=${port + 1} npm start`,
    );
  }
  for (let port = USUAL_PORT; port < USUAL_PORT + TRIES; port++) {
    if (!(await isFree(port, host))) continue;
    if (port !== USUAL_PORT) console.log(`Port ${USUAL_PORT} is taken by another program; using ${port}.`);
    return port;
  }
  throw new Complaint(
    `Ports ${USUAL_PORT} to ${USUAL_PORT + TRIES - 1} are all taken. Choose one: PORT=… npm start`,
  );
}
