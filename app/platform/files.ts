import type { FileWithHandle } from "browser-fs-access";
import { decodeLayout } from "../../src/layout/parse.ts";
import { problemLine } from "../../src/layout/problem.ts";
import { newLayout, type Problem, parseLayout, writeLayout } from "../store/core.ts";
import { type FileRef, markSaved, openDocument, refuseFile, useDocument } from "../store/document.ts";
import { say, useSession } from "../store/session.ts";
import { newDocumentId } from "./autosave.ts";

const EXTENSION = ".layout.json";
const DIALOG = { extensions: [".json"], mimeTypes: ["application/json"], description: "Layout file" };

/** The library that opens and saves; not needed for the first picture. */
const library = (): Promise<typeof import("browser-fs-access")> => import("browser-fs-access");

/** Fetches it ahead, so that work can be saved even when the server is gone. Rejects where it already is. */
export const loadFiles = (): Promise<unknown> => library();

const cancelled = (error: unknown): boolean => error instanceof DOMException && error.name === "AbortError";
const reasonOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/** Opens a file on the stage, or lists what is wrong with it while the layout on the stage stays. */
export async function openFile(file: FileWithHandle): Promise<void> {
	const decoded = decodeLayout(new Uint8Array(await file.arrayBuffer()));
	const problems = decoded.ok ? openText(decoded.text, { name: file.name, handle: file.handle ?? null }) : decoded.problems;
	if (problems.length > 0) refuseFile(file.name, problems);
}

/** Opens a layout from its text; returns what is wrong with it, or an empty list where it was opened. */
export function openText(text: string, file: FileRef | null): readonly Problem[] {
	const result = parseLayout(text);
	if (!result.ok) return result.problems;
	const replaced = useDocument.getState();
	openDocument(result.layout, file, newDocumentId());
	useSession.setState({ notice: null });
	if (replaced !== undefined && replaced.layout !== replaced.saved)
		say(`“${replaced.layout.title}” had unsaved changes: it is kept.`, "recover");
	return [];
}

export function openNew(): void {
	const problems = openText(writeLayout(newLayout("New layout")), null);
	if (problems.length > 0) throw new Error(`the new layout is refused: ${problems.map(problemLine).join("; ")}`);
}

export async function pickFile(): Promise<void> {
	try {
		const { fileOpen } = await library();
		await openFile(await fileOpen(DIALOG));
	} catch (error) {
		if (!cancelled(error)) say(`The file could not be read: ${reasonOf(error)}`);
	}
}

export const fileNameFor = (title: string): string =>
	`${
		title
			.normalize("NFKD")
			.replace(/\p{M}/gu, "")
			.toLowerCase()
			.replace(/[^a-z0-9]+/g, "-")
			.replace(/^-+|-+$/g, "")
			.slice(0, 60) || "layout"
	}${EXTENSION}`;

/** Saves to the same file where the browser can, else asks for one or downloads; `anew` always asks. */
export async function saveFile(anew: boolean): Promise<void> {
	const { layout, file } = useDocument.getState();
	const blob = new Blob([writeLayout(layout)], { type: "application/json" });
	const name = file?.name ?? fileNameFor(layout.title);
	try {
		const { fileSave } = await library();
		const handle = await fileSave(blob, { ...DIALOG, fileName: name }, anew ? null : (file?.handle ?? null));
		markSaved(layout, { name: handle?.name ?? name, handle: handle ?? null });
		say(handle ? `Saved to ${handle.name}.` : `Saved as ${name} among the downloads.`);
	} catch (error) {
		if (!cancelled(error)) say(`The layout was not saved: ${reasonOf(error)}`);
	}
}

/** Follows files dragged over the window and opens the one that is dropped. */
export function acceptDrops(over: (inside: boolean) => void): () => void {
	const carriesFile = (e: DragEvent): boolean => e.dataTransfer?.types.includes("Files") ?? false;
	const onOver = (e: DragEvent): void => {
		if (!carriesFile(e)) return;
		e.preventDefault();
		over(true);
	};
	const onLeave = (e: DragEvent): void => {
		if (e.relatedTarget === null) over(false);
	};
	const onDrop = (e: DragEvent): void => {
		if (!carriesFile(e)) return;
		e.preventDefault();
		over(false);
		const file = e.dataTransfer?.files[0];
		if (file) void openFile(file).catch((error: unknown) => say(`The file could not be read: ${reasonOf(error)}`));
	};
	addEventListener("dragover", onOver);
	addEventListener("dragleave", onLeave);
	addEventListener("drop", onDrop);
	return () => {
		removeEventListener("dragover", onOver);
		removeEventListener("dragleave", onLeave);
		removeEventListener("drop", onDrop);
	};
}
