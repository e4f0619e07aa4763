import type { Box, Capsule } from "../layout/solid.ts";
import { cross, type RingVec, ring, sub, unit } from "../vector/vec3.ts";
import type { LineBuilder, MeshBuilder } from "./mesh.ts";
import type { ColourIndex } from "./palette.ts";
import { directionToStage, type StageFrame, toStage } from "./stage-frame.ts";

type Triple = [number, number, number];

const stagePoint = (frame: StageFrame, p: RingVec): Triple => {
	const out: Triple = [0, 0, 0];
	toStage(frame, p, out);
	return out;
};
const stageDirection = (frame: StageFrame, v: RingVec): Triple => {
	const out: Triple = [0, 0, 0];
	directionToStage(frame, v, out);
	return out;
};

/** A box in the stage: its middle and its half axes. */
interface StageBox {
	readonly centre: Triple;
	readonly axes: readonly [Triple, Triple, Triple];
	readonly half: readonly [number, number, number];
}

const stageBox = (frame: StageFrame, box: Box): StageBox => ({
	centre: stagePoint(frame, box.centre),
	axes: box.axes.map((a) => stageDirection(frame, a)) as unknown as StageBox["axes"],
	half: box.half,
});

/** The point of a box at (i, j, k) half axes from its middle. */
const pointOf = (b: StageBox, i: number, j: number, k: number): Triple =>
	[0, 1, 2].map(
		(x) =>
			(b.centre[x] as number) +
			i * b.half[0] * (b.axes[0][x] as number) +
			j * b.half[1] * (b.axes[1][x] as number) +
			k * b.half[2] * (b.axes[2][x] as number),
	) as Triple;

/** The six faces of a box; `face` names one (axis, sign) that takes another colour. */
export function boxMesh(
	mesh: MeshBuilder,
	frame: StageFrame,
	box: Box,
	colour: ColourIndex,
	face?: { readonly axis: 0 | 1 | 2; readonly sign: 1 | -1; readonly colour: ColourIndex },
): void {
	const b = stageBox(frame, box);
	for (const axis of [0, 1, 2] as const)
		for (const sign of [1, -1] as const) {
			const n = b.axes[axis].map((x) => sign * x) as Triple;
			const tint = face?.axis === axis && face.sign === sign ? face.colour : colour;
			const corners = (
				[
					[-1, -1],
					[1, -1],
					[1, 1],
					[-1, 1],
				] as const
			).map(([s, t]) => {
				const k: Triple = [0, 0, 0];
				k[axis] = sign;
				k[(axis + 1) % 3] = s;
				k[(axis + 2) % 3] = t;
				return mesh.vertex(...pointOf(b, ...k), ...n, tint);
			});
			mesh.quad(...(corners as [number, number, number, number]));
		}
}

/** The twelve edges of a box, `stand` m outside it. */
export function boxEdges(lines: LineBuilder, frame: StageFrame, box: Box, colour: ColourIndex, stand = 0.0008): void {
	const [h0, h1, h2] = box.half;
	const b = stageBox(frame, { ...box, half: [h0 + stand, h1 + stand, h2 + stand] });
	for (const axis of [0, 1, 2] as const)
		for (const [s, t] of [
			[-1, -1],
			[1, -1],
			[1, 1],
			[-1, 1],
		] as const) {
			const end = (sign: number): Triple => {
				const k: Triple = [0, 0, 0];
				k[axis] = sign;
				k[(axis + 1) % 3] = s;
				k[(axis + 2) % 3] = t;
				return pointOf(b, ...k);
			};
			lines.segment(...end(-1), ...end(1), colour);
		}
}

/** How an end of a tube is closed: flat where the body's round end meets what it stands on, round, or open inside another body. */
export type TubeEnd = "flat" | "round" | "open";

/** A capsule as a round tube of `sides` sides; a flat end stands a radius beyond the capsule's own end point. */
export function tubeMesh(
	mesh: MeshBuilder,
	frame: StageFrame,
	capsule: Capsule,
	sides: number,
	ends: readonly [TubeEnd, TubeEnd],
	colour: ColourIndex,
): void {
	const axis = unit(sub(capsule.b, capsule.a));
	const aside = unit(cross(axis, Math.abs(axis[2]) < 0.9 ? ring(0, 0, 1) : ring(1, 0, 0)));
	const w = stageDirection(frame, axis);
	const e = stageDirection(frame, aside);
	const f = stageDirection(frame, cross(axis, aside));
	const r = capsule.radius;
	const p = [stagePoint(frame, capsule.a), stagePoint(frame, capsule.b)] as const;
	/** A circle about the axis: `out` of the radius, `on` along the axis from an end, its normal leaning `lean` along the axis. */
	const circle = (end: 0 | 1, out: number, on: number, lean: number): number[] =>
		Array.from({ length: sides }, (_, i) => {
			const t = (2 * Math.PI * i) / sides;
			const c = Math.cos(t);
			const s = Math.sin(t);
			const across = Math.sqrt(1 - lean * lean);
			const d = [0, 1, 2].map((x) => c * (e[x] as number) + s * (f[x] as number)) as Triple;
			const at = [0, 1, 2].map((x) => (p[end][x] as number) + out * r * (d[x] as number) + on * (w[x] as number)) as Triple;
			const n = [0, 1, 2].map((x) => across * (d[x] as number) + lean * (w[x] as number)) as Triple;
			return mesh.vertex(...at, ...n, colour);
		});
	const belt = (low: readonly number[], high: readonly number[]): void => {
		for (let i = 0; i < sides; i++) {
			const j = (i + 1) % sides;
			mesh.quad(low[i] as number, low[j] as number, high[j] as number, high[i] as number);
		}
	};
	const tip = (end: 0 | 1, on: number): number =>
		mesh.vertex(
			...([0, 1, 2].map((x) => (p[end][x] as number) + on * (w[x] as number)) as Triple),
			...(w.map((x) => (end === 0 ? -x : x)) as Triple),
			colour,
		);
	const fan = (ring: readonly number[], apex: number): void => {
		for (let i = 0; i < sides; i++) mesh.triangle(apex, ring[i] as number, ring[(i + 1) % sides] as number);
	};
	const bodies: number[][] = [];
	for (const end of [0, 1] as const) {
		const sign = end === 0 ? -1 : 1;
		const kind = ends[end];
		bodies.push(circle(end, 1, kind === "flat" ? sign * r : 0, 0));
		if (kind === "flat") fan(circle(end, 1, sign * r, sign), tip(end, sign * r));
		if (kind === "round") {
			const waist = bodies[end] as number[];
			const shoulder = circle(end, Math.SQRT1_2, sign * r * Math.SQRT1_2, sign * Math.SQRT1_2);
			belt(waist, shoulder);
			fan(shoulder, tip(end, sign * r));
		}
	}
	belt(bodies[0] as number[], bodies[1] as number[]);
}
