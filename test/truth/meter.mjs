/** Prints the accuracy table: `node test/truth/meter.mjs`. */
import { fileURLToPath } from "node:url";
import { runnerImport } from "vite";

const { module } = await runnerImport(fileURLToPath(new URL("meter.ts", import.meta.url)), { logLevel: "error", configFile: false });
console.log(module.meterTable(module.allRows()));
