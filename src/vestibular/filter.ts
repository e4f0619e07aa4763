import { type Block, block, READS, ROW } from "./block.ts";
import { type CanalConstants, checkConstants, sameConstants } from "./constants.ts";
import { HIGHEST, NODES, ORDER } from "./legendre.ts";

/** Writes the input of every channel at time t (s) into out[at…]. */
export type ChannelInput = (t: number, out: Float64Array, at: number) => void;

export interface FilterState {
	readonly time: number;
	readonly states: Float64Array;
}

/** Largest coefficient of degree 7 over a block, as a share of the largest input yet: what is left out is smaller still. */
const TOLERANCE = 1e-9;
/** The same for what is only rounding, as a share of the input's own size. */
const ROUNDING = 1e-14;
const DEEPEST = 16;

/**
 * Canals side by side, one a channel. A block of time is exact for an input of degree 7 over it and is
 * halved until the input is one to 1e-9; the absolute integral of the kernel is below 2 (4 with
 * adaptation), so the report is good to a few 1e-9 of the largest change of the input.
 */
export class CanalFilter {
	private now: number;
	private readonly channels: number;
	/** (q, w, z) a channel, of the input less what it has adapted to. */
	private readonly states: Float64Array;
	private readonly rest: Float64Array;
	private readonly breaks: readonly number[];
	private readonly nodes: Float64Array;
	/** The same less `rest`, a channel after the other. */
	private readonly values: Float64Array;
	/** Which of `distinct` each channel has. */
	private readonly kind: Uint8Array;
	private readonly distinct: readonly CanalConstants[];
	private readonly blocks = new Map<number, readonly Block[]>();
	private greatest = 0;
	private size = 0;

	/**
	 * Starts at `start` in equilibrium with the constant input `adaptedTo`, by default the input then.
	 * `breaks`: times where the input or a derivative jumps; it is smooth between them. Throws
	 * RangeError on a time constant that is not above 0 and an input that is not finite.
	 */
	constructor(
		private readonly input: ChannelInput,
		constants: readonly CanalConstants[],
		start: number,
		breaks: readonly number[] = [],
		adaptedTo?: ArrayLike<number>,
	) {
		const distinct: CanalConstants[] = [];
		this.kind = Uint8Array.from(constants, (c) => {
			checkConstants(c);
			const at = distinct.findIndex((d) => sameConstants(c, d));
			return at < 0 ? distinct.push(c) - 1 : at;
		});
		this.distinct = distinct;
		this.channels = constants.length;
		this.now = start;
		this.breaks = [...breaks].sort((a, b) => a - b);
		this.states = new Float64Array(3 * this.channels);
		this.nodes = new Float64Array(ORDER * this.channels);
		this.values = new Float64Array(ORDER * this.channels);
		this.rest = new Float64Array(this.channels);
		if (adaptedTo) this.rest.set(Array.from(adaptedTo));
		else input(start, this.rest, 0);
		for (const u of this.rest) {
			if (!Number.isFinite(u)) throw new RangeError(`canals cannot have adapted to ${u} rad/s`);
			this.size = Math.max(this.size, Math.abs(u));
		}
	}

	get time(): number {
		return this.now;
	}

	save(): FilterState {
		return { time: this.now, states: this.states.slice() };
	}
	restore(state: FilterState): void {
		this.now = state.time;
		this.states.set(state.states);
	}

	/** Writes what each channel reports now into out[at…]. */
	read(out: Float64Array, at: number): void {
		const s = this.states;
		for (let i = 0; i < this.channels; i++) out[at + i] = (s[3 * i + 2] as number) - (s[3 * i + 1] as number) - (s[3 * i] as number);
	}

	/** Moves on to time t ≥ now. */
	advanceTo(t: number): void {
		if (!(t >= this.now && Number.isFinite(t))) throw new RangeError(`a canal filter at ${this.now} s cannot go to ${t} s`);
		while (this.now < t) {
			const to = Math.min(this.nextBreak(), t);
			this.pass(this.now, to - this.now, 0, 0, NO_READS, 0);
			this.now = to;
		}
	}

