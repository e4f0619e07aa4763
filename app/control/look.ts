import type { Look, View } from "../../src/shape/drop-picture.ts";

/** Bounds of the vertical field of view, degrees. */
export const FOV_DEG = { least: 20, most: 110 } as const;
const FOV_LEAST = (FOV_DEG.least * Math.PI) / 180;
const FOV_MOST = (FOV_DEG.most * Math.PI) / 180;
const STEEPEST = (85 * Math.PI) / 180;
const NEAREST = 0.6;
const FARTHEST = 60;

/** The look in force: mutated here only, read by the conductor. Not in the history and not in the file. */
let look: Look | null = null;
let start: Look | null = null;
let kept: string | null = null;
const listeners = new Set<() => void>();

/** Calls back on every change, until the returned function is called. */
export function onLook(listener: () => void): () => void {
	listeners.add(listener);
	return () => {
		listeners.delete(listener);
	};
}
const tell = (): void => {
	for (const listener of listeners) listener();
};

const copy = (from: Look): Look => ({ ...from, target: new Float64Array(from.target) });

/** Takes the look that a station starts from; another station begins with it, the same keeps what was turned. */
export function takeStation(station: string, fresh: Look): void {
	start = fresh;
	if (look === null || kept !== station) {
		look = copy(fresh);
		kept = station;
	}
	tell();
}

/** Back to the station's own look. */
export function resetLook(view: View): void {
	if (!look || !start) return;
	if (view === "eyepoint") {
		look.yaw = 0;
		look.pitch = 0;
		look.fovEye = start.fovEye;
	} else {
		const { yaw, pitch, fovEye } = look;
		Object.assign(look, copy(start), { yaw, pitch, fovEye, target: look.target });
		look.target.set(start.target);
	}
	tell();
}

const clamp = (value: number, low: number, high: number): number => Math.min(high, Math.max(low, value));

/** Turns the view by angles, rad: the head in Eyepoint, the camera about the action in External. */
export function turn(view: View, right: number, up: number): void {
	if (!look) return;
	if (view === "eyepoint") {
		look.yaw += right;
		look.pitch = clamp(look.pitch + up, -STEEPEST, STEEPEST);
	} else {
		look.azimuth -= right;
		look.elevation = clamp(look.elevation - up, -STEEPEST, STEEPEST);
	}
	tell();
}

/** Nearer by a factor in External, narrower field in Eyepoint. */
export function dolly(view: View, factor: number): void {
	if (!look) return;
	if (view === "eyepoint") look.fovEye = clamp(look.fovEye * factor, FOV_LEAST, FOV_MOST);
	else look.distance = clamp(look.distance * factor, NEAREST, FARTHEST);
	tell();
}

/** Moves the target across the picture, m. */
export function pan(right: number, up: number): void {
	if (!look) return;
	const c = Math.cos(look.azimuth);
	const s = Math.sin(look.azimuth);
	look.target[0] = (look.target[0] as number) - right * c;
	look.target[2] = (look.target[2] as number) + right * s;
	look.target[1] = (look.target[1] as number) - up;
	tell();
}

/** Vertical field of view of a view, degrees. */
export const fieldOfView = (view: View): number => (look ? ((view === "eyepoint" ? look.fovEye : look.fovExternal) * 180) / Math.PI : 0);

export function setFieldOfView(view: View, deg: number): void {
	if (!look || !Number.isFinite(deg)) return;
	const rad = clamp((deg * Math.PI) / 180, FOV_LEAST, FOV_MOST);
	if (view === "eyepoint") look.fovEye = rad;
	else look.fovExternal = rad;
	tell();
}

export const currentLook = (): Look | null => look;
