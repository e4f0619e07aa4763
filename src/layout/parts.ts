import * as z from "zod/mini";
import { activity } from "./activity.ts";
import { element } from "./element.ts";
import { below } from "./problem.ts";
import {
	type ActivityFile,
	type AssumptionOverrides,
	assumptions,
	type CrewMember,
	type CriterionOwn,
	crewMember,
	type DeckFile,
	deck,
	type ElementFile,
	type LayoutFile,
	ownCriterion,
	type PhaseFile,
	phase,
	type SpinFile,
	spin,
	type Tailoring,
	tailoring,
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

type Read = <T>(schema: z.core.$ZodType<T>, value: unknown) => T | undefined;

const get = (value: unknown, key: string): unknown =>
	typeof value === "object" && value !== null && Object.hasOwn(value, key) ? (value as Record<string, unknown>)[key] : undefined;

function listOf<T>(read: Read, schema: z.core.$ZodType<T>, list: unknown, path: string): Parts<T> {
	const entries: Part<T>[] = [];
	const ids: Part<string>[] = [];
	const byId = new Map<string, T>();
	for (const [i, item] of (Array.isArray(list) ? list : []).entries()) {
		const value = read(schema, item);
		if (value !== undefined) entries.push({ path: below(path, i), value });
		const id = get(item, "id");
		if (typeof id !== "string") continue;
		ids.push({ path: below(below(path, i), "id"), value: id });
		if (value !== undefined && !byId.has(id)) byId.set(id, value);
	}
	const present = list === undefined || Array.isArray(list);
	const whole = present && (list === undefined || entries.length === list.length);
	return { path, entries, ids, known: new Set(ids.map((i) => i.value)), byId, whole, present };
}

const stringsOf = (list: unknown, path: string): Part<string>[] =>
	Array.isArray(list) ? list.flatMap((value, i) => (typeof value === "string" ? [{ path: below(path, i), value }] : [])) : [];

function parts(file: unknown, read: Read): LayoutParts {
	const habitat = get(file, "habitat");
	const criteria = get(file, "criteria");
	const spinRead = read(spin, get(habitat, "spin"));
	const overrides = get(file, "assumptions");
	return {
		spin: spinRead === undefined ? null : { path: "habitat.spin", value: spinRead },
		phases: listOf(read, phase, get(habitat, "phases"), "habitat.phases"),
		decks: listOf(read, deck, get(habitat, "decks"), "habitat.decks"),
		elements: listOf<ElementFile>(read, element, get(file, "elements"), "elements"),
		crew: listOf(read, crewMember, get(file, "crew"), "crew"),
		activities: listOf<ActivityFile>(read, activity, get(file, "activities"), "activities"),
		use: stringsOf(get(criteria, "use"), "criteria.use"),
		own: listOf(read, ownCriterion, get(criteria, "own"), "criteria.own"),
		tailor: listOf(read, tailoring, get(criteria, "tailor"), "criteria.tailor"),
		assumptions: overrides === undefined ? {} : (read(assumptions, overrides) ?? null),
	};
}

/** The parts of a layout that the schema has accepted. */
export const partsOf = (layout: LayoutFile): LayoutParts =>
	parts(layout, <T>(_: z.core.$ZodType<T>, value: unknown) => value as T | undefined);

/** The readable parts of a file that the schema has refused. */
export const readParts = (file: unknown): LayoutParts => parts(file, (schema, value) => z.safeParse(schema, value).data);
