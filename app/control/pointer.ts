import type { View } from "../../src/shape/drop-picture.ts";
import { currentLook, dolly, pan, turn } from "./look.ts";

const TURN_PER_PIXEL = 0.0045;

/**
 * Pointer, wheel and touch on the stage: drag turns, right drag or Shift + drag pans, the wheel and two
 * fingers come nearer. Returns what takes the listeners away.
 */
export function listenPointer(element: HTMLElement, view: () => View): () => void {
	const down = new Map<number, { x: number; y: number }>();
	let spread = 0;
	const start = (e: PointerEvent): void => {
		if (e.target instanceof Element && e.target.closest("button, input, a, select")) return;
		down.set(e.pointerId, { x: e.clientX, y: e.clientY });
		element.setPointerCapture(e.pointerId);
		spread = distance();
	};
	const distance = (): number => {
		const [a, b] = [...down.values()];
		return a && b ? Math.hypot(a.x - b.x, a.y - b.y) : 0;
	};
	const move = (e: PointerEvent): void => {
		const last = down.get(e.pointerId);
		if (!last) return;
		const dx = e.clientX - last.x;
		const dy = e.clientY - last.y;
		last.x = e.clientX;
		last.y = e.clientY;
		const external = view() === "external";
		if (down.size === 2) {
			const now = distance();
			if (spread > 0 && now > 0) dolly(view(), spread / now);
			spread = now;
			if (external) shift(dx / 2, dy / 2);
			return;
		}
		if (external && (e.shiftKey || (e.buttons & 2) !== 0)) shift(dx, dy);
		else if (external) turn("external", dx * TURN_PER_PIXEL, -dy * TURN_PER_PIXEL);
		else turn("eyepoint", -dx * TURN_PER_PIXEL, dy * TURN_PER_PIXEL);
	};
	const shift = (dx: number, dy: number): void => {
		const look = currentLook();
		if (!look) return;
		const perPixel = (2 * look.distance * Math.tan(look.fovExternal / 2)) / Math.max(1, element.clientHeight);
		pan(dx * perPixel, -dy * perPixel);
	};
	const end = (e: PointerEvent): void => {
		down.delete(e.pointerId);
		spread = distance();
	};
	const wheel = (e: WheelEvent): void => {
		e.preventDefault();
		dolly(view(), Math.exp(e.deltaY * 0.0012));
	};
	const menu = (e: Event): void => e.preventDefault();
	element.addEventListener("pointerdown", start);
	element.addEventListener("pointermove", move);
	element.addEventListener("pointerup", end);
	element.addEventListener("pointercancel", end);
	element.addEventListener("wheel", wheel, { passive: false });
	element.addEventListener("contextmenu", menu);
	return () => {
		element.removeEventListener("pointerdown", start);
		element.removeEventListener("pointermove", move);
		element.removeEventListener("pointerup", end);
		element.removeEventListener("pointercancel", end);
		element.removeEventListener("wheel", wheel);
		element.removeEventListener("contextmenu", menu);
	};
}
