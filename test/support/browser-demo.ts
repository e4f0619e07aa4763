import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { root } from "../../.ci/house.mjs";
import { type AssessedCase, assess } from "../../src/assess.ts";
import type { CriterionRow } from "../../src/criteria/row.ts";
import type { Deck } from "../../src/layout/habitat.ts";
import { parseLayout } from "../../src/layout/parse.ts";
import { directionToStage, type StageFrame, stageFrame, toStage } from "../../src/shape/stage-frame.ts";
import { ring } from "../../src/vector/vec3.ts";
import type { Vec } from "./browser-stage.ts";

const read = (path: string): string => readFileSync(join(root, "assets", path), "utf8");

export const demoText = read("layout/larkspur.layout.json");

/** The shipped demo, assessed in this process as the command line does. */
export function assessDemo() {
	const parsed = parseLayout(demoText);
	if (!parsed.ok) throw new Error(`the demo is refused: ${JSON.stringify(parsed.problems)}`);
	const rows = readdirSync(join(root, "assets/criteria"))
		.filter((name) => name.endsWith(".json"))
		.flatMap((name) => JSON.parse(read(`criteria/${name}`)) as CriterionRow[]);
	return assess(parsed.layout, rows);
}

/** The drop of the demo, and its stage's frame: everything a picture of it can be held against. */
export function demoDrop(id = "drop-driver") {
	const assessed = assessDemo();
	const c = assessed.cases.find((one) => one.id === id) as AssessedCase;
	if (!c?.motion?.landing) throw new Error(`"${id}" has no landing`);
	const { motion } = c;
	const { landing } = motion;
	if (!landing) throw new Error(`"${id}" has no landing`);
	const frame = stageFrame(motion.deck, motion.stance.angle, motion.stance.axial);
	const [x, y, z] = landing.point;
	return { assessed, motion, frame, duration: motion.flight.end, landing: { angle: Math.atan2(y, x), axial: z, deck: motion.deck } };
}

/** Stage coordinates of a place on a curved floor, found by turning the outermost radius about the spin axis. */
export function floorToStage(frame: StageFrame, deck: Deck, angle: number, axial: number, height = 0): Vec {
	const r = deck.radius - height;
	const out = [0, 0, 0];
	toStage(frame, ring(r * Math.cos(angle), r * Math.sin(angle), axial), out);
	return out as unknown as Vec;
}

/** The way the floor moves at the stance (Ω × r, unit) as a stage direction; up is inboard, axial along the spin vector. */
export function stageDirections(frame: StageFrame): { readonly prograde: Vec; readonly up: Vec; readonly axial: Vec } {
	const [x, y] = frame.origin;
	const r = Math.hypot(x, y);
	const of = (v: Vec): Vec => {
		const out = [0, 0, 0];
		directionToStage(frame, ring(...v), out);
		return out as unknown as Vec;
	};
	return { prograde: of([-y / r, x / r, 0]), up: of([-x / r, -y / r, 0]), axial: of([0, 0, 1]) };
}
