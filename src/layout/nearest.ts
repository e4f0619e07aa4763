import { distance } from "fastest-levenshtein";

const LONGEST = 64;

/** The known word most like `word` by edit distance; undefined where none shares anything with it. */
export function nearest(word: string, known: Iterable<string>): string | undefined {
	if (word.length > LONGEST) return undefined;
	let found: string | undefined;
	let least = Number.POSITIVE_INFINITY;
	for (const candidate of known) {
		if (candidate.length > LONGEST) continue;
		const d = distance(word, candidate);
		if (d < least && d < Math.max(word.length, candidate.length)) {
			found = candidate;
			least = d;
		}
	}
	return found;
}
