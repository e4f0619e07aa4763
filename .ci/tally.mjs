// @ts-check
// Counts what the test runner reported and ends with the line "N passed, N failed".
import { readFileSync } from "node:fs";

const [path = "", testStatus, checkStatus] = process.argv.slice(2);
let passed = 0;
let failed = 0;
try {
	const { testResults } = JSON.parse(readFileSync(path, "utf8"));
	for (const { name, status, message, assertionResults } of testResults) {
		const here = assertionResults.filter((/** @type {{ status: string }} */ test) => test.status === "failed").length;
		passed += assertionResults.filter((/** @type {{ status: string }} */ test) => test.status === "passed").length;
		// A file that could not even be read has no tests to fail.
		failed += here === 0 && status === "failed" ? 1 : here;
		if (here === 0 && status === "failed") console.log(`failed: ${name}: ${message}`);
	}
} catch (error) {
	console.log(`the test runner left no results: ${error instanceof Error ? error.message : error}`);
	failed++;
}
if (passed + failed === 0) {
	console.log("no test ran");
	failed++;
}
if (testStatus !== "0" && failed === 0) {
	console.log(`npm test ended with status ${testStatus} though no test failed`);
	failed++;
}
if (checkStatus === "0") passed++;
else {
	console.log(`npm run check ended with status ${checkStatus}`);
	failed++;
}
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed > 0 ? 1 : 0;
