import { gFromMps2, radpsFromRpm } from "../../src/quantity/convert.ts";
import type { LayoutFile } from "../store/core.ts";

/** Spin rate of a phase, rpm; on a profile the rate it begins with. */
export function phaseRate(layout: LayoutFile, phase: string): number {
	const { spin, phases } = layout.habitat;
	return phases?.find((p) => p.id === phase)?.rate_rpm ?? spin.profile?.[0]?.rate_rpm ?? spin.rate_rpm;
}

/** Level of someone standing still in the middle of each deck: Ω²R over standard gravity. */
export function deckLevels(layout: LayoutFile, phase: string): { readonly id: string; readonly name: string; readonly level: number }[] {
	const rate = radpsFromRpm(phaseRate(layout, phase));
	return layout.habitat.decks.map((d) => ({ id: d.id, name: d.name, level: gFromMps2(rate * rate * d.radius_m) }));
}
