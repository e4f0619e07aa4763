import { project } from "../../src/shape/camera.ts";
import type { AnchorName, DropPicture } from "../../src/shape/drop-picture.ts";

/** A label over the picture: an element, where it hangs, and how far it may be pushed. */
export interface Label {
	readonly anchor: AnchorName;
	readonly element: HTMLElement;
	/** Placed first and kept clear of; smaller is sooner. */
	readonly rank: number;
	/** "centred": its middle on its anchor; "outward": beyond its anchor as seen from the axis cue's origin; "tip": the same as seen from where the arrows start; "free": beside its anchor, where there is room. */
	readonly hang: "centred" | "outward" | "tip" | "free";
	/** Places tried, best first, as (x, y) in half sizes of the element with a margin. */
	readonly tries: readonly (readonly [number, number])[];
	width: number;
	height: number;
	/** A text that follows the picture, and the one that stands. */
	readonly live: ((picture: DropPicture) => string) | null;
	said: string;
	/** A scale bar of the arrows: its length in m/s², and the width that stands, px. */
	readonly bar: { readonly element: HTMLElement; readonly step: number; width: number } | null;
	/** The try that was taken last: kept while it still fits. */
	taken: number;
}

interface Box {
	x0: number;
	y0: number;
	x1: number;
	y1: number;
}

const MARGIN = 12;
const EDGE = 6;
const ARROWS: readonly AnchorName[] = ["C", "K", "E"];
/** Of a label beside the end of a stroke, px. */
const BESIDE = 6;
/** Places along an arrow that are kept clear. */
const SHAFT = 6;

/** Puts every label beside its anchor so that none covers another, an instrument or the marks. Writes transforms only. */
export class LabelPlacer {
	private readonly pixel = new Float64Array(3);
	private readonly between = new Float64Array(3);
	private readonly boxes: Box[] = Array.from({ length: 60 }, () => ({ x0: 0, y0: 0, x1: 0, y1: 0 }));
	private used = 0;
	private firstLabel = 0;

	/** `corner` is what a control takes up in the lower right corner of the picture, px. */
	constructor(
		private readonly labels: readonly Label[],
		private readonly corner: { readonly width: number; readonly height: number },
	) {}

	place(picture: DropPicture, width: number, height: number): void {
		this.used = 0;
		for (const rect of picture.instruments) this.take(rect[0] as number, rect[1] as number, rect[2] as number, rect[3] as number);
		this.take(width - this.corner.width, height - this.corner.height, width, height);
		for (const name of ["landing", "ghost", "object"] as const) {
			const anchor = picture.anchors[name];
			if (anchor.visible && this.at(picture, anchor.point, width, height))
				this.takeAround(this.pixel[0] as number, this.pixel[1] as number, 13);
		}
		for (let i = 0; i < ARROWS.length; i++) this.keepArrow(picture, ARROWS[i] as AnchorName, width, height);
		this.firstLabel = this.used;
		for (const label of this.labels) this.put(label, picture, width, height);
	}

	/** Keeps the shaft of an arrow clear. */
	private keepArrow(picture: DropPicture, name: AnchorName, width: number, height: number): void {
		const anchor = picture.anchors[name];
		if (!anchor.visible) return;
		const from = picture.arrowOrigin;
		for (let i = 0; i < SHAFT; i++) {
			const k = i / (SHAFT - 1);
			for (let c = 0; c < 3; c++) this.between[c] = (from[c] as number) + k * ((anchor.point[c] as number) - (from[c] as number));
			if (this.at(picture, this.between, width, height)) this.takeAround(this.pixel[0] as number, this.pixel[1] as number, 8);
		}
	}

	private at(picture: DropPicture, p: Float64Array, width: number, height: number): boolean {
		return project(picture.camera, width, height, p[0] as number, p[1] as number, p[2] as number, this.pixel);
	}

	private put(label: Label, picture: DropPicture, width: number, height: number): void {
		follow(label, picture);
		const anchor = picture.anchors[label.anchor];
		const { element } = label;
		const before = anchor.visible && this.at(picture, anchor.point, width, height);
		const x = this.pixel[0] as number;
		const y = this.pixel[1] as number;
		const inside = before && x > -40 && y > -40 && x < width + 40 && y < height + 40;
		if (!inside) {
			if (element.style.visibility !== "hidden") element.style.visibility = "hidden";
			return;
		}
		if (label.hang !== "free") {
			this.hang(label, picture, x, y, width, height);
			return;
		}
		let chosen = -1;
		for (let k = -1; k < label.tries.length && chosen < 0; k++) {
			const i = k < 0 ? label.taken : k;
			if (i >= 0 && this.fits(label, i, x, y, width, height)) chosen = i;
		}
		if (chosen < 0) {
			if (label.rank > 0 || !this.showNear(label, x, y, width, height))
				if (element.style.visibility !== "hidden") element.style.visibility = "hidden";
			return;
		}
		label.taken = chosen;
		const [tx, ty] = label.tries[chosen] as readonly [number, number];
		this.show(label, x + tx * (label.width / 2 + MARGIN), y + ty * (label.height / 2 + MARGIN));
	}

