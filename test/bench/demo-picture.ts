import demo from "../../assets/layout/larkspur.layout.json?raw";
import { assess } from "../../src/assess.ts";
import { parseLayout } from "../../src/layout/parse.ts";
import type { Stars } from "../../src/shape/drawable.ts";
import { DropFigure } from "../../src/shape/drop-figure.ts";
import { DropPicture } from "../../src/shape/drop-picture.ts";
import { DropStage } from "../../src/shape/drop-stage.ts";
import { createFigure } from "../../src/shape/figure.ts";
import { StillShapes } from "../../src/shape/still.ts";
import { decodeCatalogue } from "../../src/sky/catalogue.ts";
import { catalogueLight } from "../../src/sky/light.ts";

export function starsOf(bytes: Uint8Array): Stars {
	const catalogue = decodeCatalogue(bytes);
	return { kind: "stars", name: "stars", direction: catalogue.direction, ...catalogueLight(catalogue) };
}

/** The picture of the demo's first drop, as the app shows it. */
export function demoPicture(): DropPicture {
	const parsed = parseLayout(demo);
	if (!parsed.ok) throw new Error(`the demo is refused: ${JSON.stringify(parsed.problems)}`);
	const shown = assess(parsed.layout, []).cases.find((c) => c.motion !== null);
	if (!shown?.motion) throw new Error("the demo has no drop");
	const { context, motion } = shown;
	const stage = new DropStage(context.habitat, context.spin, motion, new StillShapes());
	return new DropPicture(stage, new DropFigure(motion, createFigure(context.person.stature)));
}
