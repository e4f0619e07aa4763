// @ts-check
import { prepare, runNode, say } from "./house.mjs";

await prepare();
/** @type {[string, string, string[]][]} */
const checks = [
	["types of the core", "node_modules/typescript/bin/tsc", ["-p", "tsconfig.json"]],
	["types of the app", "node_modules/typescript/bin/tsc", ["-p", "tsconfig.app.json"]],
	["types of command line and tests", "node_modules/typescript/bin/tsc", ["-p", "tsconfig.node.json"]],
	["lint and format", "node_modules/@biomejs/biome/bin/biome", ["check", "--error-on-warnings"]],
	["dead code", "node_modules/knip/bin/knip.js", []],
	["layers", "node_modules/vitest/vitest.mjs", ["run", "test/architecture.test.ts"]],
];
const failed = [];
for (const [name, script, args] of checks) {
	const begin = Date.now();
	const status = await runNode(script, args, { stdout: "inherit" });
	say(`${status === 0 ? "ok  " : "FAIL"} ${name} (${((Date.now() - begin) / 1000).toFixed(1)} s)`);
	if (status !== 0) failed.push(name);
}
if (failed.length > 0) say(`failed: ${failed.join(", ")}`);
process.exitCode = failed.length > 0 ? 1 : 0;
