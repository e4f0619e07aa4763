import type { Camera } from "../../src/shape/camera.ts";
import type { Triangles } from "../../src/shape/drawable.ts";
import { LIGHT } from "../../src/shape/light.ts";
import { PALETTE } from "../../src/shape/palette.ts";

/**
 * The picture by brute force: a ray through every pixel's centre against every triangle in double
 * precision, shaded by the three.js formulas for a hemisphere light and a directional one on a
 * Lambert surface. Shares no code with the raster.
 */
export interface OraclePixel {
	/** Distance along the view, m; Infinity where nothing stands. */
	readonly depth: number;
	/** What is seen: the nearest opaque triangle and the translucent ones before it, each counted through all drawables. */
	readonly seen: string;
	/** Number of the nearest opaque triangle, or −1. */
	readonly id: number;
	/** sRGB 0…255, not rounded. */
	readonly colour: readonly [number, number, number];
}

const names = Object.values(PALETTE);
const encoded = (c: number): [number, number, number] => {
	const hex = names[c] as string;
	return [1, 3, 5].map((k) => Number.parseInt(hex.slice(k, k + 2), 16)) as [number, number, number];
};
const toLinear = (byte: number): number => (byte / 255 <= 0.04045 ? byte / 255 / 12.92 : ((byte / 255 + 0.055) / 1.055) ** 2.4);
const toByte = (l: number): number => 255 * (l <= 0.0031308 ? 12.92 * l : 1.055 * Math.min(1, l) ** (1 / 2.4) - 0.055);

function shade(colour: number, n: readonly [number, number, number]): [number, number, number] {
	const lamp = LIGHT.lampDirection;
	const size = Math.hypot(...lamp);
	const weight = 0.5 * n[1] + 0.5;
	const irradiance =
		LIGHT.ground * (1 - weight) + LIGHT.sky * weight + LIGHT.lamp * Math.max(0, (n[0] * lamp[0] + n[1] * lamp[1] + n[2] * lamp[2]) / size);
	return encoded(colour).map((b) => toByte((toLinear(b) * irradiance) / Math.PI)) as [number, number, number];
}

interface Hit {
	z: number;
	u: number;
	v: number;
	front: boolean;
}

function hit(o: Float64Array, d: readonly number[], p: Float32Array, a: number, b: number, c: number): Hit | null {
	const at = (v: number, k: number): number => p[3 * v + k]!;
	const e1 = [0, 1, 2].map((k) => at(b, k) - at(a, k)) as [number, number, number];
	const e2 = [0, 1, 2].map((k) => at(c, k) - at(a, k)) as [number, number, number];
	const [d0, d1, d2] = d as [number, number, number];
	const h = [d1 * e2[2] - d2 * e2[1], d2 * e2[0] - d0 * e2[2], d0 * e2[1] - d1 * e2[0]] as const;
	const det = e1[0] * h[0] + e1[1] * h[1] + e1[2] * h[2];
	if (det === 0) return null;
	const s = [0, 1, 2].map((k) => o[k]! - at(a, k)) as [number, number, number];
	const u = (s[0] * h[0] + s[1] * h[1] + s[2] * h[2]) / det;
	const q = [s[1] * e1[2] - s[2] * e1[1], s[2] * e1[0] - s[0] * e1[2], s[0] * e1[1] - s[1] * e1[0]] as const;
	const v = (d0 * q[0] + d1 * q[1] + d2 * q[2]) / det;
	if (u < 0 || v < 0 || u + v > 1) return null;
	return { z: (e2[0] * q[0] + e2[1] * q[1] + e2[2] * q[2]) / det, u, v, front: det > 0 };
}

/** Opaque triangles by nearness, then translucent ones in list order over them. Drawables in stage coordinates. */
export function cast(drawables: readonly Triangles[], camera: Camera, width: number, height: number, background: number): OraclePixel[] {
	const f = height / 2 / Math.tan(camera.fovY / 2);
	const basis = camera.basis;
	const out: OraclePixel[] = [];
	for (let j = 0; j < height; j++)
		for (let i = 0; i < width; i++) {
			const x = (i + 0.5 - width / 2) / f;
			const y = (height / 2 - j - 0.5) / f;
			const d = [0, 1, 2].map((k) => basis[k]! * x + basis[3 + k]! * y + basis[6 + k]!);
			let depth = Number.POSITIVE_INFINITY;
			let id = -1;
			let seen = "";
			let colour = encoded(background);
			const visit = (translucent: boolean): void => {
				let count = 0;
				for (const t of drawables) {
					for (let k = 0; k < t.index.length; k += 3, count++) {
						if (t.opacity < 1 !== translucent) continue;
						const [a, b, c] = [t.index[k], t.index[k + 1], t.index[k + 2]] as [number, number, number];
						const at = hit(camera.position, d, t.position, a, b, c);
						if (!at || at.z < camera.near || at.z >= depth || (t.side !== "both" && at.front !== (t.side === "front"))) continue;
						const sign = at.front ? 1 : -1;
						const n = [0, 1, 2].map(
							(m) => sign * ((1 - at.u - at.v) * t.normal[3 * a + m]! + at.u * t.normal[3 * b + m]! + at.v * t.normal[3 * c + m]!),
						);
						const own = t.lit ? shade(t.colour[a]!, n as [number, number, number]) : encoded(t.colour[a]!);
						if (translucent) {
							seen += ` ${t.name}`;
							colour = colour.map((under, m) => under + (own[m]! - under) * t.opacity) as [number, number, number];
						} else {
							depth = at.z;
							id = count;
							colour = own;
						}
					}
				}
			};
			visit(false);
			visit(true);
			out.push({ depth, id, seen: `${id}${seen}`, colour });
		}
	return out;
}
