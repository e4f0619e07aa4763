/** Every colour of the picture, sRGB. The index is what drawables carry. */
export const PALETTE = {
	ink: "#1B2430",
	muted: "#5B6470",
	paper: "#F5F2EC",
	panel: "#FBFAF6",
	line: "#D3CDC0",
	deck: "#B9C4CC",
	deckLine: "#9AA6AF",
	bulkhead: "#E7E2D8",
	ceiling: "#F1EDE4",
	ladder: "#B7791F",
	coaming: "#2B3542",
	coamingLip: "#EDE8DD",
	windowFrame: "#6E7883",
	desk: "#D9D2C3",
	deskEdge: "#8B8577",
	skin: "#8C97A3",
	suit: "#7B8794",
	suitDark: "#5E6975",
	boot: "#434D59",
	sky: "#05070C",
	centrifugal: "#0072B2",
	coriolis: "#D55E00",
	euler: "#9A4F7E",
	own: "#00795B",
	halo: "#FFFFFF",
	focus: "#0B5FFF",
	shadow: "#3A4450",
} as const;

export type ColourName = keyof typeof PALETTE;
export type ColourIndex = number;

const names = Object.keys(PALETTE) as ColourName[];
/** Index of each colour by name. */
export const COLOUR = Object.fromEntries(names.map((n, i) => [n, i])) as Record<ColourName, ColourIndex>;
/** sRGB bytes, 3 a colour, in index order. */
export const PALETTE_BYTES = new Uint8Array(names.flatMap((n) => [1, 3, 5].map((k) => Number.parseInt(PALETTE[n].slice(k, k + 2), 16))));
