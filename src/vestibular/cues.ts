import type { Spin } from "../frame/spin.ts";
import type { HeadVec } from "../vector/vec3.ts";
import type { CanalConstants } from "./constants.ts";
import { type HeadTurn, headRate, spinInHead, turnRate } from "./head-turn.ts";
import { canalReport, type Samples } from "./report.ts";

/** What the senses have of a head turn, head axes, rad/s, 3 numbers a sample. */
export interface HeadTurnCues {
	/** Rotation of the head relative to the cabin, ω_turn: the eyes see the cabin turn by its opposite. */
	readonly turn: Float64Array;
	/** The canals' report of the head's absolute rotation. */
	readonly report: Float64Array;
	/** The part of it that the same turn without spin would not have. */
	readonly illusion: Float64Array;
	/** |ω_turn − report|, one a sample. */
	readonly disagreement: Float64Array;
}

/** `spinAxis`: unit, head axes at t = 0. Throws RangeError on samples that begin after the turn does, when the canals are no longer at rest. */
export function headTurnCues(turn: HeadTurn, spin: Spin, spinAxis: HeadVec, constants: CanalConstants, samples: Samples): HeadTurnCues {
	if (samples.from > 0) throw new RangeError(`the cues of a head turn are followed from its start, not from ${samples.from} s`);
	const breaks = { breaks: [0, turn.duration] };
	const report = canalReport(headRate(turn, spin, spinAxis), samples, constants, breaks);
	const illusion = canalReport(spinInHead(turn, spin, spinAxis), samples, constants, breaks);
	const own = new Float64Array(3 * samples.count);
	const disagreement = new Float64Array(samples.count);
	for (let i = 0; i < samples.count; i++) {
		const w = turnRate(turn, samples.from + i * samples.step);
		const apart = turn.axis.map((k, j) => {
			own[3 * i + j] = k * w;
			return k * w - (report[3 * i + j] as number);
		});
		disagreement[i] = Math.hypot(...apart);
	}
	return { turn: own, report, illusion, disagreement };
}
