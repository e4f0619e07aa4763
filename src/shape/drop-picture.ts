import { type Arrow, type ArrowLetter, createArrow } from "./arrow.ts";
import { facesFromBehind } from "./bay.ts";
import { aim, type Camera, createCamera, project } from "./camera.ts";
import type { Part } from "./drawable.ts";
import type { DropFigure } from "./drop-figure.ts";
import type { DropStage } from "./drop-stage.ts";
import { createAxisCue, createPanel, createPlumb, hudDirection, hudPoint, metresPerPixel } from "./hud.ts";
import { fromStage } from "./stage-frame.ts";

export type View = "eyepoint" | "external";

/** What the person at the screen has turned and moved; mutated by the controls. Angles in rad. */
export interface Look {
	/** Eyepoint: away from where the eyes look, + to the right and + up. */
	yaw: number;
	pitch: number;
	fovEye: number;
	/** External: about the action, from +axial towards prograde, and above the floor. */
	azimuth: number;
	elevation: number;
	/** m */
	distance: number;
	/** What the camera looks at and turns about, stage, m. */
	readonly target: Float64Array;
	fovExternal: number;
}

/** A place that a label hangs at: a stage point, shown or not. */
export interface Anchor {
	readonly point: Float64Array;
	visible: boolean;
}

export const ANCHORS = [
	"gap",
	"landing",
	"ghost",
	"object",
	"C",
	"K",
	"E",
	"A",
	"G",
	"prograde",
	"up",
	"axial",
	"rose",
	"rose-words",
	"rose-bar",
	"plumb",
	"axes",
] as const;
export type AnchorName = (typeof ANCHORS)[number];

const AXIS_NAMES = ["prograde", "up", "axial"] as const;
/** Of the instruments, CSS px. */
const AXIS = { shift: 12, width: 144, height: 100, arm: 29, margin: 14, small: { width: 112, height: 84, arm: 22 } } as const;
const ROSE = { width: 184, height: 212, arm: 50, margin: 14 } as const;
/** Of the scale bar beside the plumb in External. */
const BAR = { beside: 92, above: 14 } as const;
const PLUMB = { width: 104, height: 178, long: 84 } as const;
/** How steeply the person at the screen may make the eyes look, rad. */
const STEEPEST = (88 * Math.PI) / 180;
/** A picture narrower or lower than this has no room for rose and plumb. */
const ROOM = { width: 560, height: 420 } as const;
/** Length of the largest C in External, m. */
const ARROW = 0.46;
/** Of the stage, px, at which scales are decided. */
const ORDINARY_HEIGHT = 600;
/** An arrow shorter than this (px) at its largest is drawn ten times as long, and says so. */
const SHORTEST = 24;

/** The whole picture of a drop: stage, person, arrows, instruments and cameras, for any renderer. */
export class DropPicture {
	readonly camera: Camera = createCamera(1.3);
	/** All that moves, in the order it is drawn: the person first. */
	readonly parts: readonly Part[];
	/** `parts` without the person, who outlives an edit. */
	readonly others: readonly Part[];
	readonly anchors: Readonly<Record<AnchorName, Anchor>> = Object.fromEntries(
		ANCHORS.map((name) => [name, { point: new Float64Array(3), visible: false }]),
	) as Record<AnchorName, Anchor>;
	/** Which of the stage's still drawables are seen, by index: a bulkhead that stands between an outside camera and the bay is not. */
	readonly seen: Uint8Array;
	/** 10 where Coriolis, Euler and the object's own acceleration are drawn ten times as long as the scale says, since they would be too short to see; else 1. */
	readonly minorFactor: Readonly<Record<View, 1 | 10>>;
	/** Rectangles that the instruments take up, CSS px: left, top, right, bottom; empty ones are where none is. */
	readonly instruments: readonly Float64Array[] = [new Float64Array(4), new Float64Array(4), new Float64Array(4)];
	/** Drawn length of 1 m/s² of C on the rose, px. */
	rosePixels = 0;
	private readonly arrows = {
		C: createArrow("C"),
		K: createArrow("K"),
		E: createArrow("E"),
		A: createArrow("A"),
		G: createArrow("G"),
	} as const;
	private readonly axisPanel = createPanel(AXIS.width, AXIS.height);
	private readonly axes = createAxisCue();
	private readonly rosePanel = createPanel(ROSE.width, ROSE.height);
	private readonly plumbPanel = createPanel(PLUMB.width, PLUMB.height);
	private readonly plumb = createPlumb();
	/** Where the arrows start, stage, m. */
	readonly arrowOrigin = new Float64Array(3);
	/** The largest force that is drawn at the first scale, m/s². */
	private readonly longest: number;
	private readonly drawn = new Float64Array(3);
	private readonly seenFrom = new Float64Array(3).fill(Number.NaN);
	private onRose = false;
	private readonly pixel = new Float64Array(3);

