import { availableParallelism } from "node:os";
import { fileURLToPath } from "node:url";
import react from "@vitejs/plugin-react";
import { defineConfig } from "vitest/config";

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

/** r3f resolves to CommonJS under Vitest and would bring a second three. */
const fiber = here("node_modules/@react-three/fiber/dist/react-three-fiber.esm.js");

/**
 * `vite build` makes the app, `vite build --mode cli` the one-file command line, `--mode bench` the benchmarks.
 * `vitest` runs everything but `*.long.test.ts`; `vitest --mode long` runs only those.
 */
export default defineConfig(({ mode }) => {
	const testing = process.env.VITEST !== undefined;
	if (mode === "cli" || mode === "bench") {
		const entry = mode === "cli" ? { offplumb: here("src/cli/bin.ts") } : { bench: here("test/bench/run.ts") };
		return {
			root: here("."),
			publicDir: false,
			ssr: mode === "cli" ? { noExternal: true } : {},
			build: {
				ssr: true,
				target: "node20",
				outDir: here(mode === "cli" ? "dist" : ".cache/bench"),
				emptyOutDir: mode === "bench",
				minify: mode === "cli",
				assetsInlineLimit: Number.POSITIVE_INFINITY,
				rolldownOptions: {
					input: entry,
					external: mode === "bench" ? [/[\\/]\.ci[\\/]/] : [],
					output: { entryFileNames: "[name].mjs", format: "es", codeSplitting: mode === "bench" },
				},
			},
		};
	}
	return {
		root: here(testing ? "." : "app"),
		base: "./",
		publicDir: false,
		plugins: [react()],
		resolve: {
			dedupe: ["three", "react", "react-dom", "@react-three/fiber"],
			alias: testing ? [{ find: /^@react-three\/fiber$/, replacement: fiber }] : [],
		},
		build: {
			outDir: here("dist/app"),
			emptyOutDir: true,
			target: "es2023",
			modulePreload: { polyfill: false },
			chunkSizeWarningLimit: 1000,
		},
		test: {
			environment: "node",
			include: mode === "long" ? ["test/**/*.long.test.{ts,tsx}"] : ["test/**/*.test.{ts,tsx}"],
			exclude: mode === "long" ? [] : ["test/**/*.long.test.{ts,tsx}"],
			// Left alone, the runner keeps one of two cores free.
			maxWorkers: Math.max(2, availableParallelism() - 1),
			testTimeout: mode === "long" ? 600_000 : 60_000,
			hookTimeout: 180_000,
			server: { deps: { inline: [/@react-three\//] } },
		},
	};
});
