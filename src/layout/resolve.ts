import { constantSpin, profileSpin, type Spin } from "../frame/spin.ts";
import { kelvinFromCelsius, radFromDeg, radpsFromRpm } from "../quantity/convert.ts";
import { floorRadius, ladderDeck, resolveDeck } from "./deck.ts";
import type { Deck, Habitat, Hatch, Ladder, Outline, WindowOpening, Workstation } from "./habitat.ts";
import { angleNear, deckCovers } from "./habitat.ts";
import {
	type ActivityFile,
	type CrewMember,
	type HatchFile,
	type LadderFile,
	type LayoutFile,
	NOMINAL,
	type WindowFile,
	type WorkstationFile,
} from "./schema.ts";

/** One activity by one crew member in one phase. */
export interface Case {
	readonly activity: ActivityFile;
	readonly crew: CrewMember;
	readonly phase: string;
}

const several = <T>(one: T | readonly T[]): readonly T[] => (Array.isArray(one) ? one : [one as T]);

const outlineOf = (file: HatchFile | WindowFile): Outline =>
	file.shape === "circle"
		? { shape: "circle", along: file.diameter_m, across: file.diameter_m }
		: { shape: "rectangle", along: file.along_m, across: file.across_m };

/** The nearest deck outward of `deck` whose angles and axial range contain the place; null where there is none. */
function deckBelow(decks: readonly Deck[], deck: Deck, angle: number, axial: number): number | null {
	const own = floorRadius(deck, angle);
	let below: number | null = null;
	let least = Number.POSITIVE_INFINITY;
	for (const other of decks) {
		if (other.index === deck.index || !deckCovers(other, { angle, axial })) continue;
		const radius = floorRadius(other, angle);
		if (radius > own && radius < least) {
			below = other.index;
			least = radius;
		}
	}
	return below;
}

/**
 * The habitat as the mechanics reads it. Angles lie within half a turn of the middle of the deck they are on.
 * The layout must have been parsed; throws RangeError on an id that is not there.
 */
export function resolveHabitat(layout: LayoutFile): Habitat {
	const decks = layout.habitat.decks.map(resolveDeck);
	const byId = new Map(decks.map((d) => [d.id, d]));
	const deckNamed = (id: string): Deck => {
		const found = byId.get(id);
		if (!found) throw new RangeError(`no deck has the id "${id}"`);
		return found;
	};
	const angleOn = (deck: Deck, deg: number): number => angleNear(radFromDeg(deg), deck.middle);
	const hatches: Hatch[] = [];
	const ladders: Ladder[] = [];
	const windows: WindowOpening[] = [];
	const workstations: Workstation[] = [];

	const addLadder = (e: LadderFile): void => {
		const deck = ladderDeck(decks, radFromDeg(e.angle_deg), e.axial_m, e.foot_radius_m);
		if (!deck) throw new RangeError(`no deck has its floor at the foot of the ladder "${e.id}", ${e.foot_radius_m} m`);
		ladders.push({
			id: e.id,
			deck: deck.index,
			angle: angleOn(deck, e.angle_deg),
			axial: e.axial_m,
			footRadius: e.foot_radius_m,
			headRadius: e.head_radius_m,
			facing: radFromDeg(e.facing_deg),
			width: e.width_m,
			rungSpacing: e.rung_spacing_m,
			toeClearance: e.toe_clearance_m,
			traffic: e.traffic,
			solid: e.solid ?? false,
		});
	};
	const addHatch = (e: HatchFile): void => {
		const deck = deckNamed(e.deck);
		const angle = angleOn(deck, e.angle_deg);
		hatches.push({
			...outlineOf(e),
			id: e.id,
			deck: deck.index,
			below: deckBelow(decks, deck, angle, e.axial_m),
			angle,
			axial: e.axial_m,
			solid: e.solid ?? false,
		});
	};
	const addWindow = (e: WindowFile): void => {
		const deck = deckNamed(e.deck);
		const base = { ...outlineOf(e), id: e.id, deck: deck.index, surface: e.surface, solid: e.solid ?? false };
		switch (e.surface) {
			case "floor":
			case "ceiling":
				windows.push({ ...base, angle: angleOn(deck, e.angle_deg), axial: e.axial_m, height: e.surface === "floor" ? 0 : deck.headroom });
				break;
			case "end-low":
			case "end-high":
				windows.push({
					...base,
					angle: angleOn(deck, e.angle_deg),
					axial: e.surface === "end-low" ? deck.axialFrom : deck.axialTo,
					height: e.height_m,
				});
				break;
			default:
				windows.push({ ...base, angle: e.surface === "side-low" ? deck.from : deck.to, axial: e.axial_m, height: e.height_m });
		}
	};
	const addWorkstation = (e: WorkstationFile): void => {
		const deck = deckNamed(e.deck);
		workstations.push({
			id: e.id,
			deck: deck.index,
			angle: angleOn(deck, e.angle_deg),
			axial: e.axial_m,
			facing: radFromDeg(e.facing_deg),
			solid: e.solid ?? false,
		});
	};
	for (const e of layout.elements ?? []) {
		if (e.kind === "ladder") addLadder(e);
		else if (e.kind === "hatch") addHatch(e);
		else if (e.kind === "window") addWindow(e);
		else addWorkstation(e);
	}

	const { air, sky } = layout.habitat;
	return {
		decks,
		hatches,
		ladders,
		windows,
		workstations,
		air: { pressure: air.pressure_kPa * 1000, temperature: kelvinFromCelsius(air.temperature_C), oxygenFraction: air.oxygen_fraction },
		sky: {
			axisRightAscension: radFromDeg(sky.axis_ra_deg),
			axisDeclination: radFromDeg(sky.axis_dec_deg),
			zero: radFromDeg(sky.zero_deg),
			sunRightAscension: radFromDeg(sky.sun_ra_deg),
			sunDeclination: radFromDeg(sky.sun_dec_deg),
		},
	};
}

/** Every case of the layout: activities in the file's order, then crew, then phases. */
export function cases(layout: LayoutFile): Case[] {
	const crew = new Map(layout.crew.map((c) => [c.id, c]));
	return layout.activities.flatMap((activity) =>
		several(activity.crew).flatMap((who) => {
			const member = crew.get(who);
			if (!member) throw new RangeError(`activity "${activity.id}": no crew member has the id "${who}"`);
			return several(activity.phase ?? NOMINAL).map((phase) => ({ activity, crew: member, phase }));
		}),
	);
}

/** The spin in a phase; `start` (s) is where on a nominal profile the returned spin's time 0 lies. */
export function spinOf(layout: LayoutFile, phase: string, start = 0): Spin {
	const { spin, phases } = layout.habitat;
	if (phase === NOMINAL) {
		if (!spin.profile) return constantSpin(radpsFromRpm(spin.rate_rpm));
		return profileSpin(
			spin.profile.map((p) => ({ t: p.t_s, rate: radpsFromRpm(p.rate_rpm) })),
			start,
		);
	}
	const found = phases?.find((p) => p.id === phase);
	if (!found) throw new RangeError(`no phase has the id "${phase}"`);
	return constantSpin(radpsFromRpm(found.rate_rpm));
}
