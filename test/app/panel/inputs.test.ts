import { beforeEach, describe, expect, test } from "vitest";
import { dragChange, type Input, inputsOf } from "../../../app/panel/inputs.ts";
import { change, undoChange, useDocument } from "../../../app/store/document.ts";
import { findCase } from "../../../app/store/navigate.ts";
import { useSession } from "../../../app/store/session.ts";
import { undoLabel } from "../../../src/history/history.ts";
import { startDemo } from "../../support/demo.ts";

const doc = useDocument.getState;
const shown = () => {
	const c = findCase(doc().assessed.cases, useSession.getState().selected);
	if (!c) throw new Error("no case is on the stage");
	return c;
};
const inputs = (): Input[] => inputsOf(doc().layout, shown()).flatMap((g) => g.inputs);
const input = (label: string): Input => {
	const found = inputs().find((i) => i.label === label);
	if (!found) throw new RangeError(`no input "${label}" among ${inputs().map((i) => i.label)}`);
	return found;
};
const set = (label: string, value: number) => change(input(label).change(value));
const drop = () => {
	const { file } = shown();
	if (file.kind !== "drop") throw new Error("no drop is on the stage");
	return file;
};

beforeEach(() => {
	startDemo();
	const driver = doc().assessed.cases.find((c) => c.id === "drop-driver");
	useSession.setState({ selected: { activity: "drop-driver", crew: driver?.crew ?? "", phase: "nominal" } });
});

describe("inputs of a drop", () => {
	test.each([
		["Spin rate", 4.2],
		["Deck radius", 34.5],
		["Height", 1.2],
		["Ring angle", 2],
		["Axial", -0.4],
		["Speed", 1.5],
		["Mass", 1.1],
		["Diameter", 0.1],
	])("%s is read back as set, in one undoable step", (label, value) => {
		const before = doc().layout;
		expect(set(label, value)).toEqual([]);
		expect(input(label).value).toBe(value);
		expect(undoLabel(doc().history)).toMatch(/^Undo set /);
		undoChange();
		expect(doc().layout).toEqual(before);
	});
	test("a deck moved outward takes its ladders' feet along", () => {
		expect(set("Deck radius", 35)).toEqual([]);
		const ladder = doc().layout.elements?.find((e) => e.kind === "ladder");
		expect(ladder?.kind === "ladder" && ladder.foot_radius_m).toBe(35);
		expect(undoLabel(doc().history)).toBe("Undo set radius of the Cargo deck");
	});
	test("heading and elevation appear with a speed, and a speed of 0 is a drop again", () => {
		expect(inputs().map((i) => i.label)).not.toContain("Heading");
		set("Speed", 2);
		set("Heading", 90);
		set("Elevation", 20);
		expect(drop().release).toEqual({ speed_mps: 2, heading_deg: 90, elevation_deg: 20 });
		set("Speed", 0);
		expect("release" in drop()).toBe(false);
	});
	test("the drag coefficient appears with the drag", () => {
		expect(inputs().map((i) => i.label)).not.toContain("Drag coefficient");
		expect(change(dragChange(doc().layout, "drop-driver", true))).toEqual([]);
		expect(drop().drag).toBe(true);
		expect(set("Drag coefficient", 1.1)).toEqual([]);
		expect(drop().object.drag_coefficient).toBe(1.1);
	});
	test("what the layout forbids is refused with its path", () => {
		const problems = set("Height", 5);
		expect(problems.length).toBeGreaterThan(0);
		expect(problems[0]?.path).toContain("height_m");
		expect(drop().from.height_m).toBe(1.5);
	});
});
