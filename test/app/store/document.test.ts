import { beforeEach, describe, expect, test } from "vitest";
import { change, endGesture, isDirty, markSaved, redoChange, undoChange, useDocument } from "../../../app/store/document.ts";
import { redoLabel, undoLabel } from "../../../src/history/history.ts";
import { startDemo } from "../../support/demo.ts";

const doc = useDocument.getState;
const rename = (title: string) => ({ label: "Set title", kind: "set" as const, path: ["title"], value: title });
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
		const problems = change({ label: "Break", kind: "set", path: ["habitat", "spin", "rate_rpm"], value: 99 });
		expect(problems.map((p) => [p.path, p.value])).toEqual([["habitat.spin.rate_rpm", "99"]]);
		expect(doc()).toBe(before);
	});
	test("undo and redo are named", () => {
		change(rename("Other"));
		expect([undoLabel(doc().history), redoLabel(doc().history)]).toEqual(["Undo set title", null]);
		undoChange();
		expect([undoLabel(doc().history), redoLabel(doc().history)]).toEqual([null, "Redo set title"]);
	});
	test("edits of one gesture are one step, until it ends", () => {
		const before = doc().layout.title;
		for (const title of ["A", "B"]) change(rename(title), "title");
		endGesture();
		for (const title of ["C", "D"]) change(rename(title), "title");
		undoChange();
		expect(doc().layout.title).toBe("B");
		undoChange();
		expect(doc().layout.title).toBe(before);
	});
	test("an edit outside of a gesture is a step of its own", () => {
		change(rename("A"), "title");
		change(rename("B"));
		undoChange();
		expect(doc().layout.title).toBe("A");
	});
	test("put back by hand it is clean again", () => {
		const before = doc().layout.title;
		change(rename("A"));
		change(rename(before));
		expect(isDirty(doc())).toBe(false);
	});
	test("saving makes it clean, and an undo past it dirty", () => {
		change(rename("Other"));
		markSaved(doc().layout, { name: "other.layout.json", handle: null });
		expect(isDirty(doc())).toBe(false);
		undoChange();
		expect(isDirty(doc())).toBe(true);
	});
});
