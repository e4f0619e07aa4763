import { describe, expect, test } from "vitest";
import { decodeLayout, MOST_PROBLEMS, parseLayout, validateLayout } from "../../src/layout/parse.ts";
import { problemLine } from "../../src/layout/problem.ts";
import { MOST_BYTES } from "../../src/layout/scan.ts";
import { changed, damaged, larkspurText, pathsOf, problemsOf, shipped, whole } from "./support.ts";

describe("shipped layouts", () => {
	test("are the three that the contract asks for", () => {
		expect(shipped.map((s) => s.file).sort()).toEqual(["great-ring.layout.json", "larkspur.layout.json", "twin-arm.layout.json"]);
	});
	test.each(shipped)("$file is read", ({ text }) => {
		const layout = whole(parseLayout(text));
		expect(new Set(layout.activities.map((a) => a.kind)).size).toBe(8);
		expect(new Set(layout.elements?.map((e) => e.kind)).size).toBe(4);
	});
});

describe("a key that nothing knows", () => {
	test.each<[string, (l: ReturnType<typeof JSON.parse>) => void, string, string]>([
		["a unit left out", (l) => (l.habitat.decks[1].radius = 31), "habitat.decks[1].radius", "radius_m"],
		["a letter wrong", (l) => (l.habitat.air.presure_kPa = 70), "habitat.air.presure_kPa", "pressure_kPa"],
		["at the root", (l) => (l.element = []), "element", "elements"],
		["in an activity", (l) => (l.activities[0].form = 1), "activities[0].form", "from"],
		["deep in one", (l) => (l.activities[0].object.drag_coef = 1), "activities[0].object.drag_coef", "drag_coefficient"],
		["of another kind", (l) => (l.elements[0].deck = "lower"), "elements[0].deck", "id"],
		["of the other shape", (l) => (l.elements[1].diameter_m = 1), "elements[1].diameter_m", "id"],
	])("%s is refused with its path and the nearest known one", (_, damage, path, nearest) => {
		const [problem, ...rest] = damaged(damage);
		expect(rest).toEqual([]);
		expect(problem?.path).toBe(path);
		if (nearest !== "id") expect(problem?.nearest).toBe(nearest);
		expect(problem?.expected).toMatch(/^no such key; known here: /);
	});

	test.each(["__proto__", "constructor", "prototype", "toString"])("%s is refused at any depth and pollutes nothing", (key) => {
		const inject = `"${key}": { "polluted": true }`;
		const places: [string, string, string][] = [
			['"format"', `${inject}, "format"`, key],
			['"spin": {', `"spin": { ${inject},`, `habitat.spin.${key}`],
			['"id": "drop-driver"', `${inject}, "id": "drop-driver"`, `activities[0].${key}`],
			['"mass_kg": 0.4', `${inject}, "mass_kg": 0.4`, `activities[0].object.${key}`],
		];
		for (const [at, instead, path] of places) {
			const text = larkspurText.replace(at, instead);
			expect(pathsOf(problemsOf(parseLayout(text)))).toEqual([path]);
		}
		expect(({} as Record<string, unknown>).polluted).toBeUndefined();
	});
});

