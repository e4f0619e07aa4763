import { execFileSync, spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { delimiter, join } from "node:path";
import { cache, locked, root, run, say } from "../../.ci/house.mjs";

export interface Chromium {
	readonly executable: string;
	readonly env: Record<string, string>;
	/** Where it was found: the variable, the path, or the lockfile. */
	readonly origin: "OFFPLUMB_CHROMIUM" | "PATH" | "@sparticuz/chromium";
}

const names = ["google-chrome-stable", "google-chrome", "chromium", "chromium-browser", "chrome"];
const applications = ["/Applications/Google Chrome.app/Contents/MacOS/Google Chrome", "/Applications/Chromium.app/Contents/MacOS/Chromium"];

/** Some systems put a script named chromium on the path that only says how to install one: it must start and say its version. */
const starts = (executable: string, env: NodeJS.ProcessEnv = process.env): boolean => {
	const ended = spawnSync(executable, ["--version"], { env, encoding: "utf8", timeout: 30_000 });
	return ended.status === 0 && /\b\d+\.\d+\.\d+\.\d+\b/.test(ended.stdout);
};

function onPath(): string | undefined {
	const folders = (process.env.PATH ?? "").split(delimiter).filter((folder) => folder !== "");
	return [...folders.flatMap((folder) => names.map((name) => join(folder, name))), ...applications].find(
		(path) => existsSync(path) && starts(path),
	);
}

/** A page with text ends a browser that finds no font at all: its own are offered beside those of the system. */
const fontsConf = (folder: string): string => `<?xml version="1.0"?>
<!DOCTYPE fontconfig SYSTEM "fonts.dtd">
<fontconfig>
	<include ignore_missing="yes">/etc/fonts/fonts.conf</include>
	<dir>${folder.replaceAll("&", "&amp;").replaceAll("<", "&lt;")}/fonts</dir>
	<cachedir prefix="xdg">fontconfig</cachedir>
</fontconfig>
`;

/** Unpacks the browser that the lockfile pins into a folder named after its version: the package re-uses whatever lies in TMPDIR. */
async function unpack(): Promise<string> {
	const { version } = JSON.parse(readFileSync(join(root, "node_modules/@sparticuz/chromium/package.json"), "utf8"));
	const folder = join(cache, `chromium-${version}`);
	if (existsSync(folder)) return folder;
	return locked("chromium", async () => {
		if (existsSync(folder)) return folder;
		say(`unpacking Chromium ${version}`);
		const staging = `${folder}.part`;
		rmSync(staging, { recursive: true, force: true });
		mkdirSync(staging, { recursive: true });
		// The package brings its system libraries only where it believes to be on Amazon Linux.
		const env = { ...process.env, TMPDIR: staging, AWS_EXECUTION_ENV: "AWS_Lambda_nodejs20.x" };
		const script = `const { default: chromium } = await import("@sparticuz/chromium"); await chromium.executablePath();`;
		const status = await run(process.execPath, ["--input-type=module", "-e", script], { env });
		if (status !== 0) throw new Error(`unpacking @sparticuz/chromium ended with status ${status}`);
		writeFileSync(join(staging, "fonts.conf"), fontsConf(folder));
		renameSync(staging, folder);
		return folder;
	});
}

/** An environment variable, then an installed Chrome or Chromium, then the one in the lockfile. */
export async function findChromium(): Promise<Chromium> {
	const env = Object.fromEntries(Object.entries(process.env).filter((entry): entry is [string, string] => entry[1] !== undefined));
	const given = env.OFFPLUMB_CHROMIUM ?? "";
	if (given !== "") {
		if (!starts(given)) throw new Error(`OFFPLUMB_CHROMIUM is "${given}", which does not start as a Chromium`);
		return { executable: given, env, origin: "OFFPLUMB_CHROMIUM" };
	}
	const found = onPath();
	if (found !== undefined) return { executable: found, env, origin: "PATH" };
	if (process.platform !== "linux" || process.arch !== "x64")
		throw new Error(`no Chrome or Chromium found on ${process.platform} ${process.arch}: name one in OFFPLUMB_CHROMIUM`);
	const folder = await unpack();
	const executable = join(folder, "chromium");
	env.FONTCONFIG_FILE = join(folder, "fonts.conf");
	if (starts(executable, env)) return { executable, env, origin: "@sparticuz/chromium" };
	env.LD_LIBRARY_PATH = [join(folder, "al2023/lib"), env.LD_LIBRARY_PATH].filter(Boolean).join(delimiter);
	if (!starts(executable, env))
		throw new Error(`${executable} does not start: ${execFileSync("ldd", [executable], { env, encoding: "utf8" })}`);
	return { executable, env, origin: "@sparticuz/chromium" };
}