	/** The report now and at `count` − 1 further instants `step` s apart: one number a channel each. */
	sample(step: number, count: number): Float64Array {
		if (!(step > 0 && Number.isInteger(count) && count >= 1))
			throw new RangeError(`canals cannot be sampled ${count} times every ${step} s`);
		const n = this.channels;
		const start = this.now;
		const out = new Float64Array(n * count);
		this.read(out, 0);
		let done = 0;
		while (done < count - 1) {
			const limit = this.nextBreak();
			let span = READS;
			while (span >= 1 && (done + span > count - 1 || start + (done + span) * step > limit)) span /= 2;
			if (span >= 1) {
				this.pass(this.now, span * step, 0, span, out, n * (done + 1));
				done += span;
				this.now = start + done * step;
			} else {
				done += 1;
				this.advanceTo(start + done * step);
				this.read(out, n * done);
			}
		}
		return out;
	}

	private nextBreak(): number {
		for (let i = 0; i < this.breaks.length; i++) if ((this.breaks[i] as number) > this.now) return this.breaks[i] as number;
		return Number.POSITIVE_INFINITY;
	}

	/** One block, halved as needed; `reads` (0, 1, 2, 4, 8) equally spaced reports go into out[at…], the last at its end. */
	private pass(t: number, h: number, depth: number, reads: number, out: Float64Array, at: number): void {
		const { nodes, values, rest, states, input, channels: n } = this;
		for (let j = 0; j < ORDER; j++) input(t + h * (NODES[j] as number), nodes, j * n);
		let { greatest, size } = this;
		let highest = 0;
		for (let i = 0; i < n; i++) {
			const base = rest[i] as number;
			let sum = 0;
			for (let j = 0; j < ORDER; j++) {
				const u = (nodes[j * n + i] as number) - base;
				values[ORDER * i + j] = u;
				sum += u * (HIGHEST[j] as number);
				if (u > greatest) greatest = u;
				else if (-u > greatest) greatest = -u;
			}
			size = Math.max(size, greatest);
			highest = Math.max(highest, Math.abs(sum));
		}
		if (!Number.isFinite(greatest + highest)) throw new RangeError(`the input of a canal is not finite near ${t} s`);
		this.greatest = greatest;
		this.size = size;
		if (highest > TOLERANCE * greatest + ROUNDING * size && depth < DEEPEST) {
			const half = reads >> 1;
			this.pass(t, h / 2, depth + 1, half, out, at);
			this.pass(t + h / 2, h / 2, depth + 1, half, out, at + n * half);
			if (reads === 1) this.read(out, at);
			return;
		}
		const maps = this.blocksOf(h);
		const stride = reads > 0 ? READS / reads : 0;
		for (let i = 0; i < n; i++) {
			const { report, end } = maps[this.kind[i] as number] as Block;
			const q = states[3 * i] as number;
			const w = states[3 * i + 1] as number;
			const z = states[3 * i + 2] as number;
			for (let r = 1; r <= reads; r++) out[at + n * (r - 1) + i] = row(report, ROW * (stride * r - 1), q, w, z, values, ORDER * i);
			states[3 * i] = row(end, 0, q, w, z, values, ORDER * i);
			states[3 * i + 1] = row(end, ROW, q, w, z, values, ORDER * i);
			states[3 * i + 2] = row(end, 2 * ROW, q, w, z, values, ORDER * i);
		}
	}

	private blocksOf(h: number): readonly Block[] {
		let found = this.blocks.get(h);
		if (!found) {
			found = this.distinct.map((c) => block(c, h));
			this.blocks.set(h, found);
		}
		return found;
	}
}

const NO_READS = new Float64Array(0);

/** One row of a map on the states of a channel and its input v[k…k+7] at the nodes; written out, because it is where the time goes. */
function row(m: Float64Array, a: number, q: number, w: number, z: number, v: Float64Array, k: number): number {
	return (
		(m[a] as number) * q +
		(m[a + 1] as number) * w +
		(m[a + 2] as number) * z +
		(m[a + 3] as number) * (v[k] as number) +
		(m[a + 4] as number) * (v[k + 1] as number) +
		(m[a + 5] as number) * (v[k + 2] as number) +
		(m[a + 6] as number) * (v[k + 3] as number) +
		(m[a + 7] as number) * (v[k + 4] as number) +
		(m[a + 8] as number) * (v[k + 5] as number) +
		(m[a + 9] as number) * (v[k + 6] as number) +
		(m[a + 10] as number) * (v[k + 7] as number)
	);
}
