import { type Deck, floorAlong, floorAngle, placeOnDeck } from "../layout/habitat.ts";
import type { RingVec } from "../vector/vec3.ts";
import type { Part } from "./drawable.ts";
import { LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR, type ColourIndex } from "./palette.ts";
import { part } from "./part.ts";
import { type StageFrame, toStage } from "./stage-frame.ts";

/** Marks painted on a floor are lifted by this, m, so that grid lines do not cut them. */
const LIFT = 0.004;
const ROUND = 40;

/** Floor coordinates: metres along prograde on the deck, and axial. */
export interface FloorPoint {
	readonly along: number;
	readonly axial: number;
}

/** Writes the stage point of a floor place. */
function put(frame: StageFrame, deck: Deck, along: number, axial: number, lift: number, out: number[]): void {
	toStage(frame, placeOnDeck(deck, floorAngle(deck, along), axial, lift), out);
}

export const floorPoint = (deck: Deck, p: RingVec): FloorPoint => ({
	along: floorAlong(deck, nearMiddle(deck, Math.atan2(p[1], p[0]))),
	axial: p[2],
});
const nearMiddle = (deck: Deck, angle: number): number => angle - 2 * Math.PI * Math.round((angle - deck.middle) / (2 * Math.PI));

/** Where the thing lands: a filled disc in a ring with a cross, painted on the floor. */
export function landingMark(frame: StageFrame, deck: Deck, at: FloorPoint, radius: number): readonly Part[] {
	const mesh = new MeshBuilder();
	disc(mesh, frame, deck, at, 0, radius * 2.1, LIFT, COLOUR.halo);
	disc(mesh, frame, deck, at, 0, radius * 1.05, LIFT + 0.001, COLOUR.ink);
	disc(mesh, frame, deck, at, radius * 1.75, radius * 2.1, LIFT + 0.001, COLOUR.ink);
	const lines = new LineBuilder();
	const a = [0, 0, 0];
	const b = [0, 0, 0];
	for (const [u, v] of [
		[1, 0],
		[-1, 0],
		[0, 1],
		[0, -1],
	] as const) {
		put(frame, deck, at.along + u * radius * 1.75, at.axial + v * radius * 1.75, LIFT + 0.001, a);
		put(frame, deck, at.along + u * radius * 2.9, at.axial + v * radius * 2.9, LIFT + 0.001, b);
		lines.segment(...(a as [number, number, number]), ...(b as [number, number, number]), COLOUR.ink);
	}
	return [part(mesh.build("landing", { lit: false, decal: true, side: "both" })), part(lines.build("landing:cross", 1.8))];
}

/** Where it would have landed without turning: an open ring. */
export function ghostMark(frame: StageFrame, deck: Deck, at: FloorPoint, radius: number): readonly Part[] {
	const mesh = new MeshBuilder();
	for (let i = 0; i < 12; i++)
		arc(mesh, frame, deck, at, radius * 1.6, radius * 2.0, (i * Math.PI) / 6, (i * Math.PI) / 6 + Math.PI / 10, LIFT + 0.001, COLOUR.muted);
	disc(mesh, frame, deck, at, 0, radius * 0.4, LIFT + 0.001, COLOUR.muted);
	return [part(mesh.build("ghost landing", { lit: false, decal: true, side: "both" }))];
}

/** The gap between the two, along the floor: the answer. */
export function gapLine(frame: StageFrame, deck: Deck, from: FloorPoint, to: FloorPoint, radius: number): readonly Part[] {
	const along = to.along - from.along;
	const axial = to.axial - from.axial;
	const span = Math.hypot(along, axial);
	if (!(span > 4 * radius)) return [];
	const u = along / span;
	const v = axial / span;
	const begin = radius * 2.2;
	const end = span - radius * 2.3;
	const mesh = new MeshBuilder();
	const strip = (s0: number, s1: number, w0: number, w1: number, lift: number, colour: ColourIndex): void => {
		const n = Math.max(1, Math.ceil((s1 - s0) / 0.25));
		const p = [0, 0, 0];
		let before: [number, number] | null = null;
		for (let i = 0; i <= n; i++) {
			const s = s0 + ((s1 - s0) * i) / n;
			const w = w0 + ((w1 - w0) * i) / n;
			const pair = ([1, -1] as const).map((side) => {
				put(frame, deck, from.along + u * s - v * w * side, from.axial + v * s + u * w * side, lift, p);
				return mesh.vertex(p[0] as number, p[1] as number, p[2] as number, 0, 1, 0, colour);
			}) as [number, number];
			if (before) mesh.quad(before[0], before[1], pair[1], pair[0]);
			before = pair;
		}
	};
	const head = Math.min(0.055, span * 0.3);
	const half = 0.008;
	strip(begin - 0.006, end - head + 0.002, half + 0.008, half + 0.008, LIFT, COLOUR.halo);
	strip(end - head - 0.008, end + 0.012, 0.036, 0.004, LIFT, COLOUR.halo);
	strip(begin, end - head + 0.002, half, half, LIFT + 0.001, COLOUR.coriolis);
	strip(end - head, end, 0.026, 0, LIFT + 0.001, COLOUR.coriolis);
	return [part(mesh.build("gap", { lit: false, decal: true, side: "both" }))];
}

function disc(
	mesh: MeshBuilder,
	frame: StageFrame,
	deck: Deck,
	at: FloorPoint,
	inner: number,
	outer: number,
	lift: number,
	colour: ColourIndex,
): void {
	arc(mesh, frame, deck, at, inner, outer, 0, 2 * Math.PI, lift, colour);
}

function arc(
	mesh: MeshBuilder,
	frame: StageFrame,
	deck: Deck,
	at: FloorPoint,
	inner: number,
	outer: number,
	from: number,
	to: number,
	lift: number,
	colour: ColourIndex,
): void {
	const n = Math.max(2, Math.ceil((ROUND * (to - from)) / (2 * Math.PI)));
	const p = [0, 0, 0];
	let before: [number, number] | null = null;
	for (let i = 0; i <= n; i++) {
		const turn = from + ((to - from) * i) / n;
		const pair = ([inner, outer] as const).map((r) => {
			put(frame, deck, at.along + r * Math.cos(turn), at.axial + r * Math.sin(turn), lift, p);
			return mesh.vertex(p[0] as number, p[1] as number, p[2] as number, 0, 1, 0, colour);
		}) as [number, number];
		if (before) mesh.quad(before[0], before[1], pair[1], pair[0]);
		before = pair;
	}
}
