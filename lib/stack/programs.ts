import { join } from "node:path";
import type { Outputs } from "./build";
import { untilReady } from "./health";
import { launch, type Service } from "./service";

/** What the two programs of the service are told. */
export interface Running {
  readonly databaseUrl: string;
  readonly secret: string;
  /** Address that people open, e.g. http://localhost:4300 */
  readonly address: string;
  readonly host: string;
  readonly port: number;
  readonly workerHealthPort: number;
  readonly outputs: Outputs;
  readonly logs: string;
  readonly development?: boolean;
}

/** Starts the web service; ready when it answers and reaches the database. */
export async function startWeb(running: Running): Promise<Service> {
  const { host, port } = running;
  const service = launch({
    name: "web service",
    program: process.execPath,
    args: running.development
      ? ["node_modules/next/dist/bin/next", "dev", "-H", host, "-p", String(port)]
      : ["lib/stack/web.mjs"],
    env: {
      HOST: host,
      PORT: String(port),
      NODE_ENV: running.development ? "development" : "production",
      NEXT_TELEMETRY_DISABLED: "1",
      SWEEPWRIGHT_DIST: running.outputs.pages,
      DATABASE_URL: running.databaseUrl,
      NEXTAUTH_URL: running.address,
      NEXTAUTH_SECRET: running.secret,
    },
    log: join(running.logs, "web.log"),
  });
  return ready(service, `http://${host}:${port}/api/health/ready`);
}

/** Starts the worker; ready when it can take jobs. */
export async function startWorker(running: Running): Promise<Service> {
  const service = launch({
    name: "worker",
    program: process.execPath,
    args: ["--enable-source-maps", join(running.outputs.worker, "main.mjs")],
    env: {
      NODE_ENV: "production",
      DATABASE_URL: running.databaseUrl,
      WORKER_HEALTH_PORT: String(running.workerHealthPort),
    },
    log: join(running.logs, "worker.log"),
  });
  return ready(service, `http://127.0.0.1:${running.workerHealthPort}/ready`);
}

async function ready(service: Service, url: string): Promise<Service> {
  try {
    await untilReady(service, url);
    return service;
  } catch (error) {
    await service.stop();
    throw error;
  }
}
