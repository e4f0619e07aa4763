import { beforeEach, describe, expect, test } from "vitest";
import { type newLayout, writeLayout } from "../../../app/store/core.ts";
import { change, isDirty, markSaved, redoChange, undoChange, useDocument } from "../../../app/store/document.ts";
import { startDemo } from "../../support/demo.ts";

const doc = useDocument.getState;
const rename = (title: string, key?: string) => ({
	label: "rename",
	...(key ? { key } : {}),
	apply: (l: ReturnType<typeof newLayout>) => ({ ...l, title }),
});
beforeEach(startDemo);

describe("the document", () => {
	test("opens clean, becomes dirty by an edit, clean again by its undo", () => {
		expect(isDirty(doc())).toBe(false);
		expect(change(rename("Other"))).toEqual([]);
		expect(isDirty(doc())).toBe(true);
		undoChange();
		expect(isDirty(doc())).toBe(false);
		redoChange();
		expect(isDirty(doc())).toBe(true);
	});
	test("layout and assessment belong together after every edit", () => {
		change(rename("Other"));
		expect(doc().assessed.layout).toBe(doc().layout);
		expect(doc().layout.title).toBe("Other");
		undoChange();
		expect(doc().assessed.layout).toBe(doc().layout);
	});
	test("an edit that breaks the layout is refused with its path, and nothing changes", () => {
		const before = doc();
		const problems = change({ label: "break", apply: (l) => ({ ...l, habitat: { ...l.habitat, spin: { rate_rpm: 99 } } }) });
		expect(problems.map((p) => [p.path, p.value])).toEqual([["habitat.spin.rate_rpm", "99"]]);
		expect(doc()).toBe(before);
	});
	test("undo and redo are named", () => {
		change(rename("Other"));
		expect([doc().history.undoLabel, doc().history.redoLabel]).toEqual(["rename", null]);
		undoChange();
		expect([doc().history.undoLabel, doc().history.redoLabel]).toEqual([null, "rename"]);
	});
	test("edits of one key are one step", () => {
		for (const title of ["A", "B", "C"]) change(rename(title, "title"));
		undoChange();
		expect(doc().layout.title).toBe(writeLayoutTitle());
	});
	test("saving makes it clean, and an undo past it dirty", () => {
		change(rename("Other"));
		markSaved(doc().layout, { name: "other.layout.json", handle: null });
		expect(isDirty(doc())).toBe(false);
		undoChange();
		expect(isDirty(doc())).toBe(true);
	});
});

const writeLayoutTitle = (): string => JSON.parse(writeLayout(doc().saved)).title;
