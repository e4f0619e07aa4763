import type { DBSchema, IDBPDatabase } from "idb";
import { writeLayout } from "../store/core.ts";
import { type DocumentState, isDirty, useDocument } from "../store/document.ts";
import { say } from "../store/session.ts";

/** A copy of a document as last edited. `saved` says that the same content also went to a file. */
export interface KeptCopy {
	readonly id: string;
	readonly title: string;
	readonly file: string | null;
	/** ms since 1970. */
	readonly at: number;
	readonly text: string;
	readonly saved: boolean;
}

interface Schema extends DBSchema {
	copies: { key: string; value: KeptCopy; indexes: { at: number } };
}

const MOST_COPIES = 20;
const PAUSE_MS = 800;

let opening: Promise<IDBPDatabase<Schema>> | undefined;
const database = (): Promise<IDBPDatabase<Schema>> => {
	opening ??= import("idb").then(({ openDB }) =>
		openDB<Schema>("offplumb", 1, {
			upgrade: (db) => {
				db.createObjectStore("copies", { keyPath: "id" }).createIndex("at", "at");
			},
		}),
	);
	return opening;
};

export const newDocumentId = (): string => crypto.randomUUID();

/** Kept copies, newest first. */
export async function keptCopies(): Promise<KeptCopy[]> {
	return (await (await database()).getAllFromIndex("copies", "at")).reverse();
}

export async function forgetCopy(id: string): Promise<void> {
	await (await database()).delete("copies", id);
}

async function keep(copy: KeptCopy): Promise<void> {
	const tx = (await database()).transaction("copies", "readwrite");
	await tx.store.put(copy);
	const keys = await tx.store.index("at").getAllKeys();
	for (const key of keys.slice(0, Math.max(0, keys.length - MOST_COPIES))) await tx.store.delete(key);
	await tx.done;
}

const copyOf = (s: DocumentState): KeptCopy => ({
	id: s.id,
	title: s.layout.title,
	file: s.file?.name ?? null,
	at: Date.now(),
	text: writeLayout(s.layout),
	saved: !isDirty(s),
});

/**
 * Keeps the document in this browser a moment after each edit, and at once when the page is hidden or another is
 * opened; asks before leaving only while something is unsaved. Tells of unsaved work left by an earlier visit.
 */
export function startAutosave(): () => void {
	let timer: ReturnType<typeof setTimeout> | undefined;
	let told = false;
	const write = (s: DocumentState): void => {
		clearTimeout(timer);
		timer = undefined;
		keep(copyOf(s)).catch((error: unknown) => {
			if (!told) say(`This browser keeps no copy of your work (${error instanceof Error ? error.message : error}). Save it to a file.`);
			told = true;
		});
	};
	const stop = useDocument.subscribe((now, before) => {
		if (now.id !== before.id) {
			if (timer !== undefined) write(before);
		} else if (now.layout !== before.layout || now.saved !== before.saved) {
			clearTimeout(timer);
			timer = setTimeout(() => write(useDocument.getState()), PAUSE_MS);
		}
	});
	const onHide = (): void => {
		if (document.visibilityState === "hidden" && timer !== undefined) write(useDocument.getState());
	};
	const onLeave = (e: BeforeUnloadEvent): void => {
		if (isDirty(useDocument.getState())) e.preventDefault();
	};
	document.addEventListener("visibilitychange", onHide);
	addEventListener("beforeunload", onLeave);
	keptCopies().then(
		([newest]) => {
			if (newest && !newest.saved) say(`Unsaved work from an earlier visit is kept: “${newest.title}”.`, "recover");
		},
		() => {
			// Told at the first copy that cannot be written.
		},
	);
	return () => {
		clearTimeout(timer);
		stop();
		document.removeEventListener("visibilitychange", onHide);
		removeEventListener("beforeunload", onLeave);
	};
}
