/** Gauss–Legendre quadrature with 8 points on −1…1 (Abramowitz & Stegun, table 25.4). */
const HALF = [
	[0.9602898564975363, 0.1012285362903763],
	[0.7966664774136267, 0.2223810344533745],
	[0.525532409916329, 0.3137066458778873],
	[0.1834346424956498, 0.362683783378362],
] as const;

export const ORDER = 8;
const ABSCISSAE = [...HALF.map(([x]) => -x), ...HALF.map(([x]) => x).reverse()];
const WEIGHTS = [...HALF.map(([, w]) => w), ...HALF.map(([, w]) => w).reverse()];

/** The 8 nodes on 0…1. */
export const NODES = Float64Array.from(ABSCISSAE, (x) => 0.5 + 0.5 * x);

function legendre(n: number, x: number): number {
	let [before, p] = [1, x];
	if (n === 0) return before;
	for (let k = 1; k < n; k++) [before, p] = [p, ((2 * k + 1) * x * p - k * before) / (k + 1)];
	return p;
}

/** Row n, column j: the weight of the value at node j in the coefficient of P_n of the polynomial of degree 7 through the nodes. */
export const ANALYSIS = Float64Array.from(
	{ length: ORDER * ORDER },
	(_, i) =>
		((2 * Math.floor(i / ORDER) + 1) / 2) *
		(WEIGHTS[i % ORDER] as number) *
		legendre(Math.floor(i / ORDER), ABSCISSAE[i % ORDER] as number),
);

/** The weights of the highest coefficient, that of P_7. */
export const HIGHEST = ANALYSIS.slice(ORDER * (ORDER - 1));
