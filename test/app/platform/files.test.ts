// @vitest-environment jsdom
import { beforeEach, describe, expect, test } from "vitest";
import { fileNameFor, openFile, openNew, openText } from "../../../app/platform/files.ts";
import { writeLayout } from "../../../app/store/core.ts";
import { change, isDirty, useDocument } from "../../../app/store/document.ts";
import { useSession } from "../../../app/store/session.ts";
import { startDemo } from "../../support/demo.ts";

const doc = useDocument.getState;
beforeEach(startDemo);

describe("files", () => {
	test.each([
		["Larkspur cargo ring, segment C", "larkspur-cargo-ring-segment-c.layout.json"],
		["Ärger / Ünten", "arger-unten.layout.json"],
		["???", "layout.layout.json"],
	])("%s is saved as %s", (title, name) => expect(fileNameFor(title)).toBe(name));

	test("a file opens clean, under its name, as another document", async () => {
		const { id, layout } = doc();
		await openFile(new File([writeLayout({ ...layout, title: "Other" })], "other.layout.json"));
		expect(doc()).toMatchObject({ layout: { title: "Other" }, file: { name: "other.layout.json" } });
		expect(doc().id).not.toBe(id);
		expect(isDirty(doc())).toBe(false);
	});
	test("bytes that are no text, and a file too large, are refused at once", async () => {
		const { layout } = doc();
		await openFile(new File([new Uint8Array([0xff, 0xfe, 0x00])], "binary.json"));
		expect(doc().refused).toMatchObject({ name: "binary.json", problems: [{ path: "file" }] });
		await openFile(new File([new Uint8Array(4 * 1024 * 1024 + 1)], "large.json"));
		expect(doc().refused).toMatchObject({ name: "large.json", problems: [{ expected: expect.stringContaining("at most") }] });
		expect(doc().layout).toBe(layout);
	});
	test("opening over unsaved work says that it is kept", () => {
		change({ label: "Set title", kind: "set", path: ["title"], value: "Mine" });
		const text = writeLayout(doc().saved);
		expect(openText(text, null)).toEqual([]);
		expect(useSession.getState().notice).toMatchObject({ text: expect.stringContaining("Mine"), command: "recover" });
	});
	test("a new layout opens with something to see", () => {
		openNew();
		expect(doc().file).toBeNull();
		expect(doc().assessed.cases.some((c) => c.motion !== null)).toBe(true);
	});
});
