// @vitest-environment jsdom
import { act } from "react";
import { beforeEach, describe, expect, test } from "vitest";
import { NumberField } from "../../../app/panel/NumberField.tsx";
import { SESSION_START, useSession } from "../../../app/store/session.ts";
import { QUANTITY } from "../../../src/layout/quantities.ts";
import { draw, named, press, textOf, type } from "../../support/page.tsx";

const taken: number[] = [];
let problems: { path: string; value: string; expected: string }[] = [];
beforeEach(() => {
	taken.length = 0;
	problems = [];
	useSession.setState(SESSION_START, true);
});

function field(
	value: number,
	range: (typeof QUANTITY)[keyof typeof QUANTITY] = QUANTITY.rate,
	step = 0.1,
	label = "Spin rate",
): HTMLInputElement {
	const commit = (v: number) => {
		taken.push(v);
		return problems;
	};
	draw(<NumberField label={label} value={value} range={range} step={step} commit={commit} />);
	return named("spinbutton", label) as HTMLInputElement;
}
const alert = (): string => textOf(document.querySelector("[role=alert]"));

describe("a number field", () => {
	test("shows the number of the file and says unit and range", () => {
		const input = field(3.6);
		expect(input.value).toBe("3.6");
		expect(textOf(input.parentElement)).toBe("rpm");
		expect(["aria-valuenow", "aria-valuemin", "aria-valuemax"].map((a) => input.getAttribute(a))).toEqual(["3.6", "0", "60"]);
		expect(input.getAttribute("aria-valuetext")).toBe("3.6\u00A0rpm");
	});
	test.each([
		["ArrowUp", 3.7],
		["ArrowDown", 3.5],
		["PageUp", 4.6],
		["PageDown", 2.6],
	])("%s", (key, value) => {
		expect(press(field(3.6), key).defaultPrevented).toBe(true);
		expect(taken).toEqual([value]);
	});
	test("arrows end at the range", () => {
		press(field(0.05), "ArrowDown");
		expect(taken).toEqual([0]);
	});
	test.each([
		["4", 4],
		["4 rpm", 4],
		["24 °/s", 4],
		["−0", 0],
	])("%s typed is taken at Enter", (text, value) => {
		const input = field(3.6);
		type(input, text);
		expect(taken).toEqual([]);
		press(input, "Enter");
		expect(taken).toEqual([value]);
	});
	test("feet and inches into a field in metres", () => {
		const input = field(1.5, QUANTITY.size, 0.05, "Height");
		type(input, "6 ft 2 in");
		press(input, "Enter");
		expect(taken).toEqual([1.8796]);
	});
	test("what was typed is taken when the focus leaves", () => {
		const input = field(3.6);
		act(() => input.focus());
		type(input, "5");
		act(() => input.blur());
		expect(taken).toEqual([5]);
	});
	test("Esc puts the value back", () => {
		const input = field(3.6);
		type(input, "99");
		press(input, "Enter");
		expect(alert()).not.toBe("");
		press(input, "Escape");
		expect([input.value, alert(), taken]).toEqual(["3.6", "", []]);
	});
	test("out of range: field, value and range are named, what was typed stays, nothing is taken", () => {
		const input = field(3.6);
		type(input, "72");
		press(input, "Enter");
		expect(alert()).toBe("Spin rate: 72 rpm is outside 0 rpm to 60 rpm.");
		expect([input.value, input.getAttribute("aria-invalid"), taken]).toEqual(["72", "true", []]);
		expect(document.getElementById(input.getAttribute("aria-describedby") ?? "")?.textContent).toContain("Spin rate");
	});
	test("a bound that is itself refused", () => {
		const input = field(1, QUANTITY.climbSpeed, 0.1, "Speed");
		type(input, "0");
		press(input, "Enter");
		expect(alert()).toBe("Speed: 0 m/s is outside above 0 m/s to 50 m/s.");
	});
	test.each([
		["", "a number is missing"],
		["fast", "“fast” is not a number"],
		["3 kg", "“kg” is no unit of rotation; known are rad/s, rpm, °/s"],
		["1,5", "“1,5” can be read in more than one way"],
	])("“%s” is refused: %s", (text, reason) => {
		const input = field(3.6);
		type(input, text);
		press(input, "Enter");
		expect(alert()).toContain(`Spin rate: ${reason}`);
		expect(taken).toEqual([]);
	});
	test("what the layout forbids is said with its path", () => {
		problems = [{ path: "activities[0].from.height_m", value: "3", expected: "a number from 0.03 to 2.37 m" }];
		const input = field(1.5, QUANTITY.size, 0.05, "Height");
		type(input, "3");
		press(input, "Enter");
		expect(alert()).toBe("Height: activities[0].from.height_m would be 3, expected a number from 0.03 to 2.37 m.");
	});
	test("in customary units: shown, stepped and typed in feet, kept in metres to the last digit", () => {
		useSession.setState({ units: "us" });
		const input = field(1.5, QUANTITY.size, 0.05, "Height");
		expect(input.value).toBe("4.9213");
		press(input, "Enter");
		expect(taken).toEqual([]);
		press(input, "ArrowUp");
		expect(taken[0]).toBeCloseTo(1.5 + 0.2 * 0.3048, 8);
		type(input, "5");
		press(input, "Enter");
		expect(taken[1]).toBe(1.524);
	});
});
