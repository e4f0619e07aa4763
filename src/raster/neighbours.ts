import type { Triangles } from "../shape/drawable.ts";

/** Corners nearer than this are one, m. */
const WELD = 1e-5;

/**
 * The triangle across each side (corner k to the next) of each triangle, −1 where there is none or
 * more than one. Corners at one place are one; a triangle with two such has no neighbours.
 */
export function neighbours({ position, index }: Triangles): Int32Array {
	const places = new Map<string, number>();
	const place = Int32Array.from({ length: position.length / 3 }, (_, v) => {
		const key = [0, 1, 2].map((k) => Math.round(position[3 * v + k]! / WELD)).join(" ");
		const known = places.get(key);
		if (known !== undefined) return known;
		places.set(key, v);
		return v;
	});
	const out = new Int32Array(index.length).fill(-1);
	/** First side seen between two places, or −1 once two have met there. */
	const open = new Map<number, number>();
	for (let k = 0; k < index.length; k++) {
		const a = place[index[k]!]!;
		const b = place[index[k % 3 === 2 ? k - 2 : k + 1]!]!;
		const c = place[index[k % 3 === 0 ? k + 2 : k - 1]!]!;
		if (a === b || b === c || c === a) continue;
		const key = Math.min(a, b) * place.length + Math.max(a, b);
		const other = open.get(key);
		if (other === undefined) open.set(key, k);
		else if (other >= 0 && out[other] === -1) {
			out[other] = Math.floor(k / 3);
			out[k] = Math.floor(other / 3);
		} else if (other >= 0) {
			out[3 * out[other]! + sideOf(out, out[other]!, Math.floor(other / 3))] = -1;
			out[other] = -1;
			open.set(key, -1);
		}
	}
	return out;
}

/** Which side of triangle t has the neighbour n. */
function sideOf(out: Int32Array, t: number, n: number): number {
	return out[3 * t] === n ? 0 : out[3 * t + 1] === n ? 1 : 2;
}

/** Where pieces that hang together end, in triangles: none of those before an end is a neighbour of one after it. */
export function pieces(across: Int32Array): Uint32Array {
	const ends: number[] = [];
	let farthest = 0;
	for (let t = 0; 3 * t < across.length; t++) {
		farthest = Math.max(farthest, t, across[3 * t]!, across[3 * t + 1]!, across[3 * t + 2]!);
		if (farthest === t) ends.push(t + 1);
	}
	return new Uint32Array(ends);
}
