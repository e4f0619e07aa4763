// @ts-check
// What every entry needs before the packages are there: Node's own modules only.
import { spawn } from "node:child_process";
import { createHash } from "node:crypto";
import {
	chmodSync,
	copyFileSync,
	existsSync,
	mkdirSync,
	readdirSync,
	readFileSync,
	renameSync,
	rmSync,
	statSync,
	utimesSync,
	writeFileSync,
} from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

export const root = dirname(dirname(fileURLToPath(import.meta.url)));
export const cache = join(root, ".cache");
const HEARTBEAT_MS = 1000;
const STALE_MS = 30_000;

/** Standard output belongs to the program that is started; everything about starting it goes here. @param {string} text */
export const say = (text) => process.stderr.write(`offplumb: ${text}\n`);

/** Says why and ends with status 1. @param {string} text @returns {never} */
export function refuse(text) {
	say(text);
	process.exit(1);
}

const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
if (major < 20 || (major === 20 && minor < 19)) refuse(`Node ${process.versions.node} is too old: 20.19 or newer is needed`);

/**
 * Runs a command in the checkout and resolves to its exit status. Its standard output is sent to standard error unless `stdout` is "inherit".
 * @param {string} command @param {string[]} args @param {{ env?: NodeJS.ProcessEnv, stdout?: "inherit" }} [options] @returns {Promise<number>}
 */
export function run(command, args, { env = process.env, stdout } = {}) {
	return new Promise((resolve) => {
		const child = spawn(command, args, { cwd: root, env, stdio: ["ignore", stdout ?? 2, 2], shell: command.endsWith(".cmd") });
		const pass = (/** @type {NodeJS.Signals} */ signal) => child.kill(signal);
		process.on("SIGINT", pass).on("SIGTERM", pass);
		const done = (/** @type {number} */ status) => {
			process.off("SIGINT", pass).off("SIGTERM", pass);
			resolve(status);
		};
		child.on("error", (error) => {
			say(error.message);
			done(127);
		});
		child.on("exit", (status, signal) => done(status ?? (signal === "SIGINT" ? 130 : 143)));
	});
}

/** Runs a package's script by path, without a shell. @param {string} script @param {string[]} args @param {Parameters<typeof run>[2]} [options] */
export const runNode = (script, args, options) => run(process.execPath, [join(root, script), ...args], options);

/** @param {number} pid */
function alive(pid) {
	try {
		process.kill(pid, 0);
		return true;
	} catch (error) {
		return /** @type {NodeJS.ErrnoException} */ (error).code === "EPERM";
	}
}

/** Creates the file with this process's id in it, or returns false where it exists. @param {string} path */
function claim(path) {
	try {
		writeFileSync(path, String(process.pid), { flag: "wx" });
		return true;
	} catch (error) {
		if (/** @type {NodeJS.ErrnoException} */ (error).code === "EEXIST") return false;
		throw error;
	}
}

/** Whether the holder died: its process is gone or its heartbeat stopped. @param {string} path */
function abandoned(path) {
	try {
		const silent = Date.now() - statSync(path).mtimeMs;
		const pid = Number(readFileSync(path, "utf8"));
		return silent > STALE_MS || (pid > 0 && !alive(pid));
	} catch {
		return false;
	}
}

/**
 * Holds `.cache/NAME.lock` while `work` runs; a second process waits. An abandoned lock is broken under a lock of its own, so that two waiters
 * cannot both break it.
 * @template T @param {string} name @param {() => Promise<T>} work @returns {Promise<T>}
 */
export async function locked(name, work) {
	mkdirSync(cache, { recursive: true });
	const path = join(cache, `${name}.lock`);
	const breaking = `${path}.break`;
	for (let waits = 0; !claim(path); waits++) {
		if (waits === 10) say(`waiting for another process (${name})`);
		if (abandoned(path) && claim(breaking)) {
			if (abandoned(path)) rmSync(path, { force: true });
			rmSync(breaking, { force: true });
			continue;
		}
		if (abandoned(breaking)) rmSync(breaking, { force: true });
		await new Promise((resolve) => setTimeout(resolve, 100));
	}
	const release = () => rmSync(path, { force: true });
	process.on("exit", release);
	const heartbeat = setInterval(() => existsSync(path) && utimesSync(path, new Date(), new Date()), HEARTBEAT_MS);
	try {
		return await work();
	} finally {
		clearInterval(heartbeat);
		process.off("exit", release);
		release();
	}
}

