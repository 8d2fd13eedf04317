import { handOver } from "./bootstrap.mjs";

await handOver("./test.ts");
