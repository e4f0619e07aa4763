// @ts-check
import { prepare, runNode } from "./house.mjs";

await prepare();
process.exitCode = await runNode("node_modules/vitest/vitest.mjs", ["run", ...process.argv.slice(2)], { stdout: "inherit" });
