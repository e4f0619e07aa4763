/** The nearest of 1, 2 or 5 times a power of ten, for a step a person counts in. Throws RangeError unless `about` is finite and above 0. */
export function roundStep(about: number): number {
	if (!(about > 0 && Number.isFinite(about))) throw new RangeError(`a step must be finite and above 0, got ${about}`);
	const power = Math.floor(Math.log10(about));
	const share = about / 10 ** power;
	const digit = share < 1.5 ? 1 : share < 3.5 ? 2 : share < 7.5 ? 5 : 10;
	return Number(`${digit}e${power}`);
}
