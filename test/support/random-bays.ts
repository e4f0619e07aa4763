import type { DeckFile, ElementFile, HatchFile } from "../../src/layout/schema.ts";
import { type DropFile, deckFile, dropFile, type LayoutParts } from "./layout-of.ts";
import { type Draw, draw } from "./seeded.ts";

const deg = (rad: number): number => (rad * 180) / Math.PI;
const rad = (d: number): number => (d * Math.PI) / 180;

export interface RandomBay {
	readonly parts: LayoutParts;
	readonly file: DropFile;
}

/** One to three decks over each other, flat and curved, with hatches, sides at any span and solid elements; and one toss. */
export function randomBay(seed: number): RandomBay {
	const d = draw(seed);
	const decks: DeckFile[] = [];
	const middle = d.between(-180, 180);
	const count = d.of(1, 2, 2, 2, 3);
	let outermost = Math.exp(d.between(Math.log(6 * count), Math.log(120)));
	for (let i = 0; i < count; i++) {
		const floor = d.of<"curved" | "flat">("curved", "curved", "flat");
		const above = decks[i - 1];
		const half = floor === "flat" ? deg(Math.atan(d.between(3, 6) / outermost)) : d.of(180, d.between(120, 179), d.between(20, 120));
		const own = middle + (floor === "flat" && above ? d.between(-0.2, 0.2) * half : 0);
		/** A flat floor stays inboard of what is below it out to its edges. */
		const radius = floor === "flat" && above ? outermost * Math.cos(rad(half)) : outermost;
		const headroom = d.between(2, 3);
		decks.push(
			deckFile({
				id: `deck-${i}`,
				floor,
				radius_m: radius,
				from_deg: own - half,
				to_deg: own + half,
				from_m: -d.between(2, 4),
				to_m: d.between(2, 4),
				headroom_m: headroom,
			}),
		);
		outermost = radius - headroom - d.of(0, d.between(0.05, 0.6));
	}
	const elements: ElementFile[] = decks.flatMap((deck, i) => (i > 0 || d.chance(0.3) ? hatches(d, deck, decks[i - 1], i) : []));
	if (d.chance(0.4)) elements.push(...solids(d, decks));
	const file = toss(
		d,
		decks,
		elements.filter((e): e is HatchFile => e.kind === "hatch"),
	);
	const rpm = d.chance(0.1) ? 0 : deg(Math.sqrt((d.between(0.05, 1.2) * 9.80665) / decks[0]!.radius_m)) / 6;
	const profile = [
		{ t_s: 0, rate_rpm: rpm },
		{ t_s: d.between(0.1, 2), rate_rpm: rpm * d.between(0, 1.5) },
	];
	return {
		parts: { spin: { rate_rpm: rpm, ...(d.chance(0.25) ? { profile } : {}) }, decks, elements },
		file: { ...file, drag: d.chance(0.3) },
	};
}

function hatches(d: Draw, deck: DeckFile, below: DeckFile | undefined, index: number): HatchFile[] {
	const round = d.chance(0.5);
	const along = d.between(0.3, 1.5);
	const across = round ? along : d.between(0.3, 1.5);
	const range = (over: DeckFile[]): readonly [number, number] => [
		Math.max(...over.map((o) => o.from_m)),
		Math.min(...over.map((o) => o.to_m)),
	];
	const [low, high] = range(below ? [deck, below] : [deck]);
	const axial = d.of(d.between(low + across / 2, high - across / 2), low + across / 2, high - across / 2);
	const middle = (deck.from_deg + deck.to_deg) / 2;
	const least = Math.min(...[deck, ...(below ? [below] : [])].map((o) => (o.to_deg - o.from_deg) / 2));
	const room = Math.min(deg(2.5 / deck.radius_m), 0.7 * least - deg(along / deck.radius_m));
	const angle = middle + d.between(-1, 1) * Math.max(0, room);
	const head = { id: `hatch-${index}`, kind: "hatch" as const, deck: deck.id, angle_deg: angle + d.of(0, 360, -360), axial_m: axial };
	return [
		round
			? { ...head, shape: "circle" as const, diameter_m: along }
			: { ...head, shape: "rectangle" as const, along_m: along, across_m: across },
	];
}

