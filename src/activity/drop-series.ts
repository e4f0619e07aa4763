import { dropPose, poseFor } from "../body/drop.ts";
import { headCentre } from "../body/gaze.ts";
import type { Pose } from "../body/pose.ts";
import { trunk } from "../body/skeleton.ts";
import { apparentParts } from "../frame/apparent.ts";
import { cylindricalFromRing, localFromRing, ringFromLocal, type Triad } from "../frame/place.ts";
import { angleNear, type Deck, deckTriad, heightAbove, placeOnDeck, type WindowOpening } from "../layout/habitat.ts";
import { degFromRad, gFromMps2 } from "../quantity/convert.ts";
import { written } from "../quantity/round.ts";
import { add, dot, type HeadVec, head, type LocalVec, length, local, type RingVec, ring, scale, sub } from "../vector/vec3.ts";
import { canalReport } from "../vestibular/report.ts";
import type { Context } from "./context.ts";
import { type Drop, eventsOfDrop } from "./drop.ts";
import { personOf } from "./drop-person.ts";
import type { Series } from "./result.ts";

/** Shortest step (s) and most steps of a series. */
const STEP = 1 / 120;
const MOST_STEPS = 3999;
/** A window counts as in view within this of the gaze, rad: half of a wide human field. */
const IN_VIEW = (60 * Math.PI) / 180;

/** Posture of the head at one sample. */
interface HeadSample {
	/** Head axes (X forward, Y left, Z up) in the stance's local axes (prograde, up, axial), row by row. */
	readonly axes: readonly [LocalVec, LocalVec, LocalVec];
	readonly centre: RingVec;
	readonly gaze: RingVec;
}

/** Every series key of the contract for a drop; null where a direction does not exist (no weight) or no stars are to be seen. */
export function dropSeries(context: Context, drop: Drop): Series {
	const { spin, canals } = context;
	const duration = drop.flight.end;
	const step = Math.max(STEP, duration / MOST_STEPS);
	const count = Math.floor(duration / step + 1e-9) + 1;
	const times = Array.from({ length: count }, (_, i) => i * step);
	const { stance, deck } = drop;
	const triad = deckTriad(deck, stance.angle);
	const heads = headSamples(context, drop, triad, times);
	const turns = turnRates(heads, step);
	const spinAxis = heads.map((h) => head(h.axes[0][2], h.axes[1][2], h.axes[2][2]));
	const omega = (i: number, withSpin: boolean): HeadVec =>
		withSpin ? add(turns[i] as HeadVec, scale(spinAxis[i] as HeadVec, spin.rate(i * step))) : (turns[i] as HeadVec);
	const samples = { from: 0, step, count };
	const report = canalReport(
		between(count, step, (i) => omega(i, true)),
		samples,
		canals,
	);
	const still = canalReport(
		between(count, step, (i) => omega(i, false)),
		samples,
		canals,
	);
	const size = (a: Float64Array, i: number, b?: Float64Array): number =>
		Math.hypot(...[0, 1, 2].map((k) => (a[3 * i + k] as number) - (b ? (b[3 * i + k] as number) : 0)));
	const at = (i: number): HeadVec => head(report[3 * i] as number, report[3 * i + 1] as number, report[3 * i + 2] as number);

	const feet = stance.given ? stance.position : belowRelease(drop);
	const floor = deckTriad(deck, cylindricalFromRing(feet).angle);
	const stand = times.map((t) => localFromRing(floor, apparentParts(spin, t, feet, ring(0, 0, 0), ring(0, 0, 0)).sum));
	const object = times.map((t) => objectSample(context, drop, t));
	const numbers = (f: (i: number) => number): number[] => times.map((_, i) => written(f(i)));
	const directions = (f: (i: number) => number): (number | null)[] =>
		times.map((_, i) => (length(stand[i] as LocalVec) > 0 ? written(f(i)) : null));
	const vectors = (f: (i: number) => LocalVec): number[][] => times.map((_, i) => [...f(i)].map(written));
	const down = (i: number): number => -(stand[i] as LocalVec)[1];
	return {
		t_s: numbers((i) => i * step),
		level_g: numbers((i) => gFromMps2(length(stand[i] as LocalVec))),
		tilt_prograde_deg: directions((i) => degFromRad(Math.atan2((stand[i] as LocalVec)[0], down(i)))),
		tilt_axial_deg: directions((i) => degFromRad(Math.atan2((stand[i] as LocalVec)[2], down(i)))),
		head_tilt_deg: directions((i) => headTilt(context, triad, heads[i] as HeadSample, i * step)),
		c_mps2: vectors((i) => (object[i] as ObjectSample).centrifugal),
		k_mps2: vectors((i) => (object[i] as ObjectSample).coriolis),
		e_mps2: vectors((i) => (object[i] as ObjectSample).euler),
		a_mps2: vectors((i) => (object[i] as ObjectSample).own),
		lateral_mps2: numbers((i) => Math.hypot((stand[i] as LocalVec)[0], (stand[i] as LocalVec)[2])),
		eyes_degps: numbers((i) => degFromRad(length(turns[i] as HeadVec))),
		stars_degps: times.map((_, i) =>
			windowInView(context, drop, heads[i] as HeadSample) ? written(degFromRad(length(omega(i, true)))) : null,
		),
		ear_degps: numbers((i) => degFromRad(size(report, i))),
		illusion_degps: numbers((i) => degFromRad(size(report, i, still))),
		disagree_degps: numbers((i) => degFromRad(length(sub(turns[i] as HeadVec, at(i))))),
		radius_m: numbers((i) => (object[i] as ObjectSample).radius),
		angle_deg: numbers((i) => degFromRad((object[i] as ObjectSample).angle)),
		axial_m: numbers((i) => (object[i] as ObjectSample).axial),
		events: eventsOfDrop(drop).map((e) => ({ t_s: written(e.t), name: e.name })),
	};
}

