import type { Accepted } from "./explain.ts";
import { below } from "./problem.ts";
import type {
	ActivityFile,
	AssumptionOverrides,
	CrewMember,
	CriterionOwn,
	DeckFile,
	ElementFile,
	LayoutFile,
	PhaseFile,
	SpinFile,
	Tailoring,
} from "./schema.ts";

/** One readable entry of a list and its path. */
export interface Part<T> {
	readonly path: string;
	readonly value: T;
}

/** A list of the file: its readable entries, and every id that stands in it, also in the entries that are not. */
export interface Parts<T> {
	readonly path: string;
	readonly entries: readonly Part<T>[];
	readonly ids: readonly Part<string>[];
	readonly known: ReadonlySet<string>;
	/** The first readable entry of an id. */
	readonly byId: ReadonlyMap<string, T>;
	/** Whether every entry could be read. */
	readonly whole: boolean;
	/** Whether it is a list at all: if not, nothing that refers to it can be judged. */
	readonly present: boolean;
}

/** What can be read of a layout file, for the checks that hold one part against another. */
export interface LayoutParts {
	readonly spin: Part<SpinFile> | null;
	readonly phases: Parts<PhaseFile>;
	readonly decks: Parts<DeckFile>;
	readonly elements: Parts<ElementFile>;
	readonly crew: Parts<CrewMember>;
	readonly activities: Parts<ActivityFile>;
	readonly use: readonly Part<string>[];
	readonly own: Parts<CriterionOwn>;
	readonly tailor: Parts<Tailoring>;
	/** Null where they stand but cannot be read. */
	readonly assumptions: AssumptionOverrides | null;
}

/** Whether what stands at the first path may be taken for what its place wants; the others are those it lies in. */
type Trust = (...paths: readonly string[]) => boolean;

const get = (value: unknown, key: string): unknown =>
	typeof value === "object" && value !== null && Object.hasOwn(value, key) ? (value as Record<string, unknown>)[key] : undefined;

function listOf<T>(trust: Trust, holder: unknown, within: string, key: string): Parts<T> {
	const list = get(holder, key);
	const path = below(within, key);
	const items: readonly unknown[] = Array.isArray(list) ? list : [];
	const entries: Part<T>[] = [];
	const ids: Part<string>[] = [];
	const byId = new Map<string, T>();
	for (const [i, item] of items.entries()) {
		const at = below(path, i);
		const readable = trust(at, path, within);
		if (readable) entries.push({ path: at, value: item as T });
		const id = get(item, "id");
		if (typeof id !== "string") continue;
		ids.push({ path: below(at, "id"), value: id });
		if (readable && !byId.has(id)) byId.set(id, item as T);
	}
	const present = list === undefined || Array.isArray(list);
	return { path, entries, ids, known: new Set(ids.map((i) => i.value)), byId, whole: present && entries.length === items.length, present };
}

const stringsOf = (list: unknown, path: string): Part<string>[] =>
	Array.isArray(list) ? list.flatMap((value, i) => (typeof value === "string" ? [{ path: below(path, i), value }] : [])) : [];

function parts(file: unknown, trust: Trust): LayoutParts {
	const habitat = get(file, "habitat");
	const criteria = get(file, "criteria");
	const spin = get(habitat, "spin");
	const assumptions = get(file, "assumptions") ?? {};
	return {
		spin: trust("habitat.spin", "habitat") ? { path: "habitat.spin", value: spin as SpinFile } : null,
		phases: listOf(trust, habitat, "habitat", "phases"),
		decks: listOf(trust, habitat, "habitat", "decks"),
		elements: listOf(trust, file, "", "elements"),
		crew: listOf(trust, file, "", "crew"),
		activities: listOf(trust, file, "", "activities"),
		use: stringsOf(get(criteria, "use"), "criteria.use"),
		own: listOf(trust, criteria, "criteria", "own"),
		tailor: listOf(trust, criteria, "criteria", "tailor"),
		assumptions: get(file, "assumptions") === undefined || trust("assumptions") ? (assumptions as AssumptionOverrides) : null,
	};
}

/** The parts of a layout that the schema has accepted. */
export const partsOf = (layout: LayoutFile): LayoutParts => parts(layout, () => true);

/** The readable parts of a file that has been explained to the end. */
export const acceptedParts = (file: unknown, accepted: Accepted): LayoutParts =>
	parts(file, (...paths) => paths.some((p) => accepted.has(p)));
