import { type ScaleLinear, scaleLinear } from "d3-scale";
import { curveLinear, line } from "d3-shape";

/** A value against time as a drawing, for screen and paper alike. Lengths in px of the drawing, x right, y down. */
export interface TraceSpec {
	readonly width: number;
	readonly height: number;
	readonly inset: Inset;
	/** Rising, at least two; same length as `y`. */
	readonly x: readonly number[];
	readonly y: readonly number[];
	/** Defaults to the ends of `x`, kept as they are: the axis is the time rule's. */
	readonly xDomain?: readonly [number, number];
	/** Values that the y axis must also reach (0, a limit); it always covers the data and ends on ticks. */
	readonly yCover?: readonly number[];
	readonly xTicks: number;
	readonly yTicks: number;
}

export interface Inset {
	readonly top: number;
	readonly right: number;
	readonly bottom: number;
	readonly left: number;
}

export interface Tick {
	readonly at: number;
	readonly value: number;
	readonly label: string;
}

export interface Trace {
	/** SVG path data of the line. */
	readonly path: string;
	readonly xTicks: readonly Tick[];
	readonly yTicks: readonly Tick[];
	/** Ends of the plot. */
	readonly left: number;
	readonly right: number;
	readonly top: number;
	readonly bottom: number;
	xOf(value: number): number;
	yOf(value: number): number;
}

/** Throws RangeError on fewer than two samples, arrays of unlike length, or a value that is not finite. */
export function trace(spec: TraceSpec): Trace {
	const { x, y, width, height, inset } = spec;
	checkSamples(x, y);
	const left = inset.left;
	const right = width - inset.right;
	const top = inset.top;
	const bottom = height - inset.bottom;
	const xScale = scaleLinear([...(spec.xDomain ?? [x[0] as number, x[x.length - 1] as number])], [left, right]);
	const covered = [...(spec.yCover ?? []), least(y), greatest(y)];
	const yScale = scaleLinear(opened(Math.min(...covered), Math.max(...covered)), [bottom, top]).nice(spec.yTicks);
	return {
		path: pathOf(x, y, xScale, yScale),
		xTicks: ticksOf(xScale, spec.xTicks),
		yTicks: ticksOf(yScale, spec.yTicks),
		left,
		right,
		top,
		bottom,
		xOf: (value) => xScale(value),
		yOf: (value) => yScale(value),
	};
}

/** A path of (x, y) samples at one scale for both, centred in a box, y up: the tiny picture of a motion. Throws as `trace`. */
export function tinyPath(x: readonly number[], y: readonly number[], width: number, height: number, inset: number): string {
	checkSamples(x, y, false);
	const spanX = greatest(x) - least(x);
	const spanY = greatest(y) - least(y);
	const scale = Math.min((width - 2 * inset) / (spanX || 1e-9), (height - 2 * inset) / (spanY || 1e-9));
	const midX = (greatest(x) + least(x)) / 2;
	const midY = (greatest(y) + least(y)) / 2;
	return pathOf(
		x,
		y,
		(v) => width / 2 + (v - midX) * scale,
		(v) => height / 2 - (v - midY) * scale,
	);
}

/** Ticks of a ruler from 0 to `end` over `length` px, about `spacing` px apart, with finer ones between. */
export function ruler(
	end: number,
	length: number,
	spacing: number,
): { readonly major: readonly Tick[]; readonly minor: readonly number[] } {
	if (!(end > 0 && Number.isFinite(end))) throw new RangeError(`a ruler needs a finite end above 0, got ${end}`);
	const scale = scaleLinear([0, end], [0, length]);
	const count = Math.max(1, Math.floor(length / spacing));
	const major = ticksOf(scale, count);
	const step = major.length > 1 ? (major[1] as Tick).value - (major[0] as Tick).value : end;
	const parts = /^[15]/.test(step.toExponential()) ? 5 : 4;
	const minor: number[] = [];
	for (let i = 1; (i * step) / parts < end - 1e-12; i++) if (i % parts !== 0) minor.push(scale((i * step) / parts));
	return { major, minor };
}

/** The value at `at` between samples, held beyond the ends; `x` rises. */
export function sampleAt(x: readonly number[], y: readonly number[], at: number): number {
	let low = 0;
	let high = x.length - 1;
	if (!(at > (x[low] as number))) return y[low] as number;
	if (at >= (x[high] as number)) return y[high] as number;
	while (high - low > 1) {
		const mid = (low + high) >> 1;
		if ((x[mid] as number) <= at) low = mid;
		else high = mid;
	}
	const share = (at - (x[low] as number)) / ((x[high] as number) - (x[low] as number));
	return (y[low] as number) + share * ((y[high] as number) - (y[low] as number));
}

function pathOf(x: readonly number[], y: readonly number[], xOf: (v: number) => number, yOf: (v: number) => number): string {
	const path = line<number>()
		.x((i) => xOf(x[i] as number))
		.y((i) => yOf(y[i] as number))
		.curve(curveLinear)
		.digits(2);
	return path(x.map((_, i) => i)) ?? "";
}

function ticksOf(scale: ScaleLinear<number, number>, count: number): Tick[] {
	const label = scale.tickFormat(count);
	return scale.ticks(count).map((value) => ({ at: scale(value), value, label: label(value) }));
}

function checkSamples(x: readonly number[], y: readonly number[], rising = true): void {
	if (x.length < 2 || x.length !== y.length)
		throw new RangeError(`a trace needs two samples or more of each, got ${x.length} against ${y.length}`);
	for (let i = 0; i < x.length; i++) {
		const xi = x[i] as number;
		if (!Number.isFinite(xi) || !Number.isFinite(y[i])) throw new RangeError(`sample ${i} of a trace is not finite: ${xi}, ${y[i]}`);
		if (rising && i > 0 && !(xi > (x[i - 1] as number)))
			throw new RangeError(`sample ${i} of a trace does not come after ${x[i - 1]}: ${xi}`);
	}
}

/** A domain of no width gets one around its value, so that a steady value lies in the middle. */
const opened = (low: number, high: number): [number, number] => {
	if (high > low) return [low, high];
	const half = Math.max(Math.abs(low) * 0.1, 0.5);
	return [low - half, high + half];
};

const least = (values: readonly number[]): number => values.reduce((a, b) => Math.min(a, b), Number.POSITIVE_INFINITY);
const greatest = (values: readonly number[]): number => values.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY);