	constructor(
		readonly stage: DropStage,
		readonly figure: DropFigure,
	) {
		this.seen = new Uint8Array(stage.still.length).fill(1);
		this.others = [
			...stage.parts,
			...this.rosePanel.parts,
			...this.plumbPanel.parts,
			...this.axisPanel.parts,
			...this.arrows.C.parts,
			...this.arrows.E.parts,
			...this.arrows.A.parts,
			...this.arrows.K.parts,
			...this.arrows.G.parts,
			...this.plumb.parts,
			...this.axes.parts,
		];
		this.parts = [...figure.parts, ...this.others];
		const { centrifugal, own } = stage.greatest;
		this.longest = stage.drop.drag > 0 ? Math.max(centrifugal, own) : centrifugal;
		this.minorFactor = this.minorFactors();
	}

	/** Decided once a view, at its own scale and a picture of ordinary size, so that it does not change while the person looks around. */
	private minorFactors(): Readonly<Record<View, 1 | 10>> {
		const { coriolis, euler, own } = this.stage.greatest;
		const { longest } = this;
		const look = this.defaultLook();
		const external = (ARROW * ORDINARY_HEIGHT) / 2 / Math.tan(look.fovExternal / 2) / look.distance;
		const share = longest > 0 ? Math.max(coriolis, euler, this.stage.drop.drag > 0 ? own : 0) / longest : 0;
		const factor = (pixels: number): 1 | 10 => (share > 0 && share * pixels < SHORTEST ? 10 : 1);
		return { eyepoint: factor(ROSE.arm), external: factor(external) };
	}

	/** The look of External as first shown: beside the person, prograde to the right, the whole flight in the picture. */
	defaultLook(): Look {
		const { deck, stance } = this.stage.drop;
		const near = deck.axialTo - stance.axial >= 1.9 || deck.axialTo - stance.axial >= stance.axial - deck.axialFrom;
		const towards = Math.cos(stance.facing) >= -0.2 ? 1 : -1;
		const azimuth = (near ? 0 : Math.PI) + ((near ? 1 : -1) * towards * 24 * Math.PI) / 180;
		const elevation = (11 * Math.PI) / 180;
		const { low, high } = this.stage.bounds;
		const middle = (k: number): number => ((low[k] as number) + (high[k] as number)) / 2;
		const size = (k: number): number => (high[k] as number) - (low[k] as number);
		const across = size(0) * Math.abs(Math.cos(azimuth)) + size(2) * Math.abs(Math.sin(azimuth));
		const fovExternal = (48 * Math.PI) / 180;
		const fit = Math.max(size(1) * 1.24, (across * 1.35) / 1.15) / 2 / Math.tan(fovExternal / 2);
		const depth = (size(2) * Math.abs(Math.cos(azimuth)) + size(0) * Math.abs(Math.sin(azimuth))) / 2;
		return {
			yaw: 0,
			pitch: 0,
			fovEye: (75 * Math.PI) / 180,
			azimuth,
			elevation,
			target: new Float64Array([middle(0), middle(1) - 0.06 * size(1), middle(2)]),
			distance: Math.min(60, fit + 0.6 * depth),
			fovExternal,
		};
	}

	/** Moves everything to time t (s) as one view shows it in a picture of `width` × `height` CSS px. */
	update(t: number, view: View, look: Look, width: number, height: number): void {
		const { stage, figure } = this;
		stage.update(t);
		figure.update(t, view === "eyepoint");
		if (view === "eyepoint") this.aimEye(look);
		else this.aimExternal(look);
		this.openFaces(view);
		const room = width >= ROOM.width && height >= ROOM.height;
		this.setForces(view, width, height, room);
		this.setInstruments(view, width, height, room);
		this.setMarks();
	}

	/** Takes away the faces that the camera sees from behind; only when the camera has moved. */
	private openFaces(view: View): void {
		const { position } = this.camera;
		const { seenFrom, stage } = this;
		if (view === "eyepoint") {
			if (Number.isNaN(seenFrom[0])) return;
			seenFrom.fill(Number.NaN);
			this.seen.fill(1);
			return;
		}
		if (seenFrom[0] === position[0] && seenFrom[1] === position[1] && seenFrom[2] === position[2]) return;
		seenFrom.set(position);
		const eye = fromStage(stage.frame, position[0] as number, position[1] as number, position[2] as number);
		const behind = facesFromBehind(stage.habitat, stage.frame, eye).map((face) => `${face}:`);
		stage.still.forEach((d, i) => {
			this.seen[i] = behind.some((face) => d.name.startsWith(face)) ? 0 : 1;
		});
	}

