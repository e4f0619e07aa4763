import type { View } from "../../src/shape/drop-picture.ts";
import { dolly, resetLook, turn } from "./look.ts";

const STEP = (5 * Math.PI) / 180;

/** Keys on the stage itself: arrows turn, + and − come nearer, Home goes back to the station's own look. */
export function listenKeys(element: HTMLElement, view: () => View): () => void {
	const press = (e: KeyboardEvent): void => {
		if (e.target !== element || e.ctrlKey || e.metaKey || e.altKey) return;
		const fine = e.shiftKey ? 0.2 : 1;
		switch (e.code) {
			case "ArrowLeft":
				turn(view(), -STEP * fine, 0);
				break;
			case "ArrowRight":
				turn(view(), STEP * fine, 0);
				break;
			case "ArrowUp":
				turn(view(), 0, STEP * fine);
				break;
			case "ArrowDown":
				turn(view(), 0, -STEP * fine);
				break;
			case "Equal":
			case "NumpadAdd":
				dolly(view(), 0.92);
				break;
			case "Minus":
			case "NumpadSubtract":
				dolly(view(), 1 / 0.92);
				break;
			case "Home":
				resetLook(view());
				break;
			default:
				return;
		}
		e.preventDefault();
	};
	element.addEventListener("keydown", press);
	return () => element.removeEventListener("keydown", press);
}