describe("a value that is not what its place wants", () => {
	test.each<[string, (l: ReturnType<typeof JSON.parse>) => void, string]>([
		["a word for a number", (l) => (l.habitat.spin.rate_rpm = "3.6"), 'habitat.spin.rate_rpm: "3.6", expected a number from 0 to 60 rpm'],
		["a negative rate", (l) => (l.habitat.spin.rate_rpm = -1), "habitat.spin.rate_rpm: -1, expected a number from 0 to 60 rpm"],
		["null", (l) => (l.crew[0].mass_kg = null), "crew[0].mass_kg: null, expected a number from 0.000001 to 1000000 kg"],
		["no mass", (l) => (l.crew[0].mass_kg = 0), "crew[0].mass_kg: 0, expected a number from 0.000001 to 1000000 kg"],
		["a missing key", (l) => delete l.crew[0].mass_kg, "crew[0].mass_kg: missing, expected a number from 0.000001 to 1000000 kg"],
		[
			"a climb that stands still",
			(l) => (l.activities[3].speed_mps = 0),
			"activities[3].speed_mps: 0, expected a number above 0 and at most 50 m/s",
		],
		["a word of its own", (l) => (l.habitat.decks[0].floor = "round"), 'habitat.decks[0].floor: "round", expected one of curved, flat'],
		[
			"an unknown kind",
			(l) => (l.elements[0].kind = "stair"),
			'elements[0].kind: "stair", expected one of ladder, hatch, window, workstation',
		],
		[
			"an unknown surface",
			(l) => (l.elements[2].surface = "wall"),
			'elements[2].surface: "wall", expected one of floor, ceiling, end-low, end-high, side-low, side-high',
		],
		["an unknown shape", (l) => (l.elements[1].shape = "oval"), 'elements[1].shape: "oval", expected one of rectangle, circle'],
		["an object for a list", (l) => (l.crew = {}), "crew: an object, expected a list"],
		["a list for an object", (l) => (l.habitat.air = []), "habitat.air: an empty list, expected an object"],
		["no deck at all", (l) => (l.habitat.decks = []), "habitat.decks: an empty list, expected at least one deck"],
		["no crew in an activity", (l) => (l.activities[0].crew = []), "activities[0].crew: an empty list, expected at least one of them"],
		[
			"a number among crew ids",
			(l) => (l.activities[0].crew = ["tall", 3]),
			"activities[0].crew[1]: 3, expected an id: 1 to 100 characters without control characters",
		],
		["another format", (l) => (l.format = "layout"), 'format: "layout", expected offplumb-layout'],
		["an older version than any", (l) => (l.version = 0), "version: 0, expected 1"],
		["a version in words", (l) => (l.version = "1"), 'version: "1", expected 1'],
		[
			"a window on a side with an angle's key missing",
			(l) => delete l.elements[3].height_m,
			"elements[3].height_m: missing, expected a number from 0 to 100 m",
		],
	])("%s", (_, damage, line) => expect(damaged(damage).map(problemLine).slice(0, 1)).toEqual([line]));

	test.each([
		["rate_rpm", "60.000001"],
		["pressure_kPa", "200.1"],
		["temperature_C", "-50.5"],
		["temperature_C", "60.5"],
		["oxygen_fraction", "1.01"],
		["radius_m", "0.49"],
		["radius_m", "10000.1"],
		["speed_mps", "50.1"],
		["drag_coefficient", "10.1"],
		["diameter_m", "-0.01"],
		["duration_s", "0.009"],
		["duration_s", "86401"],
		["headroom_m", "100.1"],
		["to_rpm", "60.1"],
		["height_m", "1e999"],
	])("%s at %s is out of range", (key, value) => {
		const text = larkspurText.replace(new RegExp(`"${key}": [-\\d.]+`), `"${key}": ${value}`);
		expect(text).not.toBe(larkspurText);
		const problems = problemsOf(parseLayout(text));
		expect(problems[0]?.path).toMatch(new RegExp(`${key}$`));
		expect(problems[0]?.expected).toMatch(/^a number from .* to .*/);
	});

	test.each<[string, (l: ReturnType<typeof JSON.parse>) => void]>([
		["rates of 0 and 60 rpm", (l) => Object.assign(l.habitat, { spin: { rate_rpm: 0 }, phases: [{ id: "reduced", rate_rpm: 60 }] })],
		["vacuum at −50 °C", (l) => (l.habitat.air = { pressure_kPa: 0, temperature_C: -50, oxygen_fraction: 0 })],
		["a point mass in still air", (l) => (l.activities[0].object = { mass_kg: 1e-6, diameter_m: 0, drag_coefficient: 0 })],
		[
			"speeds of 0 and 50 m/s",
			(l) => [Object.assign(l.activities[1].release, { speed_mps: 50 }), Object.assign(l.activities[2], { speed_mps: 0 })],
		],
		["a level above 3 g", (l) => (l.habitat.spin.rate_rpm = 30)],
		[
			"no elements and nothing that needs one",
			(l) => {
				delete l.elements;
				l.activities.splice(7, 1);
				l.activities.splice(3, 1);
			},
		],
		[
			"no optional key at all",
			(l) => {
				delete l.habitat.phases;
				delete l.habitat.decks[0].walkways;
				delete l.activities[0].feet;
				delete l.activities[1].release;
				delete l.activities[2].start_mps2;
				for (const key of ["phase", "load_kg", "task"]) delete l.activities[3][key];
				delete l.activities[5].load_kg;
				delete l.criteria.own;
				delete l.criteria.tailor;
			},
		],
	])("%s are within range", (_, change) => expect(changed(change).format).toBe("offplumb-layout"));
});

