import { handOver } from "./bootstrap.mjs";

await handOver("./start.ts");
