import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Change } from "../../src/history/edit.ts";
import { begin, cancel, change, commit, type History, redo, redoLabel, startHistory, undo, undoLabel } from "../../src/history/history.ts";
import { newLayout } from "../../src/layout/new.ts";
import { validateLayout } from "../../src/layout/parse.ts";

const start = newLayout("A house");
const rate = (rpm: number): Change => ({ label: "Set spin rate", kind: "set", path: ["habitat", "spin", "rate_rpm"], value: rpm });
const height = (m: number): Change => ({ label: "Set release height", kind: "set", path: ["activities", 0, "from", "height_m"], value: m });

function changed(history: History, ...changes: readonly Change[]): History {
	return changes.reduce((h, c) => {
		const result = change(h, c);
		if (!result.ok) throw new Error(JSON.stringify(result.problems));
		return result.history;
	}, history);
}

describe("undo and redo", () => {
	test("are named after the change", () => {
		const h = changed(startHistory(start), rate(4), height(1));
		expect(undoLabel(h)).toBe("Undo set release height");
		expect(redoLabel(h)).toBeNull();
		expect(undoLabel(undo(h))).toBe("Undo set spin rate");
		expect(redoLabel(undo(h))).toBe("Redo set release height");
		expect(undoLabel(undo(undo(h)))).toBeNull();
	});

	test("leave a history with nothing to undo or redo as it is", () => {
		const h = startHistory(start);
		expect(undo(h)).toBe(h);
		expect(redo(h)).toBe(h);
	});

	test("a new change forgets what could be redone", () => {
		const h = changed(undo(changed(startHistory(start), rate(4))), height(1));
		expect(redo(h).document).toBe(h.document);
		expect(h.past).toHaveLength(1);
	});

	test("a change to the same value is no step and keeps what can be redone", () => {
		const h = undo(changed(startHistory(start), rate(4)));
		expect(changed(h, rate(start.habitat.spin.rate_rpm))).toBe(h);
	});
});

describe("a refused change", () => {
	test("leaves history and document as they are and says why", () => {
		const h = changed(startHistory(start), rate(4));
		const result = change(h, rate(61));
		expect(result.ok).toBe(false);
		expect(result.history).toBe(h);
		if (!result.ok)
			expect(result.problems).toEqual([{ path: "habitat.spin.rate_rpm", value: "61", expected: "a number from 0 to 60 rpm" }]);
	});
});

describe("a gesture", () => {
	test("is one step under its own name, however many changes it holds", () => {
		const h = commit(changed(begin(startHistory(start), "rate", "Drag spin rate"), rate(4), rate(5), rate(6)));
		expect(h.past).toHaveLength(1);
		expect(undoLabel(h)).toBe("Undo drag spin rate");
		expect(undo(h).document).toBe(start);
		expect(redo(undo(h)).document).toBe(h.document);
	});

	test("begun again with the same key goes on, with another key starts anew", () => {
		const first = changed(begin(startHistory(start), "rate", "Nudge spin rate"), rate(4));
		const same = changed(begin(first, "rate", "Nudge spin rate"), rate(5));
		expect(commit(same).past).toHaveLength(1);
		const other = commit(changed(begin(first, "height", "Nudge height"), height(1)));
		expect(other.past.map((s) => s.label)).toEqual(["Nudge spin rate", "Nudge height"]);
	});

	test("cancelled leaves no trace, not even of what could be redone", () => {
		const h = undo(changed(startHistory(start), rate(4)));
		const back = cancel(changed(begin(h, "height", "Drag height"), height(1), height(1.1)));
		expect(back).toEqual(h);
		expect(back.document).toBe(h.document);
	});

	test("that changed nothing, or came back to where it began, is no step and keeps what can be redone", () => {
		const h = undo(changed(startHistory(start), rate(4)));
		expect(commit(begin(h, "rate", "Drag"))).toEqual(h);
		const returned = commit(changed(begin(h, "rate", "Drag"), rate(7), rate(start.habitat.spin.rate_rpm)));
		expect(returned.past).toHaveLength(0);
	});

	test("that is open is what undo takes back", () => {
		const h = changed(begin(startHistory(start), "rate", "Drag spin rate"), rate(4), rate(5));
		expect(undoLabel(h)).toBe("Undo drag spin rate");
		expect(undo(h)).toMatchObject({ document: start, gesture: null });
	});
});

type Act =
	| { act: "change"; rpm: number }
	| { act: "lift"; m: number }
	| { act: "begin"; key: string }
	| { act: "commit" | "cancel" | "undo" | "redo" };
const act: fc.Arbitrary<Act> = fc.oneof(
	{ weight: 4, arbitrary: fc.record({ act: fc.constant("change" as const), rpm: fc.integer({ min: -2, max: 62 }) }) },
	{ weight: 3, arbitrary: fc.record({ act: fc.constant("lift" as const), m: fc.integer({ min: 0, max: 26 }).map((d) => d / 10) }) },
	fc.record({ act: fc.constant("begin" as const), key: fc.constantFrom("a", "b") }),
	fc.record({ act: fc.constantFrom("commit" as const, "cancel" as const, "undo" as const, "redo" as const) }),
);

function perform(h: History, a: Act): History {
	switch (a.act) {
		case "change":
			return change(h, rate(a.rpm)).history;
		case "lift":
			return change(h, height(a.m)).history;
		case "begin":
			return begin(h, a.key, `Drag ${a.key}`);
		case "commit":
			return commit(h);
		case "cancel":
			return cancel(h);
		case "undo":
			return undo(h);
		case "redo":
			return redo(h);
	}
}

test("after any acts, seed 4711: every document on the way is valid, all undos lead to the start, all redos back, by identity", () => {
	fc.assert(
		fc.property(fc.array(act, { maxLength: 25 }), (acts) => {
			const h = commit(acts.reduce(perform, startHistory(start)));
			expect(validateLayout(h.document)).toMatchObject({ ok: true });
			if (h.past.length > 0) {
				expect(redo(undo(h))).toEqual(h);
				expect(redo(undo(h)).document).toBe(h.document);
			}
			if (h.future.length > 0) expect(undo(redo(h)).document).toBe(h.document);
			let back = h;
			for (let i = h.past.length; i > 0; i--) back = undo(back);
			expect(back.document).toBe(start);
			expect(back.past).toHaveLength(0);
			let forth = back;
			for (let i = h.past.length; i > 0; i--) forth = redo(forth);
			expect(forth.document).toBe(h.document);
		}),
		{ seed: 4711, numRuns: 300 },
	);
});
