// @vitest-environment jsdom
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { COMMANDS, commandNamed } from "../../../app/command/all.ts";
import { hearKey, isSingle, keysOf, printStroke, strokeOf } from "../../../app/command/keyboard.ts";
import { change, useDocument } from "../../../app/store/document.ts";
import { SPEEDS, useSession } from "../../../app/store/session.ts";
import { transient } from "../../../app/store/transient.ts";
import { startDemo } from "../../support/demo.ts";

const session = useSession.getState;

beforeEach(() => {
	startDemo();
	document.body.innerHTML = `<div data-stage><canvas tabindex="0"></canvas></div><input type="text"><button>b</button>`;
	addEventListener("keydown", hearKey);
});
afterEach(() => removeEventListener("keydown", hearKey));

const press = (on: string, key: string, more: KeyboardEventInit = {}): KeyboardEvent => {
	const event = new KeyboardEvent("keydown", { key, bubbles: true, cancelable: true, ...more });
	document.querySelector(on)?.dispatchEvent(event);
	return event;
};

describe("strokes", () => {
	test.each([
		[{ key: "z", ctrlKey: true }, "Mod+Z"],
		[{ key: "Z", ctrlKey: true, shiftKey: true }, "Mod+Shift+Z"],
		[{ key: "z", metaKey: true }, "Mod+Z"],
		[{ key: " " }, "Space"],
		[{ key: "g" }, "g"],
		[{ key: "G" }, "g"],
		[{ key: "F", shiftKey: true }, "Shift+F"],
		[{ key: "?", shiftKey: true }, "?"],
		[{ key: "ArrowLeft", shiftKey: true }, "Shift+ArrowLeft"],
	])("%j is %s", (e, stroke) => {
		expect(strokeOf({ ctrlKey: false, metaKey: false, altKey: false, shiftKey: false, ...e })).toBe(stroke);
	});
	test("are printed by habit", () => expect([printStroke("Mod+S"), printStroke("g"), printStroke("?")]).toEqual(["Ctrl+S", "G", "?"]));
});

describe("commands", () => {
	test("each has a name, a key and a group, and no key names two", () => {
		for (const c of COMMANDS) expect([c.name(), c.keys.length, c.group], c.id).not.toContain(0);
		const keys = COMMANDS.flatMap((c) => c.keys);
		expect(keys.filter((k, i) => keys.indexOf(k) !== i)).toEqual([]);
		expect(COMMANDS.length).toBeGreaterThan(15);
		expect(() => commandNamed("fly")).toThrow('"fly"');
	});
	test("one character is heard on the stage alone", () => {
		press("button", "u");
		press("input", "u");
		press("body", "u");
		expect(session().units).toBe("si");
		expect(press("canvas", "u").defaultPrevented).toBe(true);
		expect(session().units).toBe("us");
	});
	test("a changed key takes the place of the old one; an empty one leaves none", () => {
		useSession.setState({ keymap: { units: "x", glossary: "" } });
		press("canvas", "u");
		press("canvas", "g");
		expect(session()).toMatchObject({ units: "si", dialog: null });
		press("canvas", "x");
		expect(session().units).toBe("us");
		expect(keysOf(commandNamed("glossary")).filter(isSingle)).toEqual([]);
		expect(keysOf(commandNamed("commands"), { commands: "c" })).toEqual(["Mod+K", "c"]);
	});
	test("undo is heard everywhere but in a field, which has its own", () => {
		change({ label: "Set title", kind: "set", path: ["title"], value: "Other" });
		expect(press("input", "z", { ctrlKey: true }).defaultPrevented).toBe(false);
		expect(useDocument.getState().layout.title).toBe("Other");
		press("button", "z", { ctrlKey: true });
		expect(useDocument.getState().layout.title).not.toBe("Other");
		press("body", "y", { ctrlKey: true });
		expect(useDocument.getState().layout.title).toBe("Other");
	});
	test("nothing is heard while a dialog is open, or where another has taken the key", () => {
		useSession.setState({ dialog: "glossary" });
		press("canvas", "u");
		useSession.setState({ dialog: null });
		const taken = new KeyboardEvent("keydown", { key: "u", bubbles: true, cancelable: true });
		taken.preventDefault();
		document.querySelector("canvas")?.dispatchEvent(taken);
		expect(session().units).toBe("si");
	});
	test("a command that can do nothing takes its key but does nothing", () => {
		expect(commandNamed("undo").enabled()).toBe(false);
		expect(press("canvas", "z", { ctrlKey: true }).defaultPrevented).toBe(true);
	});
	test("step, speed, view and dialogs by key", () => {
		const before = transient.time;
		press("canvas", ",");
		expect(transient.time).toBeCloseTo(before - 0.01, 9);
		press("canvas", ".");
		expect(transient.time).toBeCloseTo(before, 9);
		press("canvas", "[");
		expect(session().speed).toBe(1 / 2);
		for (let i = 0; i < 9; i++) press("canvas", "]");
		expect(session().speed).toBe(SPEEDS.at(-1));
		press("canvas", "2");
		expect(session().view).toBe("external");
		press("canvas", "1");
		expect(session().view).toBe("eyepoint");
		press("canvas", "g");
		expect(session().dialog).toBe("glossary");
	});
	test("undo and redo name what they would do", () => {
		change({ label: "Set title", kind: "set", path: ["title"], value: "Other" });
		expect(commandNamed("undo").name()).toBe("Undo set title");
		commandNamed("undo").run();
		expect(commandNamed("redo").name()).toBe("Redo set title");
	});
});
