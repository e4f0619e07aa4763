import { useSession } from "../store/session.ts";

/** What sticks between visits: units, the answer to the caution, changed keys. */
const KEY = "offplumb";
type Kept = Pick<ReturnType<typeof useSession.getState>, "units" | "cautionAccepted" | "keymap">;

function read(): Partial<Kept> {
	try {
		const value: unknown = JSON.parse(localStorage.getItem(KEY) ?? "{}");
		if (typeof value !== "object" || value === null) return {};
		const { units, cautionAccepted, keymap } = value as Record<string, unknown>;
		return {
			...(units === "si" || units === "us" ? { units } : {}),
			...(typeof cautionAccepted === "boolean" ? { cautionAccepted } : {}),
			...(typeof keymap === "object" && keymap !== null
				? { keymap: Object.fromEntries(Object.entries(keymap).filter((e): e is [string, string] => typeof e[1] === "string")) }
				: {}),
		};
	} catch {
		// Storage is refused in some private windows, and its text may be another's; the defaults then stand.
		return {};
	}
}

/** Restores what was kept, keeps what changes, and follows the system's wish for less motion. */
export function keepPreferences(): () => void {
	const less = matchMedia("(prefers-reduced-motion: reduce)");
	useSession.setState({ ...read(), reducedMotion: less.matches });
	const follow = (): void => useSession.setState({ reducedMotion: less.matches, ...(less.matches ? { playing: false } : {}) });
	less.addEventListener("change", follow);
	const stop = useSession.subscribe((now, before) => {
		if (now.units === before.units && now.cautionAccepted === before.cautionAccepted && now.keymap === before.keymap) return;
		const kept: Kept = { units: now.units, cautionAccepted: now.cautionAccepted, keymap: now.keymap };
		try {
			localStorage.setItem(KEY, JSON.stringify(kept));
		} catch {
			useSession.setState({ notice: { text: "This browser does not let the page remember settings." } });
		}
	});
	return () => {
		stop();
		less.removeEventListener("change", follow);
	};
}
