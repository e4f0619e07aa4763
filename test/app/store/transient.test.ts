import { beforeEach, describe, expect, test } from "vitest";
import { SESSION_START, useSession } from "../../../app/store/session.ts";
import { advance, LONGEST_FRAME, onTime, setMotion, setTime, transient } from "../../../app/store/transient.ts";

beforeEach(() => {
	useSession.setState(SESSION_START, true);
	setMotion(1, 0);
});

describe("the clock", () => {
	test("stands while nothing plays", () => {
		expect(advance(0.05)).toBe(false);
		expect(transient.time).toBe(0);
	});
	test.each([1 / 8, 1, 16])("runs at %d times the real second", (speed) => {
		useSession.setState({ playing: true, speed });
		setMotion(100, 0);
		expect(advance(0.05)).toBe(true);
		expect(transient.time).toBeCloseTo(0.05 * speed, 12);
	});
	test("takes no more of a long pause than one long frame", () => {
		useSession.setState({ playing: true });
		setMotion(100, 0);
		advance(60);
		expect(transient.time).toBe(LONGEST_FRAME);
	});
	test("never runs backwards on a negative frame", () => {
		useSession.setState({ playing: true });
		setTime(0.5);
		advance(-1);
		expect(transient.time).toBe(0.5);
	});
	test("stops at the end, exactly", () => {
		useSession.setState({ playing: true });
		setTime(0.96);
		expect(advance(0.1)).toBe(false);
		expect(transient.time).toBe(1);
		expect(useSession.getState().playing).toBe(false);
	});
	test("keeps within the motion, refuses what is no time", () => {
		setTime(9);
		expect(transient.time).toBe(1);
		setTime(-9);
		expect(transient.time).toBe(0);
		expect(() => setTime(Number.NaN)).toThrow("got NaN");
		expect(() => setMotion(-1, 0)).toThrow("got -1");
	});
	test("tells listeners at once, on every change and no longer than asked", () => {
		const heard: number[] = [];
		const stop = onTime((t) => heard.push(t));
		setTime(0.5);
		setTime(0.5);
		setMotion(2, 1.5);
		stop();
		setTime(0.1);
		expect(heard).toEqual([0, 0.5, 1.5]);
	});
});
