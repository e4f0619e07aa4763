import type { DropPicture } from "../../src/shape/drop-picture.ts";
import { setTime, transient } from "../store/transient.ts";
import type { Conductor } from "./conductor.ts";

/** What a measuring script may read of the stage; offered only at an address with `?probe`. */
export interface StageProbe {
	readonly conductor: Conductor;
	picture(): DropPicture | null;
	time(): number;
	setTime(time: number): void;
}

declare global {
	interface Window {
		stageProbe?: StageProbe;
	}
}

/** Puts the probe on the window; returns what takes it away. */
export function offerProbe(conductor: Conductor, picture: () => DropPicture | null): () => void {
	if (!new URLSearchParams(location.search).has("probe")) return () => {};
	window.stageProbe = { conductor, picture, time: () => transient.time, setTime };
	return () => {
		delete window.stageProbe;
	};
}
