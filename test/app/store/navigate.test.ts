import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { change, redoChange, undoChange, useDocument } from "../../../app/store/document.ts";
import { findingKey } from "../../../app/store/findings.ts";
import {
	followDocument,
	lastMoment,
	mayPlay,
	openStory,
	play,
	selectActivity,
	selectCase,
	selectFinding,
	setView,
	stepFinding,
	stepTime,
	timeStep,
	worstCase,
} from "../../../app/store/navigate.ts";
import { useSession } from "../../../app/store/session.ts";
import { setTime, transient } from "../../../app/store/transient.ts";
import { startDemo, startWith } from "../../support/demo.ts";
import { dropFile, layoutOf } from "../../support/layout-of.ts";

const session = useSession.getState;
const assessed = () => useDocument.getState().assessed;
let stop = (): void => {};
beforeEach(() => {
	startDemo();
	stop = followDocument();
});
afterEach(() => stop());

const atRate = (value: number) => ({ label: "Set spin rate", kind: "set" as const, path: ["habitat", "spin", "rate_rpm"], value });

describe("the first screen", () => {
	test("opens on an outside finding of a built activity, at its moment, and says why", () => {
		const finding = assessed().findings.find((f) => findingKey(f) === session().finding);
		expect(finding).toMatchObject({ result: "outside", subject: session().selected?.activity });
		expect(finding?.at.t_s).toBeGreaterThan(0);
		expect(transient.time).toBeCloseTo(finding?.at.t_s ?? 0, 8);
		expect(session().why).toMatch(/^Opened here: .*\.$/);
		expect(session().playing).toBe(false);
	});
	test("a layout without criteria opens its first activity and says so", () => {
		startWith(layoutOf({ activities: [dropFile({ id: "first" }), dropFile({ id: "second" })] }));
		expect(session().selected?.activity).toBe("first");
		expect(session().why).toContain("no criterion could be assessed");
	});
	test("a layout with nothing built opens empty", () => {
		startWith(layoutOf());
		expect(session().selected).toBeNull();
		expect(transient.duration).toBe(0);
		expect(mayPlay()).toBe(false);
	});
});

describe("choosing", () => {
	test("an activity opens at its last event and drops the reason", () => {
		selectActivity("toss-pouch");
		const c = worstCase("toss-pouch");
		expect(session()).toMatchObject({ selected: { activity: "toss-pouch" }, why: null, finding: null });
		expect(transient.time).toBe(c && lastMoment(c));
	});
	test("a kind that is not built is not put on the stage", () => {
		const before = session().selected;
		selectActivity("climb-a");
		const climb = assessed().cases.find((c) => c.id === "climb-a");
		if (climb) selectCase(climb, 0);
		expect(climb?.motion).toBeNull();
		expect(session().selected).toBe(before);
	});
	test("a finding about a deck is marked and leaves the case", () => {
		const before = session().selected;
		const deck = assessed().findings.find((f) => f.subject === "upper");
		if (!deck) throw new Error("the demo has no finding about a deck");
		selectFinding(deck);
		expect(session()).toMatchObject({ finding: findingKey(deck), selected: before });
	});
	test("the findings can be walked both ways around", () => {
		const first = session().finding;
		stepFinding(1);
		expect(session().finding).not.toBe(first);
		stepFinding(-1);
		expect(session().finding).toBe(first);
	});
});

describe("edits", () => {
	test("at the landing one stays at the landing, though it is at another time", () => {
		const before = transient.time;
		expect(change(atRate(2))).toEqual([]);
		expect(transient.time).toBeGreaterThan(before);
		expect(transient.time).toBe(transient.duration);
		undoChange();
		expect(transient.time).toBe(before);
		redoChange();
		expect(transient.time).toBe(transient.duration);
	});
	test("elsewhere the time stays", () => {
		setTime(0.2);
		change(atRate(4));
		expect(transient.time).toBe(0.2);
	});
	test("case and derivation stay, the reason goes", () => {
		useSession.setState({ derivation: "landing_speed_mps" });
		const { selected } = session();
		change(atRate(3));
		expect(session()).toMatchObject({ selected, derivation: "landing_speed_mps", why: null });
	});
	test("where the case is gone the story opens anew", () => {
		const gone = session().selected?.activity;
		const index = useDocument.getState().layout.activities.findIndex((a) => a.id === gone);
		expect(change({ label: "Remove", kind: "remove", path: ["activities", index] })).toEqual([]);
		expect(session().selected?.activity).not.toBe(gone);
		expect(session().selected).not.toBeNull();
	});
});

describe("playing", () => {
	test("the first Eyepoint run asks before it moves", () => {
		play();
		expect(session()).toMatchObject({ dialog: "caution", playing: false });
	});
	test("once accepted it plays, from the start where it stood at the end", () => {
		useSession.setState({ cautionAccepted: true });
		setTime(transient.duration);
		play();
		expect(session()).toMatchObject({ dialog: null, playing: true });
		expect(transient.time).toBe(0);
	});
	test("External does not ask, and turning to Eyepoint unasked stops it", () => {
		setView("external");
		play();
		expect(session().playing).toBe(true);
		setView("eyepoint");
		expect(session().playing).toBe(false);
	});
	test("less motion: Eyepoint is scrubbed, not played", () => {
		useSession.setState({ cautionAccepted: true, reducedMotion: true });
		expect(mayPlay()).toBe(false);
		play();
		expect(session().playing).toBe(false);
		setView("external");
		expect(mayPlay()).toBe(true);
	});
	test("a step is a round hundredth of the motion, and pauses", () => {
		useSession.setState({ playing: true });
		setTime(0.5);
		expect(timeStep()).toBe(0.01);
		stepTime(-10);
		expect(transient.time).toBeCloseTo(0.4, 12);
		expect(session().playing).toBe(false);
	});
});

test("opening the story twice gives the same", () => {
	const { selected, finding, why } = session();
	openStory();
	expect(session()).toMatchObject({ selected, finding, why });
});
