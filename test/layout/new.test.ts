import { expect, test } from "vitest";
import { writeLayout } from "../../src/layout/canonical.ts";
import { newLayout } from "../../src/layout/new.ts";
import { parseLayout } from "../../src/layout/parse.ts";
import { cases } from "../../src/layout/resolve.ts";
import { whole } from "./support.ts";

test("a new layout is a layout, with one bay, one crew member and one drop", () => {
	const layout = whole(parseLayout(writeLayout(newLayout('A "house" of one\'s own'))));
	expect(layout).toEqual(newLayout('A "house" of one\'s own'));
	expect(layout.habitat.decks).toHaveLength(1);
	expect(cases(layout)).toMatchObject([{ activity: { kind: "drop" }, crew: { id: "one" }, phase: "nominal" }]);
});
