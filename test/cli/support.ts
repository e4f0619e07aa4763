import { spawn } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { ensureBuilt, root } from "../../.ci/house.mjs";
import type { CriterionOwn, LayoutFile } from "../../src/layout/schema.ts";
import { dropFile, type LayoutParts, layoutOf } from "../support/layout-of.ts";

export const demo = join(root, "assets/layout/larkspur.layout.json");

export interface Ended {
	readonly status: number | null;
	readonly stdout: string;
	readonly stderr: string;
}

export interface Setting {
	readonly input?: string | Buffer;
	readonly cwd?: string;
	/** Arguments of node itself. */
	readonly node?: readonly string[];
}

let built: Promise<string> | undefined;
/** The one bundled file, built where these sources have none yet. */
export const bundle = (): Promise<string> => {
	built ??= ensureBuilt("cli");
	return built;
};

/** Runs the bundle as its user does. */
export async function offplumb(args: readonly string[], { input = "", cwd = root, node = [] }: Setting = {}): Promise<Ended> {
	return ended(process.execPath, [...node, await bundle(), ...args], input, cwd);
}

export function ended(command: string, args: readonly string[], input: string | Buffer, cwd: string): Promise<Ended> {
	const child = spawn(command, args, { cwd, stdio: "pipe" });
	let stdout = "";
	let stderr = "";
	child.stdout.setEncoding("utf8").on("data", (part) => {
		stdout += part;
	});
	child.stderr.setEncoding("utf8").on("data", (part) => {
		stderr += part;
	});
	// A child that has read enough closes its end.
	child.stdin.on("error", () => {});
	child.stdin.end(input);
	return new Promise((resolve, reject) => {
		child.on("error", reject);
		child.on("close", (status) => resolve({ status, stdout, stderr }));
	});
}

/** Assesses a layout given on standard input. */
export const assessed = (layout: LayoutFile, ...options: string[]): Promise<Ended> =>
	offplumb(["assess", "-", ...options], { input: JSON.stringify(layout) });

/** A folder of its own and how it is thrown away. */
export function scratch(): { readonly folder: string; remove(): void } {
	const folder = mkdtempSync(join(tmpdir(), "offplumb-cli-"));
	return { folder, remove: () => rmSync(folder, { recursive: true, force: true }) };
}

/** A verified rule on the energy of a drop, held with room, unless said otherwise. */
export const rule = (over: Partial<CriterionOwn> = {}): CriterionOwn => ({
	id: "energy",
	title: "Energy at the first impact",
	applies_to: "drop",
	quantity: "impact_energy_J",
	comparison: "at-most",
	limit: 40,
	unit: "J",
	force: "shall",
	basis: "standard",
	source: "A standard",
	note: "",
	...over,
});

/** A drop held against a verified rule and nothing else, unless said otherwise. */
export const ruled = (parts: LayoutParts = {}): LayoutFile => layoutOf({ activities: [dropFile()], own: [rule()], ...parts });
