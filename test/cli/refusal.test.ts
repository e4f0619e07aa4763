import { existsSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { root } from "../../.ci/house.mjs";
import { bundle, demo, ended, offplumb, scratch } from "./support.ts";

const { folder, remove } = scratch();
const file = (name: string, content: string | Buffer): string => {
	const path = join(folder, name);
	writeFileSync(path, content);
	return path;
};
beforeAll(bundle);
afterAll(remove);

const large = `${" ".repeat(5 * 1024 * 1024)}{}`;
const twoFaults = '{ "format": "offplumb-layout", "version": 1, "titel": 3 }';

describe.concurrent("status 2, a message on standard error and nothing on standard output", () => {
	test.each<[string, string[], RegExp, (string | Buffer)?]>([
		["no command", [], /assess FILE/],
		["a command that is none", ["asses"], /"asses" is not a command; expected assess, schema, new/],
		["a name every object has", ["constructor"], /"constructor" is not a command/],
		["an option that is none", ["assess", demo, "--frob"], /--frob/],
		["a value for a switch", ["assess", demo, "--json=yes"], /--json/],
		["an option without its value", ["assess", demo, "--csv"], /--csv/],
		["no file", ["assess"], /takes a layout file, or - for standard input/],
		["two files", ["assess", demo, demo], /at most 1 argument, got 2/],
		["series of a table", ["assess", demo, "--series"], /add --json, or use --csv DIR/],
		["an option of another command", ["new", "--json"], /new does not take --json/],
		["a name too many", ["new", "one", "two"], /at most 1 argument, got 2/],
		["an argument where none is taken", ["schema", "2020"], /at most 0 arguments, got 1/],
		["a file that is not there", ["assess", join(folder, "absent.json")], /absent\.json cannot be read: ENOENT/],
		["a folder", ["assess", folder], /cannot be read: EISDIR/],
		["an empty file", ["assess", file("empty.json", "")], /line 1, column 1: the end of the file, expected a JSON value/],
		["broken JSON", ["assess", file("broken.json", '{\n "format": "offplumb-layout",,')], /line 2, column \d+: ",,?", expected a key/],
		["bytes that are not UTF-8", ["assess", file("latin.json", Buffer.from([0x22, 0xfc, 0x22]))], /not UTF-8/],
		["5 MB in a file", ["assess", file("large.json", large)], /large\.json is no layout: it is longer than 4\d{6} bytes/],
		["5 MB on standard input", ["assess", "-"], /standard input is no layout: it is longer than 4\d{6} bytes/, large],
		["nesting 100,000 deep", ["assess", file("deep.json", "[".repeat(1e5))], /nesting at most 32 deep/],
		["a broken layout on standard input", ["assess", "-"], /standard input is no layout: \d+ problems/, twoFaults],
		["nothing on standard input", ["assess", "-"], /the end of the file/],
		["a folder that is a file", ["assess", demo, "--json", "--csv", file("taken", "")], /taken cannot be written: E/],
	])("%s", async (_, args, message, input = "") => {
		const { status, stdout, stderr } = await offplumb(args, { input });
		expect(stderr).toMatch(message);
		expect(stderr).not.toMatch(/\n\s+at /);
		expect({ status, stdout }).toEqual({ status: 2, stdout: "" });
	});

	test("every fault of a layout at once, with its path, its value, what was expected and the nearest known key", async () => {
		const { stderr } = await offplumb(["assess", "-"], { input: twoFaults });
		expect(stderr).toMatch(/^ {2}titel: .*; nearest: title$/m);
		expect(stderr).toMatch(/^ {2}habitat: missing, expected /m);
		expect(stderr).toMatch(/^ {2}crew: missing, expected /m);
	});

	test("a failure of the tool itself is no finding", async () => {
		const breaking = "data:text/javascript,JSON.stringify=()=>{throw new RangeError('broken on purpose')}";
		const { status, stdout, stderr } = await offplumb(["assess", demo, "--json"], { node: ["--import", breaking] });
		expect(stderr).toMatch(/^offplumb: the tool failed; nothing was assessed\n.*broken on purpose/);
		expect({ status, stdout }).toEqual({ status: 2, stdout: "" });
	});

	test.skipIf(!existsSync("/dev/full"))("a full disk", async () => {
		const command = '"$0" "$1" assess "$2" --json > /dev/full';
		const { status, stderr } = await ended("sh", ["-c", command, process.execPath, await bundle(), demo], "", root);
		expect(stderr).toBe("offplumb: standard output cannot be written: ENOSPC: no space left on device, write\n");
		expect(status).toBe(2);
	});
});
