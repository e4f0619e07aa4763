import { TAU } from "../../quantity/constants.ts";
import { radFromDeg } from "../../quantity/convert.ts";
import { floorRadius, LADDER_FOOT, ladderDeck, SLACK } from "../deck.ts";
import { type Deck, deckCovers } from "../habitat.ts";
import type { LayoutParts } from "../parts.ts";
import { below, type Problem } from "../problem.ts";
import type { ElementFile, HatchFile, LadderFile, WindowFile } from "../schema.ts";
import { alongAngles, angleWithin, type Bounds, clearAngles, placeWithin, problem, told, within } from "./bounds.ts";
import type { CheckedDecks } from "./habitat.ts";
import { duplicates, refer } from "./references.ts";

function ladderProblems(path: string, e: LadderFile, decks: CheckedDecks): Problem[] {
	const problems: Problem[] = [];
	if (!(e.head_radius_m < e.foot_radius_m)) {
		problems.push(
			problem(below(path, "head_radius_m"), e.head_radius_m, `less than foot_radius_m, ${e.foot_radius_m}: the head is inboard`),
		);
	}
	if (!decks.all) return problems;
	const angle = radFromDeg(e.angle_deg);
	const all = [...decks.sound.values()];
	if (ladderDeck(all, angle, e.axial_m, e.foot_radius_m)) return problems;
	const gap = (deck: Deck): number => Math.abs(floorRadius(deck, angle) - e.foot_radius_m);
	const there = all.filter((d) => deckCovers(d, { angle, axial: e.axial_m }));
	const nearest = there.reduce<Deck | undefined>((best, d) => (best && gap(best) <= gap(d) ? best : d), undefined);
	const foot = below(path, "foot_radius_m");
	if (!nearest) {
		const place = `at ${e.angle_deg} deg, axial ${e.axial_m} m`;
		return [...problems, problem(foot, e.foot_radius_m, `the floor of a deck within ${LADDER_FOOT} m, and no deck lies ${place}`)];
	}
	const floor = floorRadius(nearest, angle);
	const why = e.foot_radius_m > floor ? "it starts below its deck" : "it starts above the floor";
	return [...problems, problem(foot, e.foot_radius_m, `${told(floor)} m within ${LADDER_FOOT} m, the floor of deck ${nearest.id}: ${why}`)];
}

interface Sizes {
	readonly alongKey: string;
	readonly acrossKey: string;
	readonly along: number;
	readonly across: number;
}

const sizesOf = (e: HatchFile | WindowFile): Sizes =>
	e.shape === "circle"
		? { alongKey: "diameter_m", acrossKey: "diameter_m", along: e.diameter_m, across: e.diameter_m }
		: { alongKey: "along_m", acrossKey: "across_m", along: e.along_m, across: e.across_m };

/** An outline's extent between bounds of its centre: what is larger than its surface is said of the size, not of the place. */
function extentWithin(path: string, key: string, size: number, sizeKey: string, value: number, surface: Bounds, why: string): Problem[] {
	const room = surface.to - surface.from;
	if (size > room + SLACK) return [problem(below(path, sizeKey), size, `at most ${told(room)} m (${why})`)];
	return within(below(path, key), value, { from: surface.from + size / 2, to: surface.to - size / 2 }, "m", why);
}

/** The angles of the centre (rad) of an outline `along` (m) wide at `height` (m) that keep it between the bay's angular ends. */
function outlineAngles(deck: Deck, e: HatchFile | WindowFile, along: number, height: number, top: number): Bounds | null {
	if (deck.closed) return null;
	if (deck.floor === "curved") {
		const half = along / 2 / (deck.radius - height);
		return { from: deck.from + half, to: deck.to - half };
	}
	if (e.shape === "circle" && top > height) return clearAngles(deck, height, along / 2);
	return alongAngles(deck, (deck.radius - top) * Math.tan((deck.to - deck.from) / 2) - along / 2);
}

function alongProblems(
	path: string,
	e: HatchFile | (WindowFile & { angle_deg: number }),
	deck: Deck,
	height: number,
	top: number,
): Problem[] {
	const { along, alongKey } = sizesOf(e);
	const why = `the outline within deck ${deck.id}`;
	if (deck.closed && along > TAU * (deck.radius - height)) {
		return [problem(below(path, alongKey), along, `at most ${told(TAU * (deck.radius - height))} m, once around deck ${deck.id}`)];
	}
	const bounds = outlineAngles(deck, e, along, height, top);
	if (bounds && bounds.from > bounds.to)
		return [problem(below(path, alongKey), along, `a size that fits between the ends of deck ${deck.id}`)];
	return angleWithin(below(path, "angle_deg"), e.angle_deg, deck, bounds, why);
}

function axialProblems(path: string, axial: number, size: number, sizeKey: string, deck: Deck): Problem[] {
	const surface = { from: deck.axialFrom, to: deck.axialTo };
	return extentWithin(path, "axial_m", size, sizeKey, axial, surface, `the outline within deck ${deck.id}`);
}

function hatchProblems(path: string, e: HatchFile, deck: Deck): Problem[] {
	const { across, acrossKey } = sizesOf(e);
	return [...alongProblems(path, e, deck, 0, 0), ...axialProblems(path, e.axial_m, across, acrossKey, deck)];
}

function windowProblems(path: string, e: WindowFile, deck: Deck): Problem[] {
	const { along, across, alongKey, acrossKey } = sizesOf(e);
	const upright = (height: number) =>
		extentWithin(
			path,
			"height_m",
			across,
			acrossKey,
			height,
			{ from: 0, to: deck.headroom },
			`between floor and ceiling of deck ${deck.id}`,
		);
	switch (e.surface) {
		case "floor":
		case "ceiling": {
			const height = e.surface === "floor" ? 0 : deck.headroom;
			return [...alongProblems(path, e, deck, height, height), ...axialProblems(path, e.axial_m, across, acrossKey, deck)];
		}
		case "end-low":
		case "end-high": {
			const vertical = upright(e.height_m);
			return vertical.length > 0 ? vertical : alongProblems(path, e, deck, e.height_m, e.height_m + across / 2);
		}
		default:
			if (deck.closed) {
				return [
					problem(
						below(path, "surface"),
						e.surface,
						`floor, ceiling, end-low or end-high: deck ${deck.id} closes on itself and has no sides`,
					),
				];
			}
			return [...axialProblems(path, e.axial_m, along, alongKey, deck), ...upright(e.height_m)];
	}
}

function elementProblems(path: string, e: ElementFile, decks: CheckedDecks): Problem[] {
	if (e.kind === "ladder") return ladderProblems(path, e, decks);
	const deck = decks.sound.get(e.deck);
	if (!deck) return [];
	if (e.kind === "hatch") return hatchProblems(path, e, deck);
	return e.kind === "window" ? windowProblems(path, e, deck) : placeWithin(path, e, deck);
}

export function checkElements(parts: LayoutParts, decks: CheckedDecks): Problem[] {
	return [
		...duplicates(parts.elements.ids, "an element id"),
		...parts.elements.entries.flatMap(({ path, value }) => [
			...(value.kind === "ladder" ? [] : refer([{ path: below(path, "deck"), value: value.deck }], parts.decks, "deck")),
			...elementProblems(path, value, decks),
		]),
	];
}
