import type { Stars } from "../../src/shape/drawable.ts";
import type { DropPicture, Look, View } from "../../src/shape/drop-picture.ts";
import type { Painter } from "./painter.ts";

/** What the conductor plays from; all read anew each frame. */
export interface Score {
	picture(): DropPicture | null;
	stars(): Stars;
	look(): Look | null;
	view(): View;
	time(): number;
	/** Moves the clock by real seconds; returns whether it goes on. */
	advance(dt: number): boolean;
	/** After every picture: labels follow. */
	drawn(picture: DropPicture, width: number, height: number): void;
}

/** Share of the full resolution while the picture moves, best first. */
const SCALES = [1, 0.85, 0.7, 0.55] as const;
/** A smoothed frame above the first goes down a scale, below the second up one, ms. */
const SLOW = 55;
const FAST = 24;
/** At rest this long, the picture is painted once in full, ms. */
const REST = 140;
const STILL_RATIO = 2;

/** The one frame loop: time, picture, paint, labels, in this order. Nothing runs while nothing moves. */
export class Conductor {
	private painter: Painter | null = null;
	private width = 0;
	private height = 0;
	private scheduled = 0;
	private resting = 0;
	private last = 0;
	private level = 0;
	private smoothed = 30;
	/** Of the last frame's own script, painting left out, ms. */
	scriptTime = 0;
	/** Of the last paint, ms. */
	paintTime = 0;
	frames = 0;

	constructor(private readonly score: Score) {}

	use(painter: Painter | null): void {
		this.painter = painter;
		const picture = this.score.picture();
		if (painter && picture) painter.show(picture, this.score.stars());
		this.wake();
	}

	resize(width: number, height: number): void {
		this.width = width;
		this.height = height;
		this.wake();
	}

	/** Something changed: a frame is due. */
	wake = (): void => {
		if (this.scheduled === 0) this.scheduled = requestAnimationFrame(this.frame);
	};

	stop(): void {
		cancelAnimationFrame(this.scheduled);
		clearTimeout(this.resting);
		this.scheduled = 0;
		this.resting = 0;
	}

	private frame = (now: number): void => {
		this.scheduled = 0;
		clearTimeout(this.resting);
		const dt = this.last === 0 ? 0 : (now - this.last) / 1000;
		const playing = this.score.advance(dt);
		this.last = playing ? now : 0;
		const painted = this.step((SCALES[this.level] as number) * this.fullRatio(), false);
		if (playing) this.pace();
		if (playing || (!painted && !this.painter?.lost)) this.wake();
		if (!playing) this.resting = window.setTimeout(this.rest, REST);
	};

	/** Whether no frame is due and the last picture was painted in full. */
	get still(): boolean {
		return this.scheduled === 0 && this.resting === 0;
	}

	private rest = (): void => {
		this.resting = 0;
		if (this.scheduled === 0 && !this.step(this.stillRatio(), true) && !this.painter?.lost) this.wake();
	};

	/** Device px a CSS px at full resolution: a processor draws one, a graphics processor what the screen has. */
	private fullRatio(): number {
		return this.painter?.kind === "raster" ? 1 : Math.min(2, window.devicePixelRatio);
	}

	private stillRatio(): number {
		return this.painter?.kind === "raster" ? 1 : Math.max(STILL_RATIO, window.devicePixelRatio);
	}

	/** Updates and paints one picture; returns whether it was painted. */
	step(scale: number, still: boolean): boolean {
		const picture = this.score.picture();
		const look = this.score.look();
		const { painter, width, height } = this;
		if (!picture || !look || !painter || width < 1 || height < 1) return true;
		const begin = performance.now();
		painter.show(picture, this.score.stars());
		picture.update(this.score.time(), this.score.view(), look, width, height);
		this.score.drawn(picture, width, height);
		const middle = performance.now();
		const painted = painter.paint(width, height, scale, still);
		this.scriptTime = middle - begin;
		this.paintTime = performance.now() - middle;
		if (painted) this.frames += 1;
		return painted;
	}

	private pace(): void {
		this.smoothed += 0.15 * (this.scriptTime + this.paintTime - this.smoothed);
		if (this.smoothed > SLOW && this.level < SCALES.length - 1) {
			this.level += 1;
			this.smoothed = (SLOW + FAST) / 2;
		} else if (this.smoothed < FAST && this.level > 0) {
			this.level -= 1;
			this.smoothed = (SLOW + FAST) / 2;
		}
	}
}