/** Whether what npm says it installed is what the lockfile asks for. Packages of other platforms may be absent; extra ones do no harm. */
function installed() {
	try {
		const wanted = JSON.parse(readFileSync(join(root, "package-lock.json"), "utf8")).packages;
		const present = JSON.parse(readFileSync(join(root, "node_modules/.package-lock.json"), "utf8")).packages;
		return Object.entries(wanted).every(([path, entry]) => {
			if (path === "") return true;
			const found = present[path];
			return found ? found.version === entry.version && found.integrity === entry.integrity : entry.optional === true;
		});
	} catch {
		return false;
	}
}

/** Installs from the lockfile where `node_modules` is missing or does not match it. */
export async function ensureInstalled() {
	if (installed()) return;
	await locked("install", async () => {
		if (installed()) return;
		say("installing packages from package-lock.json");
		const args = ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"];
		const npm = process.env.npm_execpath;
		const status = npm?.endsWith(".js")
			? await run(process.execPath, [npm, ...args])
			: await run(process.platform === "win32" ? "npm.cmd" : "npm", args);
		if (status !== 0) throw new Error(`npm ci ended with status ${status}`);
		if (!installed()) throw new Error("npm ci did not install what package-lock.json lists");
	});
}

/** Paths of all files below, sorted. @param {string} path @returns {string[]} */
function filesBelow(path) {
	const full = join(root, path);
	if (!existsSync(full)) return [];
	if (statSync(full).isFile()) return [path];
	return readdirSync(full)
		.sort()
		.flatMap((name) => filesBelow(`${path}/${name}`));
}

/** @type {Record<"app" | "cli", { inputs: string[], output: string, args: string[] }>} */
const builds = {
	app: { inputs: ["app", "src", "assets"], output: "app", args: [] },
	cli: { inputs: ["src", "assets"], output: "offplumb.mjs", args: ["--mode", "cli"] },
};

/** @param {"app" | "cli"} name */
function stampOf(name) {
	const hash = createHash("sha256").update(process.versions.node);
	const always = ["package.json", "package-lock.json", "vite.config.ts", "tsconfig.json", "tsconfig.app.json", "LICENSE", "THIRD-PARTY.md"];
	for (const path of [...always, ...builds[name].inputs].flatMap(filesBelow)) {
		const bytes = readFileSync(join(root, path));
		hash.update(`${path}\0${bytes.length}\0`).update(bytes);
	}
	return hash.digest("hex");
}

/**
 * Builds into a folder of its own and moves the result into `dist` when it is whole, unless `dist` already holds what these sources make.
 * @param {"app" | "cli"} name @param {{ force?: boolean }} [options] @returns {Promise<string>} path of the built file or folder
 */
export async function ensureBuilt(name, { force = false } = {}) {
	const { output, args } = builds[name];
	const target = join(root, "dist", output);
	const stampFile = join(root, "dist", `.${name}.stamp`);
	const current = () => existsSync(target) && existsSync(stampFile) && readFileSync(stampFile, "utf8") === stampOf(name);
	if (!force && current()) return target;
	return locked(`build-${name}`, async () => {
		if (!force && current()) return target;
		say(`building ${output}`);
		const stamp = stampOf(name);
		const staging = join(cache, `build-${name}`);
		rmSync(staging, { recursive: true, force: true });
		// The variable vitest sets in its workers would make the build take the configuration of the tests.
		const { VITEST: _, NODE_ENV: __, ...env } = process.env;
		const status = await runNode(
			"node_modules/vite/bin/vite.js",
			["build", ...args, "--outDir", staging, "--emptyOutDir", "--logLevel", "warn"],
			{ env },
		);
		if (status !== 0) throw new Error(`the build of ${output} ended with status ${status}`);
		mkdirSync(join(root, "dist"), { recursive: true });
		if (name === "cli") {
			chmodSync(join(staging, output), 0o755);
			renameSync(join(staging, output), target);
		} else {
			for (const notice of ["LICENSE", "THIRD-PARTY.md"]) copyFileSync(join(root, notice), join(staging, notice));
			const old = join(cache, `old-${name}`);
			rmSync(old, { recursive: true, force: true });
			if (existsSync(target)) renameSync(target, old);
			renameSync(staging, target);
			rmSync(old, { recursive: true, force: true });
		}
		writeFileSync(stampFile, stamp);
		return target;
	});
}

/**
 * For the scripts of package.json: packages, then builds, or the reason why not and status 1.
 * @param {{ builds?: ("app" | "cli")[], force?: boolean }} [options]
 */
export async function prepare({ builds = [], force = false } = {}) {
	try {
		await ensureInstalled();
		for (const name of builds) await ensureBuilt(name, { force });
	} catch (error) {
		refuse(error instanceof Error ? error.message : String(error));
	}
}
