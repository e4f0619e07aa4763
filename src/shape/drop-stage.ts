import type { Drop } from "../activity/drop.ts";
import { writeApparent } from "../frame/apparent.ts";
import type { Spin } from "../frame/spin.ts";
import type { Deck, Habitat } from "../layout/habitat.ts";
import { writeRingFromIcrs } from "../sky/attitude.ts";
import type { RingVec } from "../vector/vec3.ts";
import type { Drawable, Part } from "./drawable.ts";
import { objectShape } from "./elements-object.ts";
import { floorPoint, gapLine, ghostMark, landingMark } from "./landing-mark.ts";
import { part, placeAt } from "./part.ts";
import { putDirection, putOnStage, type StageFrame, stageFrame, toStage } from "./stage-frame.ts";
import type { StillShapes } from "./still.ts";
import { GHOST_TRAIL, OBJECT_TRAIL, trailOf } from "./trail.ts";

/** The object's apparent-gravity parts at an instant, stage components, m/s². */
export interface ObjectForces {
	readonly centrifugal: Float64Array;
	readonly coriolis: Float64Array;
	readonly euler: Float64Array;
	/** Minus the object's own acceleration, and the sum; only with drag, since without it the sum is zero. */
	readonly own: Float64Array;
	readonly sum: Float64Array;
}

/**
 * The drop as drawn, in stage coordinates about the person's feet: the bay, the flight with its trail
 * and marks, and what the forces are. The person is drawn by the figure; cameras and instruments look on.
 */
export class DropStage {
	readonly frame: StageFrame;
	readonly still: readonly Drawable[];
	readonly parts: readonly Part[];
	readonly skyRotation = new Float64Array(9);
	/** Of the flying sphere's centre, m. */
	readonly object = new Float64Array(3);
	readonly forces: ObjectForces = {
		centrifugal: new Float64Array(3),
		coriolis: new Float64Array(3),
		euler: new Float64Array(3),
		own: new Float64Array(3),
		sum: new Float64Array(3),
	};
	/** Largest size of each over the flight, m/s². */
	readonly greatest = { centrifugal: 0, coriolis: 0, euler: 0, own: 0 };
	/** Where it lands and where it would have without turning, stage, m; null where it does not. */
	readonly landing: Float64Array | null;
	readonly ghostLanding: Float64Array | null;
	/** Box about the person, the flight and where it would land without turning, stage, m. */
	readonly bounds: { readonly low: Float64Array; readonly high: Float64Array };
	/** Unit direction of apparent gravity on the standing person; none at no weight. */
	readonly plumb = new Float64Array(3);
	hasLanded = false;
	ghostHasLanded = false;
	private readonly parts6 = new Float64Array(6);
	private readonly state = new Float64Array(6);
	private readonly objectParts: readonly Part[];
	private readonly showTrail: (t: number) => void;
	private readonly showGhost: (t: number) => void;
	private readonly landed: readonly Part[];
	private readonly ghostLanded: readonly Part[];
	private readonly gapParts: readonly Part[];
	private readonly ringRotation = new Float64Array(9);

	constructor(
		readonly habitat: Habitat,
		private readonly spin: Spin,
		readonly drop: Drop,
		shapes: StillShapes,
	) {
		const { deck, stance } = drop;
		this.frame = stageFrame(deck, stance.angle, stance.axial);
		const { frame } = this;
		this.still = shapes.of(habitat, frame);
		const trail = trailOf(frame, drop.flight.path, drop.flight.end, OBJECT_TRAIL);
		const ghost = drop.ghost.end === null ? null : trailOf(frame, drop.ghost.path, drop.ghost.end, GHOST_TRAIL);
		this.showTrail = trail.show;
		this.showGhost = ghost ? ghost.show : () => {};
		this.objectParts = objectShape(drop.object.diameter > 0 ? drop.object.diameter : 0.02).map(part);
		const marks = this.marks();
		this.landed = marks.landed;
		this.ghostLanded = marks.ghostLanded;
		this.gapParts = marks.gap;
		this.landing = drop.landing ? this.stagePoint(drop.landing.point) : null;
		this.ghostLanding = drop.ghost.point ? this.stagePoint(drop.ghost.point) : null;
		this.parts = [
			...this.ghostLanded,
			...this.gapParts,
			...this.landed,
			...(ghost ? ghost.parts : []),
			...trail.parts,
			...this.objectParts,
		];
		this.bounds = { low: new Float64Array([-0.3, -0.05, -0.3]), high: new Float64Array([0.3, 1.85, 0.3]) };
		this.measure();
	}

	private include(p: Float64Array): void {
		const { low, high } = this.bounds;
		for (let k = 0; k < 3; k++) {
			low[k] = Math.min(low[k] as number, p[k] as number);
			high[k] = Math.max(high[k] as number, p[k] as number);
		}
	}

	private stagePoint(p: RingVec): Float64Array {
		const out = new Float64Array(3);
		toStage(this.frame, p, out);
		return out;
	}

