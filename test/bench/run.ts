/** Runs every *.bench.ts beside it, one after the other, and prints what was measured beside its goal. Words given narrow it by name. */
import { type Bench, keeps } from "./bench.ts";

const modules = import.meta.glob<Bench | { default: Bench | Bench[] }>("./*.bench.ts");
const words = process.argv.slice(2);
const benches: Bench[] = [];
for (const path of Object.keys(modules).sort()) {
	const module = await modules[path]?.();
	if (module !== undefined) benches.push(...("run" in module ? [module] : [module.default].flat()));
}
const chosen = benches.filter((bench) => words.every((word) => bench.name.includes(word)));
const rows: string[][] = [];
for (const bench of chosen) {
	process.stderr.write(`${bench.name} …\n`);
	const { ratio, value, unit, detail } = await bench.run();
	const number = ratio ?? value ?? Number.NaN;
	const digits = Math.abs(number) >= 100 ? number.toFixed(0) : number.toPrecision(3);
	rows.push([
		bench.name,
		`${digits} ${ratio === undefined ? (unit ?? "") : "×"}`.trim(),
		bench.goal,
		keeps(number, bench.goal) ? "kept" : "MISSED",
		detail,
	]);
}
const head = ["measurement", "measured", "goal", "", "detail"];
const widths = head.map((title, i) => Math.max(title.length, ...rows.map((row) => row[i]?.length ?? 0)));
const line = (cells: string[]): string => cells.map((cell, i) => (i === head.length - 1 ? cell : cell.padEnd(widths[i] ?? 0))).join("  ");
process.stdout.write(
	`${[head, widths.map((width, i) => "-".repeat(i === head.length - 1 ? (head[i]?.length ?? 0) : width)), ...rows].map(line).join("\n")}\n`,
);
process.exitCode = rows.length === 0 || rows.some((row) => row[3] !== "kept") ? 1 : 0;