/** A function of time that runs straight between the samples. */
function between(count: number, step: number, sample: (i: number) => HeadVec): (t: number) => HeadVec {
	const known = Array.from({ length: count }, (_, i) => sample(i));
	return (t) => {
		const x = Math.min(count - 1, Math.max(0, t / step));
		const i = Math.min(count - 2, Math.floor(x));
		if (count === 1 || i < 0) return known[0] as HeadVec;
		const a = known[i] as HeadVec;
		return add(a, scale(sub(known[i + 1] as HeadVec, a), x - i));
	};
}

function headSamples(context: Context, drop: Drop, triad: Triad, times: readonly number[]): HeadSample[] {
	const person = personOf(drop, context.person.stature);
	const pose = poseFor(person);
	return times.map((t) => {
		dropPose(person, t, pose);
		return headOf(pose, drop, triad);
	});
}

/** The head of a posed person; stance axes (forward, up, right) turned by the facing into local ones. */
function headOf(pose: Pose, drop: Drop, triad: Triad): HeadSample {
	const { facing, position } = drop.stance;
	const c = Math.cos(facing);
	const s = Math.sin(facing);
	const turned = (forward: number, up: number, right: number): LocalVec => local(c * forward - s * right, up, s * forward + c * right);
	const o = 16 * trunk("head");
	const axis = (k: number): LocalVec =>
		turned(pose.world[o + 4 * k] as number, pose.world[o + 4 * k + 1] as number, pose.world[o + 4 * k + 2] as number);
	const centre = new Float64Array(3);
	headCentre(pose, centre);
	return {
		axes: [axis(0), scale(axis(2), -1), axis(1)],
		centre: add(position, ringFromLocal(triad, turned(centre[0] as number, centre[1] as number, centre[2] as number))),
		gaze: ringFromLocal(triad, turned(pose.gaze[0] as number, pose.gaze[1] as number, pose.gaze[2] as number)),
	};
}

