import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { PNG } from "pngjs";
import { expect, test } from "vitest";
import { writePng } from "./png.ts";

test("a written picture reads back to the last byte, also one that is part of a larger buffer", () => {
	const folder = mkdtempSync(join(tmpdir(), "offplumb-png-"));
	const pixels = Uint8ClampedArray.from({ length: 64 }, (_, k) => (k % 4 === 3 ? 255 : 37 * k)).subarray(16, 64);
	writePng(join(folder, "a.png"), { width: 4, height: 3, pixels });
	const read = PNG.sync.read(readFileSync(join(folder, "a.png")));
	rmSync(folder, { recursive: true });
	expect([read.width, read.height]).toEqual([4, 3]);
	expect([...read.data]).toEqual([...pixels]);
});
