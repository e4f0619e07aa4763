// @ts-check
import { prepare, runNode } from "./house.mjs";

await prepare({ builds: ["cli", "app"] });
// Bundled first: a test runner's wrapping of every import would be in the measurement.
const built = await runNode("node_modules/vite/bin/vite.js", ["build", "--mode", "bench", "--logLevel", "warn"]);
process.exitCode = built !== 0 ? built : await runNode(".cache/bench/bench.mjs", process.argv.slice(2), { stdout: "inherit" });
