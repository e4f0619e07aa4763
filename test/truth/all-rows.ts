import type { TruthRow } from "./compare.ts";

const files = import.meta.glob<{ rows(): TruthRow[] }>("./*.rows.ts", { eager: true });

/** Every `*.rows.ts` beside this file, by topic. */
export const topics: readonly { readonly topic: string; readonly rows: readonly TruthRow[] }[] = Object.entries(files).map(
	([path, file]) => ({
		topic: path.replace(/^\.\/|\.rows\.ts$/g, ""),
		rows: file.rows(),
	}),
);
