// @vitest-environment jsdom
import { act } from "react";
import { beforeEach, describe, expect, test } from "vitest";
import { Activities } from "../../../app/panel/Activities.tsx";
import { Findings } from "../../../app/panel/Findings.tsx";
import { Header } from "../../../app/panel/Header.tsx";
import { InWords } from "../../../app/panel/InWords.tsx";
import { Refused } from "../../../app/panel/Refused.tsx";
import { Result } from "../../../app/panel/Result.tsx";
import { TimeRule } from "../../../app/panel/TimeRule.tsx";
import { openFile } from "../../../app/platform/files.ts";
import { change, useDocument } from "../../../app/store/document.ts";
import { useSession } from "../../../app/store/session.ts";
import { setTime, transient } from "../../../app/store/transient.ts";
import { startDemo, startWith } from "../../support/demo.ts";
import { dropFile, layoutOf } from "../../support/layout-of.ts";
import { click, draw, media, named, press, textOf } from "../../support/page.tsx";

const session = useSession.getState;
beforeEach(() => {
	media.matches = false;
	startDemo();
});

describe("activities", () => {
	test("a card for each that is built; the others are named and cannot be chosen", () => {
		const host = draw(<Activities />);
		const cards = [...host.querySelectorAll("button.card")];
		expect(cards.map((c) => textOf(c.querySelector("strong")))).toEqual(["Drop driver", "Toss pouch"]);
		expect(cards.every((c) => c.querySelector("svg path")?.getAttribute("d")?.startsWith("M"))).toBe(true);
		expect(textOf(host.querySelector(".unbuilt"))).toMatch(/^Not built yet: .*Climb a,/);
		expect(host.querySelectorAll(".unbuilt button, .unbuilt a")).toHaveLength(0);
	});
	test("choosing a card puts its worst case on the stage", () => {
		const host = draw(<Activities />);
		click(host.querySelectorAll<HTMLElement>("button.card")[1] as HTMLElement);
		expect(session().selected?.activity).toBe("toss-pouch");
		expect(host.querySelectorAll("button.card")[1]?.getAttribute("aria-pressed")).toBe("true");
	});
	test("crew and phase are a choice where there are several cases, and say which is the worst", () => {
		startWith(
			layoutOf({
				phases: [{ id: "reduced", rate_rpm: 2 }],
				crew: [
					{ id: "one", stature_m: 1.75, mass_kg: 75 },
					{ id: "two", stature_m: 1.6, mass_kg: 60 },
				],
				activities: [dropFile({ crew: ["one", "two"], phase: ["nominal", "reduced"] })],
				own: [
					{
						id: "e",
						title: "Energy",
						applies_to: "drop",
						quantity: "impact_energy_J",
						comparison: "at-most",
						limit: 1,
						unit: "J",
						force: "should",
						basis: "standard",
						source: "s",
						note: "",
					},
				],
			}),
		);
		const host = draw(<Activities />);
		const phase = named("combobox", "Phase") as HTMLSelectElement;
		expect(phase.value).toBe("nominal");
		expect(textOf(phase.selectedOptions[0] ?? null)).toBe("nominal, 3.60 rpm (worst)");
		expect(textOf(host)).toContain("This is the worst case.");
		act(() => {
			phase.value = "reduced";
			phase.dispatchEvent(new Event("change", { bubbles: true }));
		});
		expect(session().selected?.phase).toBe("reduced");
		expect(textOf(host)).toContain("The worst case is one, nominal.");
	});
});

describe("the result", () => {
	test("headline, limit, reason and consequence", () => {
		const text = textOf(draw(<Result />));
		expect(text).toMatch(/Lands0\.30 m ?against spin of your hand/);
		expect(text).toContain("0.11 m in front of your feet and 0.25 m to the right.");
		expect(text).toContain("Outsidea limit that should be kept");
		expect(text).toContain("Opened here:");
		expect(text).toMatch(/Strikes the Cargo deck at 3\.73 m\/s/);
	});
	test("a number opens to its derivation, one at a time", () => {
		const host = draw(<Result />);
		const number = host.querySelector<HTMLElement>(".hero .number") as HTMLElement;
		click(number);
		expect(number.getAttribute("aria-expanded")).toBe("true");
		const panel = host.querySelector(".derivation");
		expect(panel?.id).toBe(number.getAttribute("aria-controls"));
		expect(textOf(panel)).toContain("floor radius34.00 m");
		expect(textOf(panel)).toContain("Source");
		click(host.querySelector(".numbers button.row") as HTMLElement);
		expect(host.querySelectorAll(".derivation")).toHaveLength(1);
		expect(number.getAttribute("aria-expanded")).toBe("false");
	});
	test("in customary units every length is in feet", () => {
		act(() => useSession.setState({ units: "us" }));
		const text = textOf(draw(<Result />));
		expect(text).toMatch(/Lands0\.99 ft/);
		expect(text).not.toMatch(/\d m[ ./]/);
	});
	test("nothing built: said, not drawn", () => {
		startWith(layoutOf());
		expect(textOf(draw(<Result />))).toContain("Nothing in this layout can be shown yet");
	});
});

