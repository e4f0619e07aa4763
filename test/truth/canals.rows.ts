import { constantSpin } from "../../src/frame/spin.ts";
import { degFromRad, radFromDeg, radpsFromRpm } from "../../src/quantity/convert.ts";
import { cross, dot, type HeadVec, head, length, sub } from "../../src/vector/vec3.ts";
import { CANAL_NORMALS, CANALS, type CanalId, canalComponents } from "../../src/vestibular/canals.ts";
import { DEFAULT_CONSTANTS } from "../../src/vestibular/constants.ts";
import { crossCoupled, type HeadTurn, headRate, spinInHead, TURN_AXES } from "../../src/vestibular/head-turn.ts";
import { canalReport } from "../../src/vestibular/report.ts";
import { integrated } from "../vestibular/integrate.ts";
import type { TruthRow } from "./compare.ts";

const SIDE = head(0, 1, 0);

/** A turn that peaks at `degps` at mid-turn. */
const turnPeaking = (degps: number): HeadTurn => ({ axis: TURN_AXES.yaw, angle: (radFromDeg(degps) * 0.8) / 1.875, duration: 0.8 });

/** Cross-coupled acceleration at that peak, spin axis on the left as at mid-turn, head axes. */
function atPeak(rpm: number, degps: number): HeadVec {
	const turn = turnPeaking(degps);
	const ahead = spinInHead({ ...turn, angle: -turn.angle }, constantSpin(1), SIDE)(turn.duration / 2);
	return crossCoupled(turn, constantSpin(radpsFromRpm(rpm)), ahead)(turn.duration / 2);
}

const changeOver = (deg: number): number => {
	const turn: HeadTurn = { axis: TURN_AXES.yaw, angle: radFromDeg(deg), duration: 0.8 };
	const spin = constantSpin(radpsFromRpm(4));
	return degFromRad(length(sub(spinInHead(turn, spin, SIDE)(turn.duration), spinInHead(turn, spin, SIDE)(0))));
};

const angleBetween = (a: HeadVec, b: HeadVec): number => degFromRad(Math.atan2(length(cross(a, b)), dot(a, b)));
const between = (a: CanalId, b: CanalId): number => angleBetween(CANAL_NORMALS[a], CANAL_NORMALS[b]);
/** A step of rotation as a canal without the short constant would report it (τ_s 1e-5 s), t whole seconds. */
function decay(cupula: number, t: number): number {
	const constants = { ...DEFAULT_CONSTANTS, cupula, short: 1e-5 };
	const report = canalReport(() => head(0, 0, 1), { from: 0, step: 0.5, count: 2 * t + 1 }, constants, { adaptedTo: head(0, 0, 0) });
	return report[6 * t + 2] as number;
}

const KINEMATICS = "Guedry & Benson 1978: Ω × ω_head, computed";
const DELLA_SANTINA = "Della Santina et al. 2005, JARO 6:191–206, table 1A";
const PENDULUM = "e^(−t/τ) with τ of Rader, Oman & Merfeld 2009 (5.7 s) and Dai et al. 1999 (4.2 s)";

/** Forward part of the canals' report of a yaw of 90° to the left in 0.8 s at 4 rpm, spin axis on the right, at t s: ours and odex's. */
function headTurnReport(): { t: number; ours: number; odex: number }[] {
	const turn: HeadTurn = { axis: TURN_AXES.yaw, angle: radFromDeg(90), duration: 0.8 };
	const rate = headRate(turn, constantSpin(radpsFromRpm(4)), head(0, -1, 0));
	const times = [0.2, 0.4, 0.6, 0.8, 2, 8];
	const report = canalReport(rate, { from: 0, step: 0.1, count: 81 }, DEFAULT_CONSTANTS, { breaks: [0, turn.duration] });
	const reference = integrated(rate, rate(0), DEFAULT_CONSTANTS, 0, times);
	return times.map((t, i) => ({ t, ours: report[3 * Math.round(t / 0.1)] as number, odex: reference[i]?.[0] as number }));
}

const row =
	(group: string, unit: string, tolerance: number, source: string, flag: string) =>
	(check: string, ours: number, reference: number): TruthRow => ({
		group,
		check,
		ours,
		reference,
		tolerance,
		kind: "absolute",
		unit,
		source,
		flag,
	});

export function rows(): TruthRow[] {
	const acceleration = row("cross-coupled acceleration", "rad/s²", 5e-6, KINEMATICS, "C");
	const change = row("spin seen by a turned head", "deg/s", 5e-4, "2 Ω sin(a/2), computed", "C");
	const angle = row("canal plane angles", "deg", 0.005, DELLA_SANTINA, "R, angles C");
	const perCanal = row("cross-coupling of each canal", "rad/s²", 1e-4, `${DELLA_SANTINA}, Ω × ω_head`, "R, C");
	const step = row("canal step decay", "of the step", 7e-6, PENDULUM, "R, C");
	const turned = row("canal report of a head turn", "rad/s", 1e-9, "odex 2.0.4, extrapolation, tolerance 1e-13", "C");
	const check18 = atPeak(4, 60);
	const expected18: readonly (readonly [CanalId, number])[] = [
		["LA", -0.2586],
		["LH", -0.1388],
		["LP", -0.3054],
		["RA", -0.2584],
		["RH", -0.1443],
		["RP", -0.3038],
	];
	return [
		acceleration("4 rpm, 60 °/s", length(check18), 0.43865),
		acceleration("6 rpm, 90 °/s", length(atPeak(6, 90)), 0.98696),
		acceleration("1 rpm, 60 °/s", length(atPeak(1, 60)), 0.10966),
		acceleration("4 rpm on the left, yaw left 60 °/s: forward part", check18[0], 0.43865),
		change("4 rpm, 30°", changeOver(30), 12.423),
		change("4 rpm, 90°", changeOver(90), 33.941),
		angle("LA to LH", between("LA", "LH"), 90.92),
		angle("LA to LP", between("LA", "LP"), 93.94),
		angle("LH to LP", between("LH", "LP"), 90.06),
		angle("RA against LP", between("RA", "LP"), 10.59),
		angle("LA against RP", between("LA", "RP"), 10.76),
		angle("LH to RH", between("LH", "RH"), 4.46),
		...expected18.map(([id, value]) =>
			perCanal(`${id}, 4 rpm on the left, yaw left 60 °/s`, canalComponents(check18)[CANALS.indexOf(id)] as number, value),
		),
		step("τ 5.7 s, 1 s", decay(5.7, 1), 0.83909),
		step("τ 5.7 s, 5 s", decay(5.7, 5), 0.41595),
		step("τ 5.7 s, 10 s", decay(5.7, 10), 0.17301),
		step("τ 5.7 s, 20 s", decay(5.7, 20), 0.02993),
		step("τ 4.2 s, 1 s", decay(4.2, 1), 0.78813),
		step("τ 4.2 s, 10 s", decay(4.2, 10), 0.09246),
		...headTurnReport().map(({ t, ours, odex }) => turned(`yaw left 90° in 0.8 s at 4 rpm, t = ${t} s`, ours, odex)),
	];
}
