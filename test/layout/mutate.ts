/** Seeded damage to JSON values, as a careless hand, a broken program or a hostile one would do. */

export type Random = () => number;

/** mulberry32: 32-bit state, uniform on [0, 1). */
export function seeded(seed: number): Random {
	let state = seed >>> 0;
	return () => {
		state = (state + 0x6d2b79f5) >>> 0;
		let t = state;
		t = Math.imul(t ^ (t >>> 15), t | 1);
		t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
		return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
	};
}

export const pick = <T>(random: Random, items: readonly T[]): T => items[Math.floor(random() * items.length)] as T;

type Json = null | boolean | number | string | Json[] | { [key: string]: Json };
type Holder = { [key: string | number]: Json };

interface Slot {
	readonly holder: Holder;
	readonly key: string | number;
}

const entriesOf = (holder: object): [string | number, Json][] =>
	Array.isArray(holder) ? [...holder.entries()] : (Object.entries(holder) as [string, Json][]);

/** Every place in a document that holds a value. */
export function slots(value: Json, into: Slot[] = []): Slot[] {
	if (typeof value !== "object" || value === null) return into;
	for (const [key, item] of entriesOf(value)) {
		into.push({ holder: value as Holder, key });
		slots(item, into);
	}
	return into;
}

/** Sets an own key, also one that plain assignment would take for the prototype. */
const put = (holder: Holder, key: string | number, value: Json): void => {
	Object.defineProperty(holder, key, { value, writable: true, enumerable: true, configurable: true });
};

const NUMBERS = [
	0, -0, 1, -1, 0.5, 1e-9, -1e-9, 1e-300, 5e-324, 1e9, 1e15, 1e300, -1e300, 1.7976931348623157e308, 359, 360, 361, 720, 36_000, 180, 0.01,
	99.999,
];
const STRINGS = [
	"",
	" ",
	"NaN",
	"Infinity",
	"1e999",
	"null",
	"lower",
	"nominal",
	"tall",
	"__proto__",
	"constructor",
	"\u0000",
	"\ud800",
	"a".repeat(200),
	"😀",
];
const KEYS = [
	"__proto__",
	"constructor",
	"prototype",
	"toString",
	"hasOwnProperty",
	"id",
	"kind",
	"radius",
	"angle_deg",
	"extra",
	"",
	"0",
	"a b",
];

const clone = (value: Json): Json => (value === undefined ? null : (JSON.parse(JSON.stringify(value)) as Json));

function nested(random: Random): Json {
	let value: Json = pick(random, NUMBERS);
	for (let depth = Math.floor(random() * 40); depth > 0; depth--) value = random() < 0.5 ? [value] : { k: value };
	return value;
}

