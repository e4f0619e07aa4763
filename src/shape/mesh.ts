import type { Triangles, WideLines } from "./drawable.ts";
import type { ColourIndex } from "./palette.ts";

type Look = Partial<Pick<Triangles, "side" | "lit" | "opacity" | "decal" | "over">>;

/** A float array that doubles when full. */
class Floats {
	#data = new Float32Array(192);
	length = 0;

	push3(x: number, y: number, z: number): void {
		if (this.length + 3 > this.#data.length) {
			const wider = new Float32Array(2 * this.#data.length);
			wider.set(this.#data);
			this.#data = wider;
		}
		this.#data[this.length++] = x;
		this.#data[this.length++] = y;
		this.#data[this.length++] = z;
	}
	at(i: number): number {
		return this.#data[i] as number;
	}
	taken(): Float32Array {
		return this.#data.slice(0, this.length);
	}
}

/** Gathers triangles in stage coordinates; a triangle is wound to agree with the normal of its first vertex. */
export class MeshBuilder {
	readonly #position = new Floats();
	readonly #normal = new Floats();
	readonly #colour: number[] = [];
	readonly #index: number[] = [];

	/** Returns the vertex's number. The normal is unit. */
	vertex(x: number, y: number, z: number, nx: number, ny: number, nz: number, colour: ColourIndex): number {
		this.#position.push3(x, y, z);
		this.#normal.push3(nx, ny, nz);
		return this.#colour.push(colour) - 1;
	}

	triangle(a: number, b: number, c: number): void {
		const p = this.#position;
		const n = this.#normal;
		const ax = p.at(3 * a);
		const ay = p.at(3 * a + 1);
		const az = p.at(3 * a + 2);
		const ux = p.at(3 * b) - ax;
		const uy = p.at(3 * b + 1) - ay;
		const uz = p.at(3 * b + 2) - az;
		const vx = p.at(3 * c) - ax;
		const vy = p.at(3 * c + 1) - ay;
		const vz = p.at(3 * c + 2) - az;
		const facing = (uy * vz - uz * vy) * n.at(3 * a) + (uz * vx - ux * vz) * n.at(3 * a + 1) + (ux * vy - uy * vx) * n.at(3 * a + 2);
		if (facing < 0) this.#index.push(a, c, b);
		else this.#index.push(a, b, c);
	}

	/** A quadrilateral a, b, c, d in order round it. */
	quad(a: number, b: number, c: number, d: number): void {
		this.triangle(a, b, c);
		this.triangle(a, c, d);
	}

	/** Front faces, lit, opaque and no decal unless said. */
	build(name: string, look: Look = {}): Triangles {
		return {
			kind: "triangles",
			name,
			position: this.#position.taken(),
			normal: this.#normal.taken(),
			colour: new Uint8Array(this.#colour),
			index: new Uint32Array(this.#index),
			side: look.side ?? "front",
			lit: look.lit ?? true,
			opacity: look.opacity ?? 1,
			decal: look.decal ?? false,
			...(look.over ? { over: true } : {}),
		};
	}
}

/** The ink edge of a closed mesh: its vertices pushed out along their normals by `thickness` m, seen from behind. */
export function inkHull(mesh: Triangles, thickness: number, ink: ColourIndex): Triangles {
	return {
		...mesh,
		name: `${mesh.name}:hull`,
		position: mesh.position.map((x, i) => x + thickness * (mesh.normal[i] as number)),
		colour: new Uint8Array(mesh.colour.length).fill(ink),
		side: "back",
		lit: false,
	};
}

/** Gathers segments of one width in stage coordinates. */
export class LineBuilder {
	readonly #position = new Floats();
	readonly #colour: number[] = [];

	segment(ax: number, ay: number, az: number, bx: number, by: number, bz: number, colour: ColourIndex): void {
		this.#position.push3(ax, ay, az);
		this.#position.push3(bx, by, bz);
		this.#colour.push(colour);
	}

	/** Points as 3 numbers each, joined in order. */
	run(points: readonly number[], colour: ColourIndex): void {
		const p = (i: number): number => points[i] as number;
		for (let i = 3; i + 2 < points.length; i += 3) this.segment(p(i - 3), p(i - 2), p(i - 1), p(i), p(i + 1), p(i + 2), colour);
	}

	/** Solid and depth-tested. */
	build(name: string, width: number, opacity = 1): WideLines {
		const colour = new Uint8Array(this.#colour);
		return { kind: "lines", name, position: this.#position.taken(), colour, width, dash: null, depth: "tested", opacity };
	}
}
