import { handOver } from "./bootstrap.mjs";

await handOver("./bench.ts");