	/**
	 * Along the gaze, with the head's own up: looking down keeps "in front" at the top. What the person at the screen
	 * turns comes on top: up and down as the head nods, never over the vertical, then around the deck's up, so that the horizon stays level.
	 */
	private aimEye(look: Look): void {
		const { camera, figure } = this;
		const { position, gaze, up } = figure.eye;
		for (let k = 0; k < 3; k++) camera.position[k] = position[k] as number;
		camera.fovY = look.fovEye;
		aim(camera, gaze[0] as number, gaze[1] as number, gaze[2] as number, up[0] as number, up[1] as number, up[2] as number);
		if (look.yaw === 0 && look.pitch === 0) return;
		const b = camera.basis;
		const from = Math.asin(Math.max(-1, Math.min(1, b[7] as number)));
		const pitch = Math.max(Math.min(from, -STEEPEST), Math.min(Math.max(from, STEEPEST), from + look.pitch)) - from;
		const nod = Math.cos(pitch);
		const rise = Math.sin(pitch);
		const ahead = this.drawn;
		const above = this.pixel;
		for (let k = 0; k < 3; k++) {
			ahead[k] = nod * (b[6 + k] as number) + rise * (b[3 + k] as number);
			above[k] = nod * (b[3 + k] as number) - rise * (b[6 + k] as number);
		}
		turnAboutUp(ahead, look.yaw);
		turnAboutUp(above, look.yaw);
		aim(camera, ahead[0] as number, ahead[1] as number, ahead[2] as number, above[0] as number, above[1] as number, above[2] as number);
	}

	private aimExternal(look: Look): void {
		const { camera } = this;
		const { target } = look;
		const c = Math.cos(look.elevation);
		const dx = c * Math.sin(look.azimuth);
		const dy = Math.sin(look.elevation);
		const dz = c * Math.cos(look.azimuth);
		camera.position[0] = (target[0] as number) + dx * look.distance;
		camera.position[1] = (target[1] as number) + dy * look.distance;
		camera.position[2] = (target[2] as number) + dz * look.distance;
		camera.fovY = look.fovExternal;
		aim(camera, -dx, -dy, -dz, 0, 1, 0);
	}

	/** The arrows: on the object in External, on the rose in Eyepoint. */
	private setForces(view: View, width: number, height: number, room: boolean): void {
		const { stage, camera, arrowOrigin: origin } = this;
		const { greatest, object } = stage;
		let scale: number;
		let head: number;
		let perMetre: number;
		if (view === "eyepoint") {
			hudPoint(camera, width, height, ROSE.margin + ROSE.width / 2, height - ROSE.margin - ROSE.height / 2 - 10, origin);
			const s = metresPerPixel(camera, height);
			scale = this.longest > 0 ? (ROSE.arm * s) / this.longest : 0;
			head = 15 * s;
			perMetre = 1 / s;
		} else {
			origin.set(object);
			project(camera, width, height, object[0] as number, object[1] as number, object[2] as number, this.pixel);
			perMetre = height / 2 / Math.tan(camera.fovY / 2) / Math.max(0.2, this.pixel[2] as number);
			scale = this.longest > 0 ? ARROW / this.longest : 0;
			head = 19 / perMetre;
		}
		this.rosePixels = scale * perMetre;
		const minor = scale * this.minorFactor[view];
		const shown = view === "external" || room;
		this.onRose = view === "eyepoint";
		this.point("C", stage.forces.centrifugal, scale, head, shown);
		const dragged = shown && stage.drop.drag > 0;
		this.point("K", stage.forces.coriolis, minor, head, shown);
		this.point("E", stage.forces.euler, minor, head, shown && greatest.euler > 0);
		this.point("A", stage.forces.own, minor, head, dragged);
		this.point("G", stage.forces.sum, scale, head, dragged);
	}

	private point(letter: ArrowLetter, force: Float64Array, scale: number, head: number, shown: boolean): void {
		const arrow: Arrow = this.arrows[letter];
		const anchor = this.anchors[letter];
		const size = Math.hypot(force[0] as number, force[1] as number, force[2] as number);
		if (!shown || !(size > 0)) {
			arrow.hide();
			anchor.visible = false;
			return;
		}
		const o = this.arrowOrigin;
		const v = this.drawn;
		if (this.onRose) hudDirection(this.camera, this.arrowOrigin, force[0] as number, force[1] as number, force[2] as number, v);
		else v.set(force);
		const l = Math.max(1e-9, Math.hypot(v[0] as number, v[1] as number, v[2] as number));
		arrow.set(
			o[0] as number,
			o[1] as number,
			o[2] as number,
			(v[0] as number) / l,
			(v[1] as number) / l,
			(v[2] as number) / l,
			l * scale,
			head,
		);
		anchor.visible = arrow.visible;
		anchor.point.set(arrow.tip);
	}

