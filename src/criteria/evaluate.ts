import type { Drop } from "../activity/drop.ts";
import type { CaseSummary } from "../activity/result.ts";
import { cylindricalFromRing } from "../frame/place.ts";
import { angleNear, type Deck, type Habitat, heightAbove } from "../layout/habitat.ts";
import { type ActivityKind, type LayoutFile, NOMINAL } from "../layout/schema.ts";
import { degFromRad, radpsFromRpm } from "../quantity/convert.ts";
import { written } from "../quantity/round.ts";
import { ring } from "../vector/vec3.ts";
import { judge, type Subject } from "./judge.ts";
import { DECK_QUANTITIES, DROP_QUANTITIES, named, type Quantity, summaryQuantity } from "./quantity.ts";
import type { CriterionRow, Finding, FindingPlace } from "./row.ts";
import { rowsFor } from "./rows.ts";

/** What of an assessed case the criteria look at. */
export interface JudgedCase extends CaseSummary {
	readonly id: string;
	readonly kind: ActivityKind;
	readonly crew: string;
	readonly phase: string;
	readonly motion: Drop | null;
}

/** Every row of the layout's sets against every subject and case it applies to. Force and basis never mix into one total. */
export function evaluate(layout: LayoutFile, habitat: Habitat, cases: readonly JudgedCase[], shipped: readonly CriterionRow[]): Finding[] {
	const { rows, missing, untailored } = rowsFor(layout, shipped);
	const findings: Finding[] = [];
	for (const row of rows) {
		for (const about of row.appliesTo) {
			if (about === "habitat") findings.push(...deckFindings(layout, habitat, row));
			else findings.push(...cases.filter((c) => c.kind === about).map((c) => caseFinding(habitat, row, c)));
			for (const element of layout.elements ?? []) if (element.kind === about) findings.push(elementFinding(row, element.id));
		}
	}
	for (const set of missing) findings.push(leadsNowhere(set, `Criteria set "${set}"`, "no row of this set is shipped yet"));
	for (const { criterion, reason } of untailored) findings.push(leadsNowhere(criterion, `Tailored limit of "${criterion}"`, reason));
	return findings;
}

function caseFinding(habitat: Habitat, row: CriterionRow, c: JudgedCase): Finding {
	const special = c.motion ? named(DROP_QUANTITIES, row.quantity) : undefined;
	const quantity: Quantity = special && c.motion ? special(c.motion, habitat.decks) : caseQuantity(row, c);
	const who: Subject = { subject: c.id, crew: c.crew, phase: c.phase, at: c.motion ? strikePlace(habitat, c.motion) : {} };
	return judge(row, who, quantity, "transient");
}

function caseQuantity(row: CriterionRow, c: JudgedCase): Quantity {
	if (!c.motion) return { value: null, reason: "not built" };
	return summaryQuantity(c, row.quantity, c.kind);
}

/** The instant and place of the first impact. */
function strikePlace(habitat: Habitat, drop: Drop): FindingPlace {
	const { struck, end } = drop.flight;
	if (struck.kind === "outside" || struck.kind === "none" || !drop.landing) return { t_s: written(end) };
	const deck = habitat.decks[struck.deck] as Deck;
	const p = drop.landing.point;
	const { angle, axial } = cylindricalFromRing(ring(p[0], p[1], p[2]));
	return {
		t_s: written(end),
		deck: deck.id,
		angle_deg: written(degFromRad(angleNear(angle, deck.middle))),
		axial_m: written(axial),
		height_m: written(Math.abs(heightAbove(deck, p)) < 1e-9 ? 0 : heightAbove(deck, p)),
	};
}

/** Standing rows on every deck in every phase; the worst of the points of a spin profile and of the middle and the ends of a flat floor. */
function deckFindings(layout: LayoutFile, habitat: Habitat, row: CriterionRow): Finding[] {
	const known = named(DECK_QUANTITIES, row.quantity);
	const { spin, phases } = layout.habitat;
	const phasesHeld = [
		{ phase: NOMINAL, rates: spin.profile ? spin.profile.map((p) => p.rate_rpm) : [spin.rate_rpm] },
		...(phases ?? []).map((p) => ({ phase: p.id, rates: [p.rate_rpm] })),
	];
	const tallest = layout.crew.reduce<{ id: string; stature_m: number } | null>((a, c) => (a && a.stature_m >= c.stature_m ? a : c), null);
	return phasesHeld.flatMap(({ phase, rates }) =>
		habitat.decks.map((deck) => {
			const at = (angle: number): Subject => ({
				subject: deck.id,
				crew: known?.needsCrew ? (tallest?.id ?? null) : null,
				phase,
				at: {
					deck: deck.id,
					angle_deg: written(degFromRad(angle)),
					axial_m: written((deck.axialFrom + deck.axialTo) / 2),
					height_m: 0,
				},
			});
			if (!known)
				return judge(row, at(deck.middle), { value: null, reason: `"${row.quantity}" is not a quantity of the habitat` }, "sustained");
			if (known.needsCrew && !tallest) return judge(row, at(deck.middle), { value: null, reason: "the layout has no crew" }, "sustained");
			const angles = deck.floor === "curved" ? [deck.middle] : [deck.middle, deck.from, deck.to];
			const held = rates.flatMap((rpm) =>
				angles.map((angle) => ({
					angle,
					value: written(known.of(deck.radius / Math.cos(angle - deck.middle), radpsFromRpm(rpm), tallest?.stature_m ?? 0)),
				})),
			);
			const worst = held.reduce((a, b) => ((row.comparison === "at-most" ? b.value > a.value : b.value < a.value) ? b : a));
			return judge(row, at(worst.angle), { value: worst.value, unit: known.unit }, "sustained");
		}),
	);
}

const elementFinding = (row: CriterionRow, id: string): Finding =>
	judge(row, { subject: id, crew: null, phase: NOMINAL, at: {} }, { value: null, reason: "not built" }, "sustained");

/** What the layout's criteria name and nothing stands for: said, not dropped. */
const leadsNowhere = (criterion: string, title: string, reason: string): Finding => ({
	criterion,
	title,
	force: "information",
	subject: "layout",
	crew: null,
	phase: NOMINAL,
	quantity: "",
	value: null,
	unit: "",
	limit: 0,
	comparison: "at-most",
	margin: null,
	at: {},
	result: "not-assessed",
	reason,
	basis: "unverified",
	source: "",
	note: "",
});
