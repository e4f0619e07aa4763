import { expect, test } from "vitest";
import { roundStep } from "../../src/quantity/round-step.ts";

test.each([
	[0.00815, 0.01],
	[1.2, 1],
	[0.164, 0.2],
	[3.28, 2],
	[4, 5],
	[9.9, 10],
	[100, 100],
])("a step of about %d is %d", (about, step) => expect(roundStep(about)).toBe(step));

test.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])("%d is refused", (about) =>
	expect(() => roundStep(about)).toThrow(`got ${about}`),
);
