import { useSession } from "./session.ts";

/**
 * What changes every frame: one object, mutated only in this file and read by whoever draws. React never
 * hears of it; what must follow registers with `onTime` and writes its own transform.
 */
export const transient = {
	/** On the selected case's clock, s, 0 … duration. */
	time: 0,
	/** Of the selected case's motion, s. */
	duration: 0,
	/** Playback is held at this many times real speed, so that no row of windows flashes more than three times a second. */
	fastest: Number.POSITIVE_INFINITY,
};

type TimeListener = (time: number) => void;
const listeners = new Set<TimeListener>();

/** Calls back now and on every change of time or duration, until the returned function is called. */
export function onTime(listener: TimeListener): () => void {
	listeners.add(listener);
	listener(transient.time);
	return () => {
		listeners.delete(listener);
	};
}

const tell = (): void => {
	for (const listener of listeners) listener(transient.time);
};

/** Puts the clock to `time`, s, within the motion. Throws RangeError on a time that is not finite. */
export function setTime(time: number): void {
	if (!Number.isFinite(time)) throw new RangeError(`a time must be finite, got ${time}`);
	const next = Math.min(Math.max(time, 0), transient.duration);
	if (next === transient.time) return;
	transient.time = next;
	tell();
}

/** Starts the clock of another motion, stopped at `time`, never played faster than `fastest` times real speed. */
export function setMotion(duration: number, time: number, fastest = Number.POSITIVE_INFINITY): void {
	if (!(duration >= 0 && Number.isFinite(duration))) throw new RangeError(`a duration must be finite and at least 0 s, got ${duration}`);
	transient.duration = duration;
	transient.fastest = fastest;
	transient.time = Math.min(Math.max(time, 0), duration);
	tell();
}

/** The longest step a frame may take, s of real time: the first frame after a pause brings the whole pause along. */
export const LONGEST_FRAME = 0.1;

/** One frame of `dt` real seconds; at the end it stops. Returns whether it plays on. */
export function advance(dt: number): boolean {
	const { playing, speed } = useSession.getState();
	if (!playing) return false;
	setTime(transient.time + Math.min(Math.max(dt, 0), LONGEST_FRAME) * Math.min(speed, transient.fastest));
	if (transient.time < transient.duration) return true;
	useSession.setState({ playing: false });
	return false;
}
