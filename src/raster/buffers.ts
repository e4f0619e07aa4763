/** The pixels of one picture and what is known of each. Index of pixel (i, j): j · width + i. */
export interface Buffers {
	readonly width: number;
	readonly height: number;
	/** RGBA, sRGB, alpha 255. */
	readonly pixels: Uint8ClampedArray<ArrayBuffer>;
	/** The same memory, a word a pixel. */
	readonly words: Uint32Array<ArrayBuffer>;
	/** 1 / (distance along the view), 1/m; 0 where nothing stands. */
	readonly depth: Float32Array<ArrayBuffer>;
	/** Of the wide line being gathered: 1 + its place in the list of touched pixels, or 0. */
	readonly touched: Int32Array<ArrayBuffer>;
}

/** Throws RangeError on a size that is not a whole number from 1 to 16 384. */
export function createBuffers(width: number, height: number): Buffers {
	for (const n of [width, height])
		if (!(Number.isInteger(n) && n >= 1 && n <= 16384))
			throw new RangeError(`a picture is 1 to 16384 whole pixels wide and high, got ${width} × ${height}`);
	const pixels = new Uint8ClampedArray(4 * width * height);
	return {
		width,
		height,
		pixels,
		words: new Uint32Array(pixels.buffer),
		depth: new Float32Array(width * height),
		touched: new Int32Array(width * height),
	};
}

/** Writes into `into`, half the size, the mean of each 2 × 2 pixels and the nearest of their depths. */
export function halve(from: Buffers, into: Buffers): void {
	const { words, depth } = from;
	const w = from.width;
	let out = 0;
	for (let j = 0; j < into.height; j++) {
		let i = 2 * j * w;
		for (const end = i + w; i < end; i += 2, out++) {
			const a = words[i]!;
			const b = words[i + 1]!;
			const c = words[i + w]!;
			const d = words[i + w + 1]!;
			if (a === b && a === c && a === d) into.words[out] = a;
			else {
				const even = ((a & 0xff00ff) + (b & 0xff00ff) + (c & 0xff00ff) + (d & 0xff00ff) + 0x20002) >>> 2;
				const odd = ((a >>> 8) & 0xff00ff) + ((b >>> 8) & 0xff00ff) + ((c >>> 8) & 0xff00ff) + ((d >>> 8) & 0xff00ff) + 0x20002;
				into.words[out] = (even & 0xff00ff) | ((odd << 6) & 0xff00ff00);
			}
			into.depth[out] = Math.max(depth[i]!, depth[i + 1]!, depth[i + w]!, depth[i + w + 1]!);
		}
	}
}
