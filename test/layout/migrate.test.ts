import { existsSync, readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { MIGRATIONS, type Migration, migrate } from "../../src/layout/migrate.ts";
import { parseLayout } from "../../src/layout/parse.ts";
import { VERSION } from "../../src/layout/schema.ts";
import { whole } from "./support.ts";

const FROZEN = "test/layout/frozen";
const frozen = (version: number): string => `${FROZEN}/v${version}.layout.json`;
const versions = Array.from({ length: VERSION }, (_, i) => i + 1);

describe("every version there has been", () => {
	test.each(versions)("version %i has a frozen sample of that version, which is read", (version) => {
		expect(existsSync(frozen(version)), `no sample ${frozen(version)}`).toBe(true);
		const text = readFileSync(frozen(version), "utf8");
		expect(JSON.parse(text).version).toBe(version);
		expect(whole(parseLayout(text)).version).toBe(VERSION);
	});
	test("has a migration to the next one, but for the present", () => {
		expect(MIGRATIONS.map((m) => m.from)).toEqual(versions.slice(0, -1));
	});
	test("is all that is frozen", () => {
		expect(readdirSync(FROZEN).sort()).toEqual(versions.map((v) => `v${v}.layout.json`).sort());
	});
});

describe("the mechanism, with migrations made up", () => {
	const made: readonly Migration[] = [
		{ from: 1, up: (file) => ({ ...file, crew: [] }) },
		{ from: 2, up: ({ title, ...file }) => ({ ...file, name: title }) },
	];
	test("takes a file through every version in turn and leaves it unchanged", () => {
		const file = Object.freeze({ version: 1, title: "x" });
		expect(migrate(file, made, 3)).toEqual({ ok: true, value: { version: 3, crew: [], name: "x" } });
		expect(migrate({ version: 2, title: "x" }, made, 3)).toEqual({ ok: true, value: { version: 3, name: "x" } });
		expect(migrate({ version: 3, name: "x" }, made, 3)).toEqual({ ok: true, value: { version: 3, name: "x" } });
	});
	test("refuses a newer version by name", () => {
		expect(migrate({ version: 4 }, made, 3)).toEqual({
			ok: false,
			problems: [{ path: "version", value: "4", expected: "3 or older: version 4 is newer than this program reads" }],
		});
	});
	test("does not hide a hole in the list", () => {
		expect(() => migrate({ version: 1 }, made.slice(1), 3)).toThrow("no migration from version 1");
	});
	test.each([null, 1, [], {}, { version: "1" }, { version: 0 }, { version: 1.5 }, { version: -1 }])("passes %j on unchanged", (value) => {
		expect(migrate(value, made, 3)).toEqual({ ok: true, value });
	});
});