	/** Beyond the end of what it names; where another label is in the way, beside that end or farther out. */
	private hang(label: Label, picture: DropPicture, x: number, y: number, width: number, height: number): void {
		if (label.hang === "centred") {
			this.show(label, x, y);
			return;
		}
		const tip = label.hang === "tip";
		this.at(picture, tip ? picture.arrowOrigin : picture.anchors.axes.point, width, height);
		const ox = this.pixel[0] as number;
		const oy = this.pixel[1] as number;
		const l = Math.hypot(x - ox, y - oy);
		const ux = l > 1 ? (x - ox) / l : 0;
		const uy = l > 1 ? (y - oy) / l : 1;
		const flat = Math.abs(ux) > Math.abs(uy);
		for (let tries = 0; tries < 10; tries++) {
			const side = tries === 1 ? 1 : tries === 2 ? -1 : 0;
			const reach = (tip ? Math.max(l, 14) + 4 : l) + 8 * Math.max(0, tries - 2);
			let cx = ox + ux * (reach + label.width / 2 + 2);
			let cy = oy + uy * (reach + label.height / 2 + 1);
			if (side !== 0) {
				cx = flat ? Math.max(label.width / 2, Math.min(width - label.width / 2, x)) : x + side * (label.width / 2 + BESIDE);
				cy = flat ? y - side * (label.height / 2 + BESIDE) : y;
			}
			if (this.clear(label, cx, cy, width, height)) {
				this.show(label, cx, cy);
				return;
			}
		}
		label.element.style.visibility = "hidden";
	}

	/** Whether a place lies within the picture and is free of other labels. */
	private clear(label: Label, cx: number, cy: number, width: number, height: number): boolean {
		if (cx < label.width / 2 || cy < label.height / 2 || cx > width - label.width / 2 || cy > height - label.height / 2) return false;
		for (let k = this.firstLabel; k < this.used; k++) {
			const b = this.boxes[k] as Box;
			if (cx - label.width / 2 < b.x1 && cx + label.width / 2 > b.x0 && cy - label.height / 2 < b.y1 && cy + label.height / 2 > b.y0)
				return false;
		}
		return true;
	}

	private show(label: Label, cx: number, cy: number): void {
		const { element } = label;
		this.take(cx - label.width / 2, cy - label.height / 2, cx + label.width / 2, cy + label.height / 2);
		element.style.transform = `translate(${Math.round(cx - label.width / 2)}px,${Math.round(cy - label.height / 2)}px)`;
		if (element.style.visibility !== "visible") element.style.visibility = "visible";
	}

	/** Shows the first label, which carries the answer, as near to its anchor as there is room in the picture; returns whether there is any. */
	private showNear(label: Label, x: number, y: number, width: number, height: number): boolean {
		const farX = width / 2 - label.width / 2 - EDGE - 4;
		const farY = height / 2 - label.height / 2 - EDGE - 4;
		for (let r = 24; r < width + height; r += 24)
			for (let i = 0; i < 16; i++) {
				const cx = width / 2 + Math.max(-farX, Math.min(farX, x + r * Math.cos((i * Math.PI) / 8) - width / 2));
				const cy = height / 2 + Math.max(-farY, Math.min(farY, y + r * Math.sin((i * Math.PI) / 8) - height / 2));
				if (!this.free(label, cx, cy, width, height)) continue;
				this.show(label, cx, cy);
				return true;
			}
		return false;
	}

	private fits(label: Label, i: number, x: number, y: number, width: number, height: number): boolean {
		const [tx, ty] = label.tries[i] as readonly [number, number];
		return this.free(label, x + tx * (label.width / 2 + MARGIN), y + ty * (label.height / 2 + MARGIN), width, height);
	}

	private free(label: Label, cx: number, cy: number, width: number, height: number): boolean {
		const x0 = cx - label.width / 2 - 3;
		const x1 = cx + label.width / 2 + 3;
		const y0 = cy - label.height / 2 - 3;
		const y1 = cy + label.height / 2 + 3;
		if (x0 < EDGE || y0 < EDGE || x1 > width - EDGE || y1 > height - EDGE) return false;
		for (let k = 0; k < this.used; k++) {
			const b = this.boxes[k] as Box;
			if (x0 < b.x1 && x1 > b.x0 && y0 < b.y1 && y1 > b.y0) return false;
		}
		return true;
	}

	private take(x0: number, y0: number, x1: number, y1: number): void {
		const box = this.boxes[this.used];
		if (!box) return;
		this.used += 1;
		box.x0 = x0;
		box.y0 = y0;
		box.x1 = x1;
		box.y1 = y1;
	}

	private takeAround(x: number, y: number, r: number): void {
		this.take(x - r, y - r, x + r, y + r);
	}
}

/** Brings a label's own text and scale bar up to the picture. */
function follow(label: Label, picture: DropPicture): void {
	const { live, bar } = label;
	if (live) {
		const text = live(picture);
		if (text !== label.said) {
			label.said = text;
			label.element.textContent = text;
		}
	}
	if (bar) {
		const width = Math.round(picture.rosePixels * bar.step);
		if (width !== bar.width) {
			bar.width = width;
			bar.element.style.width = `${width}px`;
			label.width = label.element.offsetWidth;
		}
	}
}
