import type { Stars } from "../shape/drawable.ts";
import type { Buffers } from "./buffers.ts";
import { SHADES, type Tones } from "./tone.ts";
import type { View } from "./view.ts";

/** How far beyond its disc a star's light is spread, px. */
const SOFT = 0.6;

/**
 * Adds stars where nothing stands before them. A star's light falls off from its middle as
 * (1 − (d/R)²)², R its radius and half a pixel or so, in linear light, scaled so that the sum over the
 * pixels does not change with its place between them.
 */
export function drawStars(buffers: Buffers, view: View, stars: Stars, skyRotation: Float64Array, pixelRatio: number, tones: Tones): void {
	const { width, height, depth, pixels } = buffers;
	const { direction, size, light } = stars;
	const { stage, focal } = view;
	const { linear, byte } = tones;
	const turned = view.part;
	for (let r = 0; r < 3; r++)
		for (let c = 0; c < 3; c++) {
			let sum = 0;
			for (let k = 0; k < 3; k++) sum += stage[4 * r + k]! * skyRotation[3 * k + c]!;
			turned[4 * r + c] = sum;
		}
	for (let s = 0, i = 0; s < size.length; s++, i += 3) {
		const dx = direction[i]!;
		const dy = direction[i + 1]!;
		const dz = direction[i + 2]!;
		const z = turned[8]! * dx + turned[9]! * dy + turned[10]! * dz;
		if (!(z > 1e-6)) continue;
		const radius = (size[s]! * pixelRatio) / 2 + SOFT;
		const x = width / 2 + (focal * (turned[0]! * dx + turned[1]! * dy + turned[2]! * dz)) / z;
		const y = height / 2 - (focal * (turned[4]! * dx + turned[5]! * dy + turned[6]! * dz)) / z;
		if (!(x > -radius && x < width + radius && y > -radius && y < height + radius)) continue;
		const firstX = Math.ceil(x - radius - 0.5);
		const lastX = Math.floor(x + radius - 0.5);
		const firstY = Math.ceil(y - radius - 0.5);
		const lastY = Math.floor(y + radius - 0.5);
		let sum = 0;
		for (let py = firstY; py <= lastY; py++) for (let px = firstX; px <= lastX; px++) sum += falloff(px + 0.5 - x, py + 0.5 - y, radius);
		const share = (Math.PI * radius * radius) / 3 / sum;
		for (let py = Math.max(0, firstY); py <= lastY && py < height; py++)
			for (let px = Math.max(0, firstX); px <= lastX && px < width; px++) {
				const at = py * width + px;
				if (depth[at]! !== 0) continue;
				const part = share * falloff(px + 0.5 - x, py + 0.5 - y, radius);
				for (let c = 0; c < 3; c++) {
					const sum = linear[pixels[4 * at + c]!]! + part * light[i + c]!;
					pixels[4 * at + c] = byte[Math.min(SHADES - 1, sum * (SHADES - 1) + 0.5) | 0]!;
				}
			}
	}
}

function falloff(dx: number, dy: number, radius: number): number {
	const q = 1 - (dx * dx + dy * dy) / (radius * radius);
	return q > 0 ? q * q : 0;
}
