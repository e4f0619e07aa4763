import { type Drop, GAP } from "../../src/activity/drop.ts";
import type { AnchorName, DropPicture } from "../../src/shape/drop-picture.ts";

export interface LabelText {
	readonly anchor: AnchorName;
	readonly text: string;
	/** How it looks: style/overlay classes. */
	readonly look: "answer" | "chip" | "axis" | "note" | "instrument";
	readonly letter?: "C" | "K" | "E";
	/** Summary key whose derivation it opens. */
	readonly opens?: string;
	readonly hang?: "centred" | "outward" | "tip";
	/** A second line in words: what the finding says of it. */
	readonly verdict?: string;
	readonly tries: readonly (readonly [number, number])[];
	/** A scale bar after the text: a length in m/s². */
	readonly bar?: number;
}

const ROUND = [
	[1, 0],
	[-1, 0],
	[1, -1],
	[-1, -1],
	[1, 1],
	[-1, 1],
	[0, 1],
	[0, -1],
	[1.8, 0],
	[-1.8, 0],
] as const;
const BESIDE_GAP = [
	[0, 1.3],
	[1, 1],
	[-1, 1],
	[1.2, 0],
	[-1.2, 0],
	[0, -1.4],
	[1.2, -1.2],
	[-1.2, -1.2],
	[1.6, 2],
	[-1.6, 2],
] as const;

type Print = (value: number, unit: string, figures?: number) => string;

/** "0.30 m against spin", with the axial share where it counts. */
export function gapWords(gap: NonNullable<Drop["gap"]>, print: Print): string {
	const parts: string[] = [];
	if (Math.abs(gap.prograde) >= 0.1 * gap.length)
		parts.push(`${print(Math.abs(gap.prograde), "m", 2)} ${gap.prograde < 0 ? "against spin" : "with spin"}`);
	if (Math.abs(gap.axial) >= 0.1 * gap.length) parts.push(`${print(Math.abs(gap.axial), "m", 2)} along the axis`);
	return parts.length > 0 ? parts.join(", ") : "no gap";
}

/** Every label of a drop's picture, the most important first. */
export function dropLabels(picture: DropPicture, print: Print, verdict: string | null, external: boolean): readonly LabelText[] {
	const { drop } = picture.stage;
	const { gap } = drop;
	const ten = picture.minorFactor === 10 ? " ×10" : "";
	const force = (letter: "C" | "K" | "E", text: string): LabelText => ({
		anchor: letter,
		letter,
		text,
		look: "chip",
		tries: ROUND,
		...(external ? {} : { hang: "tip" as const }),
	});
	return [
		...(gap
			? [
					{
						anchor: "gap",
						text: gapWords(gap, print),
						look: "answer",
						opens: drop.velocity.every((v) => v === 0) ? "landing_prograde_m" : GAP,
						tries: BESIDE_GAP,
						...(verdict ? { verdict } : {}),
					} as const,
				]
			: []),
		force("K", `K${external ? " Coriolis" : ""}${ten}`),
		force("C", external ? "C centrifugal" : "C"),
		force("E", `E${external ? " Euler" : ""}${ten}`),
		{ anchor: "ghost", text: "without turning", look: "note", tries: ROUND },
		{ anchor: "up", text: "up", look: "axis", hang: "outward", tries: [] },
		{ anchor: "prograde", text: "with spin", look: "axis", hang: "outward", tries: [] },
		{ anchor: "axial", text: "axial", look: "axis", hang: "outward", tries: [] },
		{ anchor: "rose", text: "on the object", look: "instrument", hang: "centred", tries: [] },
		{ anchor: "rose-bar", text: "", look: "instrument", hang: "centred", tries: [], bar: 1 },
		{ anchor: "plumb", text: plumbWords(picture, print), look: "instrument", hang: "centred", tries: [] },
	];
}

function plumbWords(picture: DropPicture, print: Print): string {
	const [x, y, z] = picture.stage.plumb as unknown as [number, number, number];
	if (Math.hypot(x, y, z) === 0) return "no weight, no vertical";
	const tilt = (Math.acos(Math.min(1, Math.max(-1, -y))) * 180) / Math.PI;
	return `your vertical\n${tilt < 0.05 ? "true to the deck" : `${print(tilt, "°", 2)} off the deck’s`}`;
}