function solids(d: Draw, decks: DeckFile[]): ElementFile[] {
	const deck = decks.find((o) => o.floor === "curved");
	if (!deck) return [];
	const middle = (deck.from_deg + deck.to_deg) / 2;
	return [
		{
			id: "ladder",
			kind: "ladder",
			angle_deg: middle + d.between(-1, 1),
			axial_m: d.between(-1, 1),
			foot_radius_m: deck.radius_m,
			head_radius_m: deck.radius_m - d.between(1.5, 3.5),
			facing_deg: d.between(0, 360),
			width_m: 0.45,
			rung_spacing_m: 0.3,
			toe_clearance_m: 0.2,
			traffic: "both",
			solid: true,
		},
		{
			id: "desk",
			kind: "workstation",
			deck: deck.id,
			angle_deg: middle + d.between(-2, 2),
			axial_m: d.between(-1, 1),
			facing_deg: d.between(0, 360),
			solid: true,
		},
	];
}

function toss(d: Draw, decks: DeckFile[], openings: HatchFile[]): DropFile {
	const deck = d.of(...decks);
	const index = decks.indexOf(deck);
	const diameter = d.of(0, d.between(0.01, 0.4), d.between(0.3, 1.2));
	const half = diameter / 2 + 0.01;
	const near = d.chance(0.7) ? openings.find((h) => h.deck === deck.id || h.deck === decks[index + 1]?.id) : undefined;
	const middle = (deck.from_deg + deck.to_deg) / 2;
	const span = (deck.to_deg - deck.from_deg) / 2;
	const height = d.between(half, deck.headroom_m - half);
	const wall = deg(Math.asin(Math.min(1, half / (deck.radius_m - deck.headroom_m)))) * 1.2;
	const clamp = (x: number, low: number, high: number): number => Math.min(high, Math.max(low, x));
	const reach =
		deck.floor === "flat"
			? deg(Math.atan(((deck.radius_m - deck.headroom_m) / deck.radius_m) * Math.tan(rad(span - wall)) - half / deck.radius_m))
			: span - wall;
	const turn = (x: number): number => x - 360 * Math.round((x - middle) / 360);
	const angle = near
		? turn(near.angle_deg) + deg(d.between(-0.8, 0.8) / deck.radius_m)
		: middle + d.between(-1, 1) * Math.min(reach, deg(8 / deck.radius_m));
	const axial = near ? near.axial_m + d.between(-0.8, 0.8) : d.between(deck.from_m, deck.to_m);
	const place = {
		deck: deck.id,
		angle_deg: clamp(angle, middle - reach, middle + reach),
		axial_m: clamp(axial, deck.from_m + half, deck.to_m - half),
		height_m: height,
	};
	const speed = d.of(d.between(0, 3), d.between(0, 10), d.between(0, 50));
	const at = near && d.chance(0.7) ? aim(d, deck, place, near, turn(near.angle_deg)) : [d.between(0, 360), d.between(-90, 90)];
	return dropFile({
		from: place,
		object: { mass_kg: 0.4, diameter_m: diameter, drag_coefficient: 0.47 },
		...(d.chance(0.15) ? {} : { release: { speed_mps: speed, heading_deg: at[0]!, elevation_deg: at[1]! } }),
	});
}

/** Heading and elevation (deg) towards a point of a hatch in the floor, or in the ceiling, as if nothing turned. */
function aim(d: Draw, deck: DeckFile, from: DropFile["from"], hatch: HatchFile, angle: number): readonly [number, number] {
	const [along, across] = hatch.shape === "circle" ? [hatch.diameter_m, hatch.diameter_m] : [hatch.along_m, hatch.across_m];
	const level = hatch.deck === deck.id ? deck.radius_m : deck.radius_m - deck.headroom_m;
	const u = level * rad(angle - from.angle_deg) + d.between(-0.6, 0.6) * along;
	const w = hatch.axial_m - from.axial_m + d.between(-0.6, 0.6) * across;
	const rise = hatch.deck === deck.id ? -from.height_m : deck.headroom_m - from.height_m;
	return [deg(Math.atan2(w, u)), deg(Math.atan2(rise, Math.hypot(u, w)))];
}
