import { createElement, type ReactElement, useEffect, useRef, useState } from "react";
import type { Conductor } from "./conductor.ts";
import type { Painter } from "./painter.ts";
import { createRasterPainter } from "./raster-painter.ts";

type Kind = "webgl" | "raster";
/** A canvas that stays lost this long is drawn by the raster instead, ms. */
const GIVE_UP = 4000;

/** `?picture=webgl` or `?picture=raster` in the address overrules the choice. */
function asked(): Kind | null {
	const value = new URLSearchParams(location.search).get("picture");
	return value === "webgl" || value === "raster" ? value : null;
}

/**
 * The canvas and who paints it: WebGL where a graphics processor draws it, the CPU raster where there is
 * none or WebGL fails, since there the raster is the faster of the two. A canvas keeps its first kind of
 * context, so another painter gets another canvas.
 */
export function usePainter(conductor: Conductor): {
	readonly element: ReactElement;
	readonly kind: Kind | "starting";
	readonly lost: boolean;
	readonly failed: string | null;
} {
	const canvas = useRef<HTMLCanvasElement>(null);
	const [kind, setKind] = useState<Kind | "starting">("starting");
	const [lost, setLost] = useState(false);
	const [failed, setFailed] = useState<string | null>(null);

	useEffect(() => {
		if (kind !== "starting") return;
		let live = true;
		const wanted = asked();
		if (wanted) setKind(wanted);
		else
			void import("./probe.ts").then(({ probeWebGl }) => {
				if (live) setKind(probeWebGl() === "hardware" ? "webgl" : "raster");
			});
		return () => {
			live = false;
		};
	}, [kind]);

	useEffect(() => {
		const element = canvas.current;
		if (kind === "starting" || !element) return;
		let painter: Painter | null = null;
		let live = true;
		const start = async (): Promise<void> => {
			try {
				const made = kind === "webgl" ? await (await import("./gl-painter.tsx")).createGlPainter(element) : createRasterPainter(element);
				if (!live) {
					made.dispose();
					return;
				}
				painter = made;
				conductor.use(made);
			} catch (error) {
				if (!live) return;
				if (kind === "webgl") setKind("raster");
				else setFailed(error instanceof Error ? error.message : String(error));
			}
		};
		void start();
		let giveUp = 0;
		const lose = (e: Event): void => {
			e.preventDefault();
			setLost(true);
			giveUp = window.setTimeout(() => {
				setLost(false);
				setKind("raster");
			}, GIVE_UP);
		};
		const restore = (): void => {
			clearTimeout(giveUp);
			setLost(false);
			conductor.wake();
		};
		element.addEventListener("webglcontextlost", lose);
		element.addEventListener("webglcontextrestored", restore);
		return () => {
			live = false;
			clearTimeout(giveUp);
			element.removeEventListener("webglcontextlost", lose);
			element.removeEventListener("webglcontextrestored", restore);
			conductor.use(null);
			painter?.dispose();
		};
	}, [kind, conductor]);

	const element = createElement("canvas", { key: kind, ref: canvas, className: "canvas", "aria-hidden": true });
	return { element, kind, lost, failed };
}