test("every problem of a file is told at once, schema and geometry alike, also where a word that tells kinds apart is wrong", () => {
	const problems = damaged((l) => {
		l.habitat.spin.rate_rpm = 99;
		l.habitat.decks[1].colour = "red";
		l.habitat.decks.push({ ...l.habitat.decks[0], id: "lower", walkways: [] });
		l.elements[0].foot_radius_m = 35;
		l.elements[1].shape = "oval";
		l.elements[1].deck = 7;
		l.elements[2].angle_deg = -15;
		delete l.crew[1].id;
		l.activities[0].crew = "tal";
		l.activities[3].ladder = "ladder-b";
		l.activities[5].kind = "grab";
		l.activities[5].speed = 3;
		l.activities[8].at.deck = "middle";
	});
	expect(pathsOf(problems).sort()).toEqual(
		[
			"activities[0].crew",
			"activities[3].crew[1]",
			"activities[3].ladder",
			"activities[5].kind",
			"activities[5].speed",
			"activities[8].at.deck",
			"crew[1].id",
			"elements[1].deck",
			"elements[1].shape",
			"elements[2].angle_deg",
			"habitat.decks[1].colour",
			"habitat.decks[2].id",
			"habitat.spin.rate_rpm",
		].sort(),
	);
	expect(problems.find((p) => p.path === "activities[0].crew")?.nearest).toBe("tall");
	expect(problems.find((p) => p.path === "activities[3].ladder")).toMatchObject({ value: '"ladder-b"', nearest: "ladder-a" });
});

test("a file of more problems than anyone reads says that it goes on", () => {
	const problems = damaged((l) => (l.elements = new Array(3 * MOST_PROBLEMS).fill(7)));
	expect(problems).toHaveLength(MOST_PROBLEMS + 1);
	expect(problems.at(-1)?.value).toBe(`more than ${MOST_PROBLEMS} problems`);
});

describe("versions", () => {
	test("a newer one is refused by name and nothing else is said", () => {
		const problems = damaged((l) => Object.assign(l, { version: 2, novelty: true }));
		expect(problems.map(problemLine)).toEqual(["version: 2, expected 1 or older: version 2 is newer than this program reads"]);
	});
});

describe("values that are no file", () => {
	test.each([null, 3, "text", [], true, undefined])("%j is refused as a whole", (value) => {
		expect(problemsOf(validateLayout(value))).toMatchObject([{ path: "file", expected: "an object" }]);
	});
});

describe("bytes", () => {
	const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
	test("are read as UTF-8, a byte order mark aside", () => {
		expect(decodeLayout(bytes("\uFEFF{}"))).toEqual({ ok: true, text: "{}" });
		expect(whole(parseLayout(`\uFEFF${larkspurText}`)).title).toBe("Larkspur cargo ring, segment C");
	});
	test("that are not UTF-8 are refused", () => {
		const broken = bytes(larkspurText);
		broken[100] = 0xff;
		expect(decodeLayout(broken)).toMatchObject({ ok: false, problems: [{ path: "file", expected: "a text in UTF-8" }] });
	});
	test("of more than 4 MB are refused", () => {
		expect(decodeLayout(new Uint8Array(MOST_BYTES + 1))).toMatchObject({ ok: false, problems: [{ path: "file" }] });
	});
});

test("minus zero is read as zero", () => {
	const layout = whole(parseLayout(larkspurText.replace('"zero_deg": 0', '"zero_deg": -0')));
	expect(Object.is(layout.habitat.sky.zero_deg, 0)).toBe(true);
});
