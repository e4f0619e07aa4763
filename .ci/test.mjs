// @ts-check
import { ensureInstalled, runNode } from "./house.mjs";

await ensureInstalled();
process.exitCode = await runNode("node_modules/vitest/vitest.mjs", ["run", ...process.argv.slice(2)], { stdout: "inherit" });
