import type { PNG } from "pngjs";

/** Grey of a pixel, 0…255 (ITU-R BT.709 weights on the encoded channels), between pixel centres by bilinear interpolation; NaN outside. */
export function greyAt(shot: PNG, x: number, y: number): number {
	const i = Math.floor(x - 0.5);
	const j = Math.floor(y - 0.5);
	if (i < 0 || j < 0 || i + 1 >= shot.width || j + 1 >= shot.height) return Number.NaN;
	const u = x - 0.5 - i;
	const v = y - 0.5 - j;
	const at = (a: number, b: number): number => {
		const k = 4 * (b * shot.width + a);
		return 0.2126 * (shot.data[k] as number) + 0.7152 * (shot.data[k + 1] as number) + 0.0722 * (shot.data[k + 2] as number);
	};
	return (1 - v) * ((1 - u) * at(i, j) + u * at(i + 1, j)) + v * ((1 - u) * at(i, j + 1) + u * at(i + 1, j + 1));
}

/** How much there is to see: distinct colours (5 bits a channel), the standard deviation of the grey, and the share of the commonest colour. */
export function variety(shot: PNG): { readonly colours: number; readonly deviation: number; readonly commonest: number } {
	const counts = new Map<number, number>();
	let sum = 0;
	let squares = 0;
	const n = shot.width * shot.height;
	for (let k = 0; k < 4 * n; k += 4) {
		const [r, g, b] = [shot.data[k] as number, shot.data[k + 1] as number, shot.data[k + 2] as number];
		const key = ((r >> 3) << 10) | ((g >> 3) << 5) | (b >> 3);
		counts.set(key, (counts.get(key) ?? 0) + 1);
		const grey = 0.2126 * r + 0.7152 * g + 0.0722 * b;
		sum += grey;
		squares += grey * grey;
	}
	return { colours: counts.size, deviation: Math.sqrt(squares / n - (sum / n) ** 2), commonest: Math.max(...counts.values()) / n };
}

/**
 * Where a round mark (white, within an ink ring) is found about (x, y): the shift within `reach` px at which the
 * outlines given, relative to (x, y), best fall on white and on ink. `contrast` is their mean difference there, grey levels.
 */
export function findRing(
	shot: PNG,
	x: number,
	y: number,
	white: readonly (readonly [number, number])[],
	ink: readonly (readonly [number, number])[],
	reach: number,
): { readonly dx: number; readonly dy: number; readonly contrast: number } {
	const mean = (points: readonly (readonly [number, number])[], dx: number, dy: number): number => {
		let sum = 0;
		for (const [u, v] of points) sum += greyAt(shot, x + dx + u, y + dy + v);
		return sum / points.length;
	};
	let best = { dx: Number.NaN, dy: Number.NaN, contrast: Number.NEGATIVE_INFINITY };
	for (let dy = -reach; dy <= reach; dy += 0.5)
		for (let dx = -reach; dx <= reach; dx += 0.5) {
			const contrast = mean(white, dx, dy) - mean(ink, dx, dy);
			if (contrast > best.contrast) best = { dx, dy, contrast };
		}
	return best;
}

export interface Stroke {
	/** Direction on the page, rad, counter-clockwise from right. */
	readonly angle: number;
	/** px */
	readonly length: number;
}

/** The ink strokes that start from (x, y) on paper, longest first among equals in darkness: three at most, 20° apart at least. */
export function findStrokes(shot: PNG, x: number, y: number): readonly Stroke[] {
	const paper = Math.max(...[20, -20].flatMap((d) => [greyAt(shot, x + d, y + 40), greyAt(shot, x + d, y - 40)]));
	const ink = (r: number, angle: number): number =>
		Math.min(1, Math.max(0, (paper - greyAt(shot, x + r * Math.cos(angle), y - r * Math.sin(angle))) / (paper * 0.75)));
	const cover = (angle: number, from: number, to: number): number => {
		let sum = 0;
		for (let r = from; r <= to; r += 0.5) sum += ink(r, angle);
		return sum / (2 * (to - from) + 1);
	};
	const rough: number[] = [];
	const order = Array.from({ length: 360 }, (_, i) => ({ angle: (i * Math.PI) / 180, cover: cover((i * Math.PI) / 180, 3, 11) }));
	for (const { angle, cover: covered } of order.sort((a, b) => b.cover - a.cover))
		if (rough.length < 3 && covered > 0.5 && rough.every((other) => Math.cos(other - angle) < Math.cos(Math.PI / 9))) rough.push(angle);
	return rough.map((angle) => {
		let length = 3;
		while (length < 60 && Math.max(ink(length, angle - 0.06), ink(length, angle), ink(length, angle + 0.06)) > 0.35) length += 1;
		let sum = 0;
		let weight = 0;
		for (let d = -8; d <= 8; d += 0.25) {
			const w = cover(angle + (d * Math.PI) / 180, 5, Math.max(8, 0.7 * length)) ** 4;
			sum += w * d;
			weight += w;
		}
		return { angle: angle + ((sum / weight) * Math.PI) / 180, length };
	});
}

/** Left, top, right, bottom of a rectangle, px. */
export type Rect = readonly [number, number, number, number];

/** Pixels in the ochre of ladders, lit or in shade: how many, and how many of them within `px` of one of the points given. */
export function countOchre(
	shot: PNG,
	points: readonly { readonly x: number; readonly y: number }[],
	px: number,
	without: readonly Rect[],
): { readonly all: number; readonly near: number } {
	let all = 0;
	let near = 0;
	for (let j = 0; j < shot.height; j++)
		for (let i = 0; i < shot.width; i++) {
			const k = 4 * (j * shot.width + i);
			const [r, g, b] = [shot.data[k] as number, shot.data[k + 1] as number, shot.data[k + 2] as number];
			if (r - b < 70 || g - b < 30 || r - g > 95) continue;
			if (without.some(([left, top, right, bottom]) => i >= left && i <= right && j >= top && j <= bottom)) continue;
			all += 1;
			if (points.some((p) => Math.hypot(p.x - i - 0.5, p.y - j - 0.5) <= px)) near += 1;
		}
	return { all, near };
}