describe("the time rule", () => {
	test("is a slider that says where it is", () => {
		draw(<TimeRule />);
		const slider = named("slider", "Time");
		act(() => setTime(0.58));
		expect(slider.getAttribute("aria-valuetext")).toBe("0.58 s of 0.81 s");
		expect((slider as HTMLInputElement).value).toBe("0.58");
	});
	test.each([
		["ArrowRight", false, 0.51],
		["ArrowLeft", false, 0.49],
		["ArrowRight", true, 0.6],
		["ArrowLeft", true, 0.4],
		["Home", false, 0],
	])("%s with shift %s goes to %d s", (key, shiftKey, time) => {
		draw(<TimeRule />);
		act(() => setTime(0.5));
		press(named("slider", "Time"), key, { shiftKey });
		expect(transient.time).toBeCloseTo(time, 9);
	});
	test("End goes to the end; Space plays, after the caution", () => {
		draw(<TimeRule />);
		act(() => setTime(0.5));
		press(named("slider", "Time"), "End");
		expect(transient.time).toBe(transient.duration);
		press(named("slider", "Time"), " ");
		expect(session().dialog).toBe("caution");
	});
	test("events stand where they happen", () => {
		const texts = [...draw(<TimeRule />).querySelectorAll(".event text")].map((t) => textOf(t));
		expect(texts).toEqual(["release ", "lands 0.81 s"]);
	});
	test("less motion: Eyepoint has no play button, and says why", () => {
		useSession.setState({ reducedMotion: true });
		const host = draw(<TimeRule />);
		expect(() => named("button", "Play")).toThrow("0 elements");
		expect(textOf(host)).toContain("Less motion is asked for: scrub or step.");
		act(() => useSession.setState({ view: "external" }));
		expect(named("button", "Play")).toBeTruthy();
	});
	test("nothing moves until asked", () => {
		draw(<TimeRule />);
		expect(session().playing).toBe(false);
	});
});

describe("findings", () => {
	test("by force, outside first, unverified marked and left out of the counts", () => {
		const host = draw(<Findings />);
		const groups = [...host.querySelectorAll("details")];
		expect(groups.map((g) => textOf(g.querySelector("summary b")))).toEqual(["Should", "Information"]);
		const rows = [...(groups[0]?.querySelectorAll("li") ?? [])];
		expect(textOf(rows[0]?.querySelector(".word") ?? null)).toBe("outside");
		const unverified = useDocument.getState().assessed.findings.filter((f) => f.basis === "unverified" && f.force === "should");
		expect(unverified.length).toBeGreaterThan(0);
		expect(textOf(groups[0]?.querySelector("summary") ?? null)).toContain(`${unverified.length} unverified, not counted`);
		expect(rows.filter((r) => textOf(r).includes("unverified, confirm"))).toHaveLength(unverified.length);
	});
	test("every finding has its row", () => {
		expect(draw(<Findings />).querySelectorAll("li.finding")).toHaveLength(useDocument.getState().assessed.findings.length);
	});
	test("choosing one goes to its case and moment", () => {
		const host = draw(<Findings />);
		act(() => setTime(0));
		const toss = [...host.querySelectorAll<HTMLElement>("li.finding.outside button")].find((b) =>
			textOf(b).includes("Toss pouch"),
		) as HTMLElement;
		click(toss);
		expect(session().selected?.activity).toBe("toss-pouch");
		expect(transient.time).toBe(transient.duration);
		expect(toss.getAttribute("aria-pressed")).toBe("true");
	});
	test("bar and limit print both ends and the limit", () => {
		const bar = [...draw(<Findings />).querySelectorAll("li.finding")]
			.find((li) => textOf(li).includes("impact energy"))
			?.querySelector(".ends");
		expect([...(bar?.children ?? [])].map((e) => textOf(e))).toEqual(["0", "40.0", "50"]);
	});
});

describe("header, words and refusals", () => {
	test("title, rate, levels; the dirty mark in the title", () => {
		const host = draw(<Header />);
		expect(textOf(host.querySelector(".levels"))).toBe("3.60 rpm nominal0.493 g Cargo deck0.452 g Crew deck");
		expect(document.title).toBe("Larkspur cargo ring, segment C – Offplumb");
		act(() => void change({ label: "Set title", kind: "set", path: ["title"], value: "Other" }));
		expect(document.title).toBe("• Other – Offplumb");
	});
	test("the picture's facts stand as text", () => {
		const text = textOf(draw(<InWords />));
		expect(text).toContain("Crew member tall, 1.95 m tall, stands on the Cargo deck, facing with spin.");
		expect(text).toContain("Outside (should):");
	});
	test("a broken file lists every problem, and the layout stays", async () => {
		const host = draw(<Refused />);
		const before = useDocument.getState().layout;
		const file = new File([`{"format":"offplumb-layout","version":1,"title":"x","habitat":{"spin":{"rate_rpmm":3}}}`], "bad.layout.json");
		await act(() => openFile(file));
		expect(useDocument.getState().layout).toBe(before);
		expect(textOf(host.querySelector("h2"))).toMatch(/^bad\.layout\.json was not opened: \d+ problems$/);
		expect(textOf(host)).toContain("habitat.spin.rate_rpmm");
		expect(textOf(host)).toContain("nearest: rate_rpm");
		click(named("button", "Close the list of problems"));
		expect(host.textContent).toBe("");
	});
});