const MUTATIONS: readonly ((random: Random, all: readonly Slot[]) => void)[] = [
	// A key or an entry is gone.
	(random, all) => {
		const { holder, key } = pick(random, all);
		if (Array.isArray(holder)) holder.splice(key as number, 1);
		else delete holder[key];
	},
	// An entry stands twice, or a key under another name too.
	(random, all) => {
		const { holder, key } = pick(random, all);
		const copy = clone(holder[key] as Json);
		if (Array.isArray(holder)) holder.splice(key as number, 0, copy);
		else put(holder, `${key}${pick(random, ["", "_", "2", "s"])}`, copy);
	},
	(random, all) => {
		const { holder, key } = pick(random, all);
		put(holder, key, pick<Json>(random, [null, true, false, [], {}, "x", 1, [[]], [null], { id: "lower" }]));
	},
	(random, all) => {
		const { holder, key } = pick(
			random,
			all.filter((s) => typeof s.holder[s.key] === "number"),
		);
		put(holder, key, pick(random, NUMBERS));
	},
	// A number is a little or much off.
	(random, all) => {
		const { holder, key } = pick(
			random,
			all.filter((s) => typeof s.holder[s.key] === "number"),
		);
		put(holder, key, (holder[key] as number) * pick(random, [-1, 0.5, 1.0000001, 1.5, 10, 1e3]) + pick(random, [0, 0, 1e-9, -0.1, 360]));
	},
	(random, all) => {
		const { holder, key } = pick(
			random,
			all.filter((s) => typeof s.holder[s.key] === "string"),
		);
		put(holder, key, pick(random, STRINGS));
	},
	// A key is misspelt.
	(random, all) => {
		const { holder, key } = pick(
			random,
			all.filter((s) => !Array.isArray(s.holder)),
		);
		const value = holder[key] as Json;
		delete holder[key];
		put(holder, `${key}`.slice(0, -1) + pick(random, ["", "x", "_m"]), value);
	},
	(random, all) => put(pick(random, all).holder, pick(random, KEYS), pick<Json>(random, [1, "x", null, {}, { polluted: true }])),
	// A key that is there takes the value of another place.
	(random, all) => {
		const from = pick(random, all);
		const to = pick(random, all);
		put(to.holder, to.key, clone(from.holder[from.key] as Json));
	},
	(random, all) => {
		const { holder, key } = pick(random, all);
		put(holder, key, nested(random));
	},
	// An id is changed or shared.
	(random, all) => {
		const ids = all.filter((s) => s.key === "id");
		const { holder, key } = pick(random, ids);
		put(holder, key, pick<Json>(random, ["other", pick(random, ids).holder.id as Json, "nominal", "__proto__", "toString"]));
	},
	// An object or a list changes places with another.
	(random, all) => {
		const heavy = all.filter((s) => typeof s.holder[s.key] === "object");
		const a = pick(random, heavy);
		const b = pick(random, heavy);
		const [x, y] = [clone(a.holder[a.key] as Json), clone(b.holder[b.key] as Json)];
		put(a.holder, a.key, y);
		put(b.holder, b.key, x);
	},
	(random, all) =>
		put(pick(random, all).holder, pick(random, ["__proto__", "constructor", "prototype"]), { isAdmin: true, id: "lower", polluted: 1 }),
	// A list grows long.
	(random, all) => {
		const lists = all.map((s) => s.holder[s.key]).filter((v): v is Json[] => Array.isArray(v) && v.length > 0);
		if (lists.length === 0) return;
		const list = pick(random, lists);
		for (let i = Math.floor(random() * 40); i > 0; i--) list.push(clone(list[0] as Json));
	},
];

/** A document with one to three mutations. Still JSON. */
export function mutated(random: Random, text: string): string {
	const file = { file: JSON.parse(text) as Json };
	for (let n = random() < 0.7 ? 1 : 2 + Math.floor(random() * 2); n > 0; n--) {
		const all = slots(file);
		const usable = all.length > 1 ? all.slice(1) : all;
		if (usable.some((s) => s.key === "id") && usable.some((s) => typeof s.holder[s.key] === "number"))
			pick(random, MUTATIONS)(random, usable);
	}
	return JSON.stringify(file.file);
}

/** Bytes overwritten, dropped, doubled or cut off. */
export function mutatedBytes(random: Random, bytes: Uint8Array): Uint8Array {
	const out = [...bytes];
	for (let n = 1 + Math.floor(random() * 4); n > 0; n--) {
		const at = Math.floor(random() * out.length);
		const kind = random();
		if (kind < 0.4) out[at] = Math.floor(random() * 256);
		else if (kind < 0.6) out.splice(at, 1 + Math.floor(random() * 8));
		else if (kind < 0.8) out.splice(at, 0, ...out.slice(at, at + 1 + Math.floor(random() * 30)));
		else if (kind < 0.9) out.splice(at, 0, pick(random, [0x22, 0x7b, 0x7d, 0x5b, 0x5d, 0x2c, 0x3a, 0x5c, 0x00, 0xff]));
		else out.length = Math.max(1, at);
	}
	return Uint8Array.from(out);
}