	private marks(): { landed: readonly Part[]; ghostLanded: readonly Part[]; gap: readonly Part[] } {
		const { drop, frame, habitat } = this;
		const { struck } = drop.flight;
		const radius = Math.min(0.09, Math.max(0.03, drop.object.diameter / 2));
		const floor: Deck | null = struck.kind === "deck" ? (habitat.decks[struck.deck] as Deck) : null;
		const landing = floor && drop.landing ? floorPoint(floor, drop.landing.point) : null;
		const ghost = drop.ghost.point ? floorPoint(drop.deck, drop.ghost.point) : null;
		const same = floor === drop.deck;
		return {
			landed: floor && landing ? landingMark(frame, floor, landing, radius) : [],
			ghostLanded: ghost ? ghostMark(frame, drop.deck, ghost, radius) : [],
			gap: same && floor && landing && ghost ? gapLine(frame, floor, ghost, landing, radius) : [],
		};
	}

	/** Finds the largest forces, so that arrow scales stand still, and the room the flight takes. */
	private measure(): void {
		const n = 200;
		const size = (v: Float64Array): number => Math.hypot(v[0] as number, v[1] as number, v[2] as number);
		for (let i = 0; i <= n; i++) {
			this.update((this.drop.flight.end * i) / n);
			this.include(this.object);
			this.greatest.centrifugal = Math.max(this.greatest.centrifugal, size(this.forces.centrifugal));
			this.greatest.coriolis = Math.max(this.greatest.coriolis, size(this.forces.coriolis));
			this.greatest.euler = Math.max(this.greatest.euler, size(this.forces.euler));
			this.greatest.own = Math.max(this.greatest.own, size(this.forces.own));
		}
		if (this.ghostLanding) this.include(this.ghostLanding);
	}

	/** Moves everything to time t, s. */
	update(t: number): void {
		const { drop, spin, frame, state } = this;
		const shown = Math.min(Math.max(t, 0), drop.flight.end);
		drop.flight.path.stateAt(shown, state);
		const x = state[0] as number;
		const y = state[1] as number;
		putOnStage(frame, x, y, state[2] as number, this.object);
		for (const p of this.objectParts) placeAt(p.matrix, this.object[0] as number, this.object[1] as number, this.object[2] as number, 1);
		writeApparent(spin, shown, x, y, state[3] as number, state[4] as number, this.parts6);
		this.force(this.forces.centrifugal, 0);
		this.force(this.forces.coriolis, 2);
		this.force(this.forces.euler, 4);
		if (drop.drag > 0) this.slow();
		this.hasLanded = shown >= drop.flight.end - 1e-9;
		this.showTrail(shown);
		this.showGhost(this.hasLanded ? Number.MAX_VALUE : shown);
		this.ghostHasLanded = drop.ghost.end !== null && (shown >= drop.ghost.end || this.hasLanded);
		setVisible(this.landed, this.hasLanded);
		setVisible(this.ghostLanded, this.ghostHasLanded);
		setVisible(this.gapParts, this.hasLanded);
		this.hangPlumb(shown);
		this.turnSky(shown);
	}

	private force(out: Float64Array, from: number): void {
		putDirection(this.frame, this.parts6[from] as number, this.parts6[from + 1] as number, 0, out);
	}

	/** With drag a = C + K + E − k |v| v, so that G = C + K + E + A is what the air does to it. */
	private slow(): void {
		const { forces, state, drop } = this;
		const { sum, own, centrifugal, coriolis, euler } = forces;
		const vx = state[3] as number;
		const vy = state[4] as number;
		const vz = state[5] as number;
		const k = drop.drag * Math.hypot(vx, vy, vz);
		putDirection(this.frame, k * vx, k * vy, k * vz, sum);
		for (let i = 0; i < 3; i++) own[i] = (sum[i] as number) - (centrifugal[i] as number) - (coriolis[i] as number) - (euler[i] as number);
	}

	/** Apparent gravity of someone standing still at the feet. */
	private hangPlumb(t: number): void {
		const { origin } = this.frame;
		const f = this.parts6;
		writeApparent(this.spin, t, origin[0], origin[1], 0, 0, f);
		const gx = (f[0] as number) + (f[4] as number);
		const gy = (f[1] as number) + (f[5] as number);
		const weight = Math.hypot(gx, gy);
		if (weight > 0) putDirection(this.frame, gx / weight, gy / weight, 0, this.plumb);
		else this.plumb.fill(0);
	}

	/** ICRS → stage at time t. */
	private turnSky(t: number): void {
		const { ringRotation: r, skyRotation: out } = this;
		writeRingFromIcrs(this.habitat.sky, this.spin.angle(t), r);
		const { prograde, up } = this.frame.triad;
		for (let k = 0; k < 3; k++) {
			out[k] = prograde[0] * (r[k] as number) + prograde[1] * (r[3 + k] as number);
			out[3 + k] = up[0] * (r[k] as number) + up[1] * (r[3 + k] as number);
			out[6 + k] = r[6 + k] as number;
		}
	}
}

function setVisible(parts: readonly Part[], visible: boolean): void {
	for (const p of parts) p.visible = visible;
}
