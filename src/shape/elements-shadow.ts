import { type Deck, deckTriad, floorAlong, floorAngle, placeOnDeck } from "../layout/habitat.ts";
import type { Triangles } from "./drawable.ts";
import { MeshBuilder } from "./mesh.ts";
import { COLOUR } from "./palette.ts";
import { directionToStage, type StageFrame, toStage } from "./stage-frame.ts";

/** Discs that lie over each other, so that the middle is darkest and the rim fades: each this opaque, so much over the deck, m. */
const DISCS = 14;
const SECTORS = 32;
const OPACITY = 0.021;
const LIFT = 0.0015;

/**
 * The soft shade of what stands at a floor point: nested discs on the deck, of radii m along a heading
 * (rad) and across it.
 */
export function contactShadow(
	frame: StageFrame,
	deck: Deck,
	angle: number,
	axial: number,
	radiusAlong: number,
	radiusAcross: number,
	heading = 0,
): Triangles {
	const mesh = new MeshBuilder();
	const along = floorAlong(deck, angle);
	const c = Math.cos(heading);
	const s = Math.sin(heading);
	const p = [0, 0, 0];
	const n = [0, 0, 0];
	const vertex = (ahead: number, across: number): number => {
		const at = floorAngle(deck, along + ahead * c - across * s);
		toStage(frame, placeOnDeck(deck, at, axial + ahead * s + across * c, LIFT), p);
		directionToStage(frame, deckTriad(deck, at).up, n);
		return mesh.vertex(p[0] as number, p[1] as number, p[2] as number, n[0] as number, n[1] as number, n[2] as number, COLOUR.shadow);
	};
	for (let d = 0; d < DISCS; d++) {
		const share = Math.acos((2 * d + 1) / DISCS - 1) / Math.acos(1 / DISCS - 1);
		const middle = vertex(0, 0);
		const edge = Array.from({ length: SECTORS }, (_, i) => {
			const t = (2 * Math.PI * i) / SECTORS;
			return vertex(share * radiusAlong * Math.cos(t), share * radiusAcross * Math.sin(t));
		});
		for (let i = 0; i < SECTORS; i++) mesh.triangle(middle, edge[i] as number, edge[(i + 1) % SECTORS] as number);
	}
	return mesh.build(`shadow:${deck.id}`, { lit: false, opacity: OPACITY, decal: true });
}
