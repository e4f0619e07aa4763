import { useSyncExternalStore } from "react";

/** Below this the panels stand below one another; the style sheets use the same width. */
const NARROW = "(max-width: 860px)";

const subscribe = (tell: () => void): (() => void) => {
	const query = matchMedia(NARROW);
	query.addEventListener("change", tell);
	return () => query.removeEventListener("change", tell);
};

export const useNarrow = (): boolean => useSyncExternalStore(subscribe, () => matchMedia(NARROW).matches);
