import type { Drawable, Triangles } from "../shape/drawable.ts";
import { lambert } from "../shape/light.ts";
import { PALETTE_BYTES } from "../shape/palette.ts";
import { neighbours, pieces } from "./neighbours.ts";
import { level } from "./tone.ts";

/** What is worked out once for a drawable; empty where it has no use. */
export interface Prepared {
	/** Of triangles: `neighbours`. */
	readonly across: Int32Array;
	/** Of painted triangles: `pieces`. Of opaque ones: all as one. */
	readonly pieces: Uint32Array;
	/** Of lit triangles the ramp level of each vertex standing still, seen from the front and from behind. */
	readonly front: Float32Array;
	readonly back: Float32Array;
}

const NONE = new Float32Array(0);
const ALONE = new Int32Array(0);
const WHOLE = new Uint32Array([0xffffffff]);

/** Checks a drawable and prepares it. Throws RangeError with name, place and value on what cannot be drawn. */
export function prepare(drawable: Drawable): Prepared {
	check(drawable);
	if (drawable.kind !== "triangles") return { across: ALONE, pieces: WHOLE, front: NONE, back: NONE };
	const { lit, side } = drawable;
	const across = neighbours(drawable);
	return {
		across,
		pieces: drawable.opacity < 1 || drawable.decal || drawable.over ? pieces(across) : WHOLE,
		front: lit && side !== "back" ? levels(drawable, 1) : NONE,
		back: lit && side !== "front" ? levels(drawable, -1) : NONE,
	};
}

function levels({ normal }: Triangles, sign: 1 | -1): Float32Array {
	const out = new Float32Array(normal.length / 3);
	for (let v = 0; v < out.length; v++) out[v] = level(lambert(sign * normal[3 * v]!, sign * normal[3 * v + 1]!, sign * normal[3 * v + 2]!));
	return out;
}

function check(drawable: Drawable): void {
	const { name } = drawable;
	const refuse = (what: string): never => {
		throw new RangeError(`"${name}" cannot be drawn: ${what}`);
	};
	const numbers = (key: string, values: Float32Array, length: number): void => {
		if (values.length !== length) refuse(`${key} holds ${values.length} numbers, expected ${length}`);
		for (let i = 0; i < length; i++) if (!Number.isFinite(values[i])) refuse(`${key}[${i}] is ${values[i]}`);
	};
	const colours = (values: Uint8Array, length: number): void => {
		if (values.length !== length) refuse(`colour holds ${values.length} indices, expected ${length}`);
		const end = PALETTE_BYTES.length / 3;
		for (let i = 0; i < length; i++) if (values[i]! >= end) refuse(`colour[${i}] is ${values[i]}, the palette ends at ${end - 1}`);
	};
	const whole = (key: string, length: number, by: number): number =>
		length % by === 0 ? length / by : refuse(`${key} holds ${length} numbers, not a multiple of ${by}`);
	if (drawable.kind === "stars") {
		const count = whole("direction", drawable.direction.length, 3);
		numbers("direction", drawable.direction, 3 * count);
		numbers("size", drawable.size, count);
		numbers("light", drawable.light, 3 * count);
		return;
	}
	if (!(drawable.opacity > 0 && drawable.opacity <= 1)) refuse(`opacity is ${drawable.opacity}, not above 0 and at most 1`);
	if (drawable.kind === "lines") {
		const count = whole("position", drawable.position.length, 6);
		numbers("position", drawable.position, 6 * count);
		colours(drawable.colour, count);
		if (!(drawable.width > 0 && drawable.width <= 64)) refuse(`width is ${drawable.width} px, not above 0 and at most 64`);
		const { dash } = drawable;
		if (dash && !(dash[0] > 0 && dash[1] > 0 && Number.isFinite(dash[0] + dash[1])))
			refuse(`dash is ${dash[0]} m and ${dash[1]} m, not both above 0`);
		return;
	}
	const count = whole("position", drawable.position.length, 3);
	numbers("position", drawable.position, 3 * count);
	numbers("normal", drawable.normal, 3 * count);
	colours(drawable.colour, count);
	whole("index", drawable.index.length, 3);
	for (const [i, v] of drawable.index.entries()) if (v >= count) refuse(`index[${i}] is ${v}, there are ${count} vertices`);
}
