import {
	angleNear,
	type Deck,
	deckTriad,
	floorAlong,
	floorAngle,
	type Habitat,
	type Hatch,
	placeOnDeck,
	type WindowOpening,
} from "../../src/layout/habitat.ts";
import type { Triangles } from "../../src/shape/drawable.ts";
import { directionToStage, fromStage, type StageFrame, toStage } from "../../src/shape/stage-frame.ts";
import { type RingVec, ring } from "../../src/vector/vec3.ts";
import { dotted, minus, type Point, plus, positionAt, ringAt, size, vertexCount } from "./probe.ts";

const stage = (frame: StageFrame, p: RingVec): Point => {
	const out: [number, number, number] = [0, 0, 0];
	toStage(frame, p, out);
	return out;
};
const stageWay = (frame: StageFrame, v: RingVec): Point => {
	const out: [number, number, number] = [0, 0, 0];
	directionToStage(frame, v, out);
	return out;
};
/** Points of a unit square's edge, none at a corner. */
export function squarePoint(k: number): readonly [number, number] {
	const side = k % 4;
	const t = Math.floor(k / 4) / 4 - 0.37;
	return side === 0 ? [0.5, t] : side === 1 ? [t, 0.5] : side === 2 ? [-0.5, t] : [t, -0.5];
}

/** A ray that starts 5 cm inside the bay before the point (a, c) of an opening's plane and runs outward through it. */
export function probe(
	habitat: Habitat,
	o: WindowOpening | Hatch,
	surface: string,
	a: number,
	c: number,
	frame: StageFrame,
): { readonly from: Point; readonly way: Point } {
	const deck = habitat.decks[o.deck] as Deck;
	const before = 0.05;
	if (surface === "floor" || surface === "ceiling") {
		const level = surface === "floor" ? deck : { ...deck, radius: deck.radius - deck.headroom };
		const angle = floorAngle(level, floorAlong(level, o.angle) + a);
		const out = surface === "floor" ? -1 : 1;
		/** A shaft runs along the radius, a reveal along the face's normal. */
		const up = stageWay(frame, "surface" in o ? deckTriad(deck, angle).up : ring(-Math.cos(angle), -Math.sin(angle), 0));
		return { from: plus(stage(frame, placeOnDeck(level, angle, o.axial + c, 0)), -out * before, up), way: plus([0, 0, 0], out, up) };
	}
	const w = o as WindowOpening;
	if (surface === "end-low" || surface === "end-high") {
		const into = surface === "end-low" ? 1 : -1;
		const angle =
			deck.floor === "curved"
				? w.angle + a / (deck.radius - w.height)
				: floorAngle({ ...deck, radius: deck.radius - w.height - c }, floorAlong(deck, w.angle) + a);
		const z = (surface === "end-low" ? deck.axialFrom : deck.axialTo) + into * before;
		const at =
			deck.floor === "curved"
				? placeOnDeck(deck, angle, z, w.height + c)
				: placeOnDeck({ ...deck, radius: deck.radius - w.height - c }, angle, z, 0);
		return { from: stage(frame, at), way: [0, 0, -into] };
	}
	const angle = surface === "side-low" ? deck.from : deck.to;
	const slant = deck.floor === "curved" ? 1 : 1 / Math.cos(angle - deck.middle);
	const r = (deck.radius - w.height) * slant - c;
	const into = surface === "side-low" ? 1 : -1;
	const prograde = ring(-Math.sin(angle), Math.cos(angle), 0);
	const at = ring(r * Math.cos(angle) + into * before * prograde[0], r * Math.sin(angle) + into * before * prograde[1], w.axial + a);
	return { from: stage(frame, at), way: plus([0, 0, 0], -into, stageWay(frame, prograde)) };
}

/** Middle of an opening on its face. */
function centreOf(habitat: Habitat, o: WindowOpening | Hatch): RingVec {
	const deck = habitat.decks[o.deck] as Deck;
	const surface = "surface" in o ? o.surface : "floor";
	if (surface === "floor" || surface === "ceiling") {
		const height = surface === "floor" ? 0 : deck.headroom;
		return placeOnDeck({ ...deck, radius: deck.radius - height }, o.angle, o.axial, 0);
	}
	const w = o as WindowOpening;
	if (surface.startsWith("end")) return placeOnDeck(deck, w.angle, surface === "end-low" ? deck.axialFrom : deck.axialTo, w.height);
	const angle = surface === "side-low" ? deck.from : deck.to;
	const r = (deck.radius - w.height) / (deck.floor === "curved" ? 1 : Math.cos(angle - deck.middle));
	return ring(r * Math.cos(angle), r * Math.sin(angle), w.axial);
}

const reachOf = (o: WindowOpening | Hatch): number => (o.shape === "circle" ? o.along / 2 : Math.hypot(o.along, o.across) / 2) + 0.13;

/** Whether a point lies near an opening that leads outside. */
export const atOpening = (habitat: Habitat, p: RingVec): boolean =>
	[...habitat.windows, ...habitat.hatches.filter((h) => h.below === null)].some((o) => {
		const c = centreOf(habitat, o);
		return Math.hypot(p[0] - c[0], p[1] - c[1], p[2] - c[2]) < reachOf(o) + 0.05;
	});

/** Whether a stage point lies where a long ring's built arc ends. */
export function atCutOff(habitat: Habitat, faces: readonly Triangles[], frame: StageFrame, p: Point): boolean {
	const at = fromStage(frame, ...p);
	return habitat.decks.some((deck) => {
		const floor = faces.find((m) => m.name === `bay:${deck.id}:floor`);
		if (!floor || !deck.closed || deck.radius < 100) return false;
		const angle = (q: RingVec): number => angleNear(Math.atan2(q[1], q[0]), frame.angle);
		const all = Array.from({ length: vertexCount(floor) }, (_, i) => angle(ringAt(frame, floor, i)));
		return [Math.min(...all), Math.max(...all)].some((end) => Math.abs(angle(at) - end) < 1e-6);
	});
}

/** Whether an opening lies in what is built of its deck. */
export function nearBuilt(habitat: Habitat, faces: readonly Triangles[], frame: StageFrame, o: WindowOpening | Hatch): boolean {
	const floor = faces.find((m) => m.name === `bay:${habitat.decks[o.deck]?.id}:floor`);
	if (!floor) return false;
	const c = stage(frame, centreOf(habitat, o));
	const far = Math.max(...Array.from({ length: vertexCount(floor) }, (_, i) => Math.abs(positionAt(floor, i)[0])));
	return Math.abs(c[0]) < far - 2 || (habitat.decks[o.deck] as Deck).radius < 100;
}

/** Whether a ray passes through an opening that leads outside, or by one to a deck that has such. */
export const leavesByOpening = (habitat: Habitat, frame: StageFrame, eye: Point, way: Point): boolean =>
	[...habitat.windows, ...habitat.hatches].some((o) => {
		const to = minus(stage(frame, centreOf(habitat, o)), eye);
		const along = dotted(to, way);
		return along > 0 && size(plus(to, -along, way)) < reachOf(o);
	});
