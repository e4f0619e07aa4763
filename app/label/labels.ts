import { type Drop, GAP } from "../../src/activity/drop.ts";
import { ARROWS, type ArrowLetter } from "../../src/shape/arrow.ts";
import type { AnchorName, DropPicture } from "../../src/shape/drop-picture.ts";

export interface LabelText {
	readonly anchor: AnchorName;
	readonly text: string;
	/** How it looks: style/overlay classes. */
	readonly look: "answer" | "chip" | "axis" | "note" | "instrument";
	readonly letter?: ArrowLetter;
	/** Summary key whose derivation it opens. */
	readonly opens?: string;
	readonly hang?: "centred" | "outward" | "tip";
	/** A second line in words: what the finding says of it. */
	readonly verdict?: string;
	readonly tries: readonly (readonly [number, number])[];
	/** A scale bar before the text, in m/s². */
	readonly bar?: number;
	/** A text that follows the picture: written where it differs from the one that stands. */
	readonly live?: (picture: DropPicture) => string;
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
	const { centrifugal } = picture.stage.greatest;
	const step = centrifugal > 0 ? 10 ** Math.floor(Math.log10(centrifugal / 2)) : 1;
	const factor = picture.minorFactor[external ? "external" : "eyepoint"];
	const chip = (letter: ArrowLetter): string =>
		`${letter}${external ? ` ${ARROWS[letter].name}` : ""}${factor === 10 && letter !== "C" && letter !== "G" ? " ×10" : ""}`;
	const force = (letter: ArrowLetter): LabelText => ({
		anchor: letter,
		letter,
		text: chip(letter),
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
		{ anchor: "rose", text: "on the object", look: "instrument", hang: "centred", tries: [] },
		{ anchor: "rose-words", text: roseWords(picture), look: "instrument", hang: "centred", tries: [] },
		{
			anchor: "rose-bar",
			text: print(step, "m/s²") + (factor === 10 ? `, ×10: ${print(step / 10, "m/s²")}` : ""),
			look: external ? "note" : "instrument",
			hang: "centred",
			tries: [],
			bar: step,
		},
		...(["K", "C", "E", "A", "G"] as const).map(force),
		{ anchor: "ghost", text: "if the ring did not turn", look: "note", tries: ROUND },
		{ anchor: "up", text: "up", look: "axis", hang: "outward", tries: [] },
		{ anchor: "prograde", text: "with spin", look: "axis", hang: "outward", tries: [] },
		{ anchor: "axial", text: "axial", look: "axis", hang: "outward", tries: [] },
		{
			anchor: "plumb",
			text: plumbWords(picture, print),
			look: "instrument",
			hang: "centred",
			tries: [],
			live: (p) => plumbWords(p, print),
		},
	];
}

const SHORT: Readonly<Record<ArrowLetter, string>> = { C: "centrifugal", K: "Coriolis", E: "Euler", A: "−own accel.", G: "sum" };

/** The letters of the rose in words. */
function roseWords({ stage }: DropPicture): string {
	const shown: ArrowLetter[] = ["C", "K"];
	if (stage.greatest.euler > 0) shown.push("E");
	if (stage.drop.drag > 0) shown.push("A", "G");
	const words = shown.map((letter) => `${letter} ${SHORT[letter]}`);
	return [words.slice(0, 2).join("   "), words.slice(2).join("   ")].filter((line) => line !== "").join("\n");
}

function plumbWords(picture: DropPicture, print: Print): string {
	const { plumb } = picture.stage;
	const y = plumb[1] as number;
	if (y === 0 && plumb[0] === 0 && plumb[2] === 0) return "no weight, no vertical";
	const tilt = (Math.acos(Math.min(1, Math.max(-1, -y))) * 180) / Math.PI;
	return `your vertical\n${tilt < 0.05 ? "true to the deck" : `${print(tilt, "°", 2)} off the deck’s`}`;
}
