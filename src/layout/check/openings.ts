import { TAU } from "../../quantity/constants.ts";
import { SLACK } from "../deck.ts";
import type { Deck } from "../habitat.ts";
import { below } from "../problem.ts";
import type { HatchFile, WindowFile } from "../schema.ts";
import { alongAngles, angleWithin, type Bounds, clearAngles, type Problems, problem, told, within } from "./bounds.ts";

/** Whether the outlines of hatches and windows lie within their surfaces. A position is that of the centre. */

interface Side {
	readonly key: string;
	readonly size: number;
}
interface Sides {
	readonly along: Side;
	readonly across: Side;
}

function sidesOf(e: HatchFile | WindowFile): Sides {
	if (e.shape === "rectangle") return { along: { key: "along_m", size: e.along_m }, across: { key: "across_m", size: e.across_m } };
	const diameter = { key: "diameter_m", size: e.diameter_m };
	return { along: diameter, across: diameter };
}

/** One side of an outline between the straight edges of its surface: too large is said of the size, else of the place. */
function* straightProblems(path: string, key: string, centre: number, side: Side, edges: Bounds, why: string): Problems {
	const room = edges.to - edges.from;
	if (side.size > room + SLACK) yield problem(below(path, side.key), side.size, `at most ${told(room)} m (${why})`);
	else yield* within(below(path, key), centre, { from: edges.from + side.size / 2, to: edges.to - side.size / 2 }, "m", why);
}

const axialProblems = (path: string, axial: number, side: Side, deck: Deck): Problems =>
	straightProblems(path, "axial_m", axial, side, { from: deck.axialFrom, to: deck.axialTo }, `the outline within deck ${deck.id}`);

const uprightProblems = (path: string, height: number, side: Side, deck: Deck): Problems =>
	straightProblems(path, "height_m", height, side, { from: 0, to: deck.headroom }, `the outline within the headroom of deck ${deck.id}`);

/** The angles of its centre (rad) that keep an outline at `height` (m) between the bay's angular ends; on an end it reaches up to `top`. */
function outlineAngles(deck: Deck, e: HatchFile | WindowFile, height: number, top: number): Bounds | null {
	if (deck.closed) return null;
	const half = sidesOf(e).along.size / 2;
	if (deck.floor === "curved") {
		const angle = half / (deck.radius - height);
		return { from: deck.from + angle, to: deck.to - angle };
	}
	if (e.shape === "circle" && top > height) return clearAngles(deck, height, half);
	return alongAngles(deck, (deck.radius - top) * Math.tan((deck.to - deck.from) / 2) - half);
}

function* angularProblems(
	path: string,
	e: Extract<HatchFile | WindowFile, { angle_deg: number }>,
	deck: Deck,
	height: number,
	top: number,
): Problems {
	const { along } = sidesOf(e);
	const around = TAU * (deck.radius - height);
	const bounds = outlineAngles(deck, e, height, top);
	if (bounds === null) {
		if (along.size > around) yield problem(below(path, along.key), along.size, `at most ${told(around)} m, once around deck ${deck.id}`);
	} else if (bounds.from > bounds.to + SLACK) {
		yield problem(below(path, along.key), along.size, `a size that fits between the angular ends of deck ${deck.id}`);
	} else yield* angleWithin(below(path, "angle_deg"), e.angle_deg, deck, bounds, `the outline within deck ${deck.id}`);
}

export function* hatchProblems(path: string, e: HatchFile, deck: Deck): Problems {
	yield* angularProblems(path, e, deck, 0, 0);
	yield* axialProblems(path, e.axial_m, sidesOf(e).across, deck);
}

export function* windowProblems(path: string, e: WindowFile, deck: Deck): Problems {
	const { along, across } = sidesOf(e);
	switch (e.surface) {
		case "floor":
		case "ceiling": {
			const height = e.surface === "floor" ? 0 : deck.headroom;
			yield* angularProblems(path, e, deck, height, height);
			yield* axialProblems(path, e.axial_m, across, deck);
			return;
		}
		case "end-low":
		case "end-high": {
			const upright = [...uprightProblems(path, e.height_m, across, deck)];
			yield* upright;
			if (upright.length === 0) yield* angularProblems(path, e, deck, e.height_m, e.height_m + across.size / 2);
			return;
		}
		default: {
			if (deck.closed) {
				const expected = `floor, ceiling, end-low or end-high: deck ${deck.id} closes on itself and has no sides`;
				yield problem(below(path, "surface"), e.surface, expected);
				return;
			}
			yield* axialProblems(path, e.axial_m, along, deck);
			yield* uprightProblems(path, e.height_m, across, deck);
		}
	}
}