	private setInstruments(view: View, width: number, height: number, room: boolean): void {
		const { camera, anchors, stage } = this;
		const cue = width < ROOM.width ? AXIS.small : AXIS;
		const axisX = AXIS.margin + cue.width / 2;
		const axisY = AXIS.margin + cue.height / 2;
		this.axisPanel.set(camera, width, height, axisX, axisY, cue.width / AXIS.width, cue.height / AXIS.height);
		this.axes.set(camera, width, height, axisX - AXIS.shift, axisY + 4, cue.arm);
		anchors.axes.visible = true;
		hudPoint(camera, width, height, axisX - AXIS.shift, axisY + 4, anchors.axes.point);
		for (let i = 0; i < 3; i++) {
			const anchor = anchors[AXIS_NAMES[i] as "prograde"];
			anchor.visible = true;
			anchor.point.set(this.axes.tips[i] as Float64Array);
		}
		this.occupy(0, axisX, axisY, cue.width, cue.height, true);
		const rose = room && view === "eyepoint";
		for (const p of this.rosePanel.parts) p.visible = rose;
		const roseX = ROSE.margin + ROSE.width / 2;
		const roseY = height - ROSE.margin - ROSE.height / 2;
		this.occupy(1, roseX, roseY, ROSE.width, ROSE.height, rose);
		if (rose) this.rosePanel.set(camera, width, height, roseX, roseY);
		anchors.rose.visible = rose;
		hudPoint(camera, width, height, roseX, roseY - ROSE.height / 2 + 16, anchors.rose.point);
		anchors["rose-words"].visible = rose;
		hudPoint(camera, width, height, roseX, roseY + ROSE.height / 2 - 42, anchors["rose-words"].point);
		const bar = anchors["rose-bar"];
		bar.visible = room;
		if (rose) hudPoint(camera, width, height, roseX, roseY + ROSE.height / 2 - 16, bar.point);
		else hudPoint(camera, width, height, ROSE.margin + PLUMB.width + BAR.beside, height - ROSE.margin - BAR.above, bar.point);
		const weight = Math.hypot(stage.plumb[0] as number, stage.plumb[1] as number, stage.plumb[2] as number) > 0;
		for (const p of this.plumbPanel.parts) p.visible = room;
		this.plumb.setVisible(room && weight);
		const plumbX = rose ? ROSE.margin + ROSE.width + 10 + PLUMB.width / 2 : ROSE.margin + PLUMB.width / 2;
		const plumbY = height - ROSE.margin - PLUMB.height / 2;
		this.occupy(2, plumbX, plumbY, PLUMB.width, PLUMB.height, room);
		if (room) this.plumbPanel.set(camera, width, height, plumbX, plumbY);
		if (room && weight) {
			const g = stage.plumb;
			this.plumb.set(
				camera,
				width,
				height,
				plumbX,
				plumbY - PLUMB.height / 2 + 26,
				PLUMB.long,
				g[0] as number,
				g[1] as number,
				g[2] as number,
			);
		}
		anchors.plumb.visible = room;
		hudPoint(camera, width, height, plumbX, plumbY + PLUMB.height / 2 - 26, anchors.plumb.point);
	}

	private occupy(i: number, x: number, y: number, w: number, h: number, there: boolean): void {
		const box = this.instruments[i] as Float64Array;
		box[0] = there ? x - w / 2 : 0;
		box[1] = there ? y - h / 2 : 0;
		box[2] = there ? x + w / 2 : 0;
		box[3] = there ? y + h / 2 : 0;
	}

	private setMarks(): void {
		const { anchors, stage } = this;
		anchors.object.visible = true;
		anchors.object.point.set(stage.object);
		anchors.landing.visible = stage.hasLanded && stage.landing !== null;
		if (stage.landing) anchors.landing.point.set(stage.landing);
		anchors.ghost.visible = stage.ghostHasLanded && stage.ghostLanding !== null;
		if (stage.ghostLanding) anchors.ghost.point.set(stage.ghostLanding);
		anchors.gap.visible = anchors.landing.visible && anchors.ghost.visible && stage.drop.gap !== null;
		if (stage.landing && stage.ghostLanding)
			for (let k = 0; k < 3; k++) anchors.gap.point[k] = ((stage.landing[k] as number) + (stage.ghostLanding[k] as number)) / 2;
	}
}

/** Turns a stage direction to the right about the deck's up, rad. */
function turnAboutUp(v: Float64Array, right: number): void {
	const c = Math.cos(right);
	const s = Math.sin(right);
	const x = v[0] as number;
	const z = v[2] as number;
	v[0] = x * c - z * s;
	v[2] = x * s + z * c;
}