/** The head's own rate of turn in head axes (rad/s) at each sample, by the rotation between the samples about it. */
function turnRates(heads: readonly HeadSample[], step: number): HeadVec[] {
	const last = heads.length - 1;
	return heads.map((_, i) => {
		const a = heads[Math.max(0, i - 1)] as HeadSample;
		const b = heads[Math.min(last, i + 1)] as HeadSample;
		const span = (Math.min(last, i + 1) - Math.max(0, i - 1)) * step;
		if (span === 0) return head(0, 0, 0);
		const m = (row: number, column: number): number => dot(a.axes[row] as LocalVec, b.axes[column] as LocalVec);
		const x = (m(2, 1) - m(1, 2)) / 2;
		const y = (m(0, 2) - m(2, 0)) / 2;
		const z = (m(1, 0) - m(0, 1)) / 2;
		const sine = Math.hypot(x, y, z);
		const k = sine > 0 ? Math.atan2(sine, (m(0, 0) + m(1, 1) + m(2, 2) - 1) / 2) / (sine * span) : 1 / span;
		return head(x * k, y * k, z * k);
	});
}

/** Angle between apparent gravity at the head and the head's own down, degrees; the head's own acceleration is left out. */
function headTilt(context: Context, triad: Triad, sample: HeadSample, t: number): number {
	const g = localFromRing(triad, apparentParts(context.spin, t, sample.centre, ring(0, 0, 0), ring(0, 0, 0)).sum);
	return degFromRad(Math.acos(Math.min(1, Math.max(-1, -dot(g, sample.axes[2]) / length(g)))));
}

function windowInView(context: Context, drop: Drop, sample: HeadSample): boolean {
	return context.habitat.windows.some((w) => {
		if (w.deck !== drop.deck.index) return false;
		const to = sub(windowCentre(drop, w), sample.centre);
		const l = length(to);
		return l > 0 && dot(to, sample.gaze) / l > Math.cos(IN_VIEW);
	});
}
const windowCentre = (drop: Drop, w: WindowOpening): RingVec => placeOnDeck(drop.deck, w.angle, w.axial, w.height);

/** The floor point straight below the release. */
function belowRelease({ deck, position }: Drop): RingVec {
	const { up } = deckTriad(deck, cylindricalFromRing(position).angle);
	return add(position, scale(up, -heightAbove(deck, position)));
}

/** The deck whose bay holds the object at a time; within a hatch the one it came from. */
function deckHolding({ habitat }: Context, { deck, flight }: Drop, t: number): Deck {
	let index = deck.index;
	for (const [i, id] of flight.passed.entries()) {
		const hatch = habitat.hatches.find((h) => h.id === id);
		if (!hatch) throw new RangeError(`the flight passed "${id}", which is no hatch`);
		if ((flight.passedAt[i] as number) <= t) index = hatch.deck === index ? (hatch.below ?? index) : hatch.deck;
	}
	return habitat.decks[index] as Deck;
}

/** Parts in the axes of the deck that holds the object. */
interface ObjectSample {
	readonly centrifugal: LocalVec;
	readonly coriolis: LocalVec;
	readonly euler: LocalVec;
	/** Minus the object's own acceleration relative to the ring. */
	readonly own: LocalVec;
	readonly radius: number;
	readonly angle: number;
	readonly axial: number;
}

const state = new Float64Array(6);
function objectSample(context: Context, drop: Drop, t: number): ObjectSample {
	drop.flight.path.stateAt(t, state);
	const position = ring(state[0] as number, state[1] as number, state[2] as number);
	const velocity = ring(state[3] as number, state[4] as number, state[5] as number);
	const free = apparentParts(context.spin, t, position, velocity, ring(0, 0, 0));
	const slowed = add(free.sum, scale(velocity, -drop.drag * length(velocity)));
	const place = cylindricalFromRing(position);
	const triad = deckTriad(deckHolding(context, drop, t), place.angle);
	return {
		centrifugal: localFromRing(triad, free.centrifugal),
		coriolis: localFromRing(triad, free.coriolis),
		euler: localFromRing(triad, free.euler),
		own: scale(localFromRing(triad, slowed), -1),
		radius: place.radius,
		angle: angleNear(place.angle, drop.deck.middle),
		axial: place.axial,
	};
}
