import { beforeAll, describe, expect, test } from "vitest";
import type { Finding } from "../../src/criteria/row.ts";
import { dropFile } from "../support/layout-of.ts";
import { assessed, bundle, demo, offplumb, rule, ruled } from "./support.ts";

beforeAll(bundle);

/** The lines below a heading, up to the next empty one. */
const below = (table: string, heading: string): string[] => {
	const lines = table.split("\n");
	const from = lines.indexOf(heading);
	return from < 0 ? [] : lines.slice(from + 1, lines.indexOf("", from));
};

describe("the demo", () => {
	let table: string;
	let document: { layout: { sha256: string }; activities: Record<string, string>[]; findings: Finding[] };
	beforeAll(async () => {
		const [text, json] = await Promise.all([offplumb(["assess", demo]), offplumb(["assess", demo, "--json"])]);
		expect([text.status, text.stderr]).toEqual([json.status, ""]);
		table = text.stdout;
		document = JSON.parse(json.stdout);
	});

	test("begins with what was assessed and ends with what it does not replace", () => {
		expect(table.split("\n").slice(0, 2)).toEqual(["Larkspur cargo ring, segment C", `sha256 ${document.layout.sha256}`]);
		expect(table).toMatch(/do not replace the project's human-rating authority, local codes or licensed practice\.\n$/);
		expect(table.includes("\u001b")).toBe(false);
	});

	test("every case, with its numbers or that it is not built", () => {
		for (const { id, kind, crew, phase } of document.activities) {
			const lines = below(table, `${id}  ${kind}, ${crew}, ${phase}`);
			if (kind === "drop") expect(lines.length).toBe(12);
			else expect(lines).toEqual(["  not built"]);
		}
		const [struck, , prograde] = below(table, "drop-driver  drop, tall, nominal");
		expect(struck).toMatch(/^ {2}struck +deck:lower$/);
		expect(prograde).toMatch(/^ {2}landing_prograde_m +−0\.302 m$/);
		expect(table).toMatch(/landing_from_feet_axial_m +none \(the layout does not say where the person stands\)/);
	});

	test("findings by force; outside first, then least margin, not assessed last", () => {
		const rank = ["outside", "within", "not-assessed"];
		let told = 0;
		for (const force of ["shall", "should", "information"]) {
			const expected = document.findings
				.filter((f) => f.force === force)
				.map((f, i) => ({ f, i }))
				.sort((a, b) => rank.indexOf(a.f.result) - rank.indexOf(b.f.result) || (a.f.margin ?? 0) - (b.f.margin ?? 0) || a.i - b.i);
			const lines = below(table, `Findings, ${force}`);
			expect(lines.length).toBe(expected.length);
			for (const [i, { f }] of expected.entries()) {
				const who = [f.subject, f.crew, f.phase].filter((s) => s !== null).join(", ");
				expect(lines[i]?.startsWith(`  ${f.result.padEnd(12)} ${who} `)).toBe(true);
				expect(lines[i]).toContain(f.reason ? `: ${f.reason}` : `: ${f.quantity} `);
				expect(lines[i]?.includes("unverified")).toBe(f.basis === "unverified" && f.quantity !== "");
				told++;
			}
		}
		expect(told).toBe(document.findings.length);
		expect(document.findings.some((f) => f.result === "outside")).toBe(true);
		expect(document.findings.some((f) => f.basis === "unverified" && f.quantity !== "")).toBe(true);
		expect(document.findings.some((f) => f.basis !== "unverified")).toBe(true);
	});
});

test("assumptions that the layout replaces are listed, and only those", async () => {
	const layout = { ...ruled(), assumptions: { canal_tau_s: 9, adaptation_tau_s: 80 } };
	const { stdout } = await assessed(layout);
	expect(stdout.split("\n").filter((line) => line.includes("Assumption"))).toEqual([
		"Assumption replaced: Canal time constant, long: 9 s (shipped: 5.7)",
		"Assumption replaced: Adaptation time constant: 80 s (shipped: off)",
	]);
	expect((await assessed(ruled())).stdout).not.toContain("Assumption");
});

test("what a layout says does not command the terminal", async () => {
	const { stdout } = await assessed({
		...ruled({ own: [rule({ title: "two\nlines" })] }),
		title: "\u001b[2Jgone\u0007",
	});
	expect(stdout.split("\n")[0]).toBe("\uFFFD[2Jgone\uFFFD");
	expect(stdout).toContain("two\uFFFDlines: impact_energy_J");
	const { stdout: other } = await assessed(ruled({ own: [rule({ unit: "\u001b[31mJ" })] }));
	expect(other.replaceAll("\n", "")).not.toMatch(/\p{Cc}/u);
	expect(other).toContain("the limit is in \uFFFD[31mJ");
});

test("small, large and negative numbers keep three figures and their sign", async () => {
	const own = [
		rule({ id: "a", limit: 123456 }),
		rule({ id: "b", limit: 0.0000123456, comparison: "at-least" }),
		rule({ id: "c", quantity: "landing_prograde_m", comparison: "at-least", limit: -3.21987, unit: "m" }),
	];
	const { stdout } = await assessed(ruled({ own, activities: [dropFile()] }));
	for (const limit of ["at-most 1.23e+5 J", "at-least 1.23e−5 J", "at-least −3.22 m"]) expect(stdout).toContain(`, ${limit}, margin`);
});
