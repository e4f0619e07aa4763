import { openText } from "../../app/platform/files.ts";
import { DEMO, type LayoutFile } from "../../app/store/core.ts";
import { openDocument } from "../../app/store/document.ts";
import { openStory } from "../../app/store/navigate.ts";
import { SESSION_START, useSession } from "../../app/store/session.ts";

/** A fresh session on the shipped demo, as the app starts. */
export function startDemo(): void {
	useSession.setState(SESSION_START, true);
	const problems = openText(DEMO, null);
	if (problems.length > 0) throw new Error(`the demo is refused: ${JSON.stringify(problems)}`);
	openStory();
}

/** A fresh session on a layout. */
export function startWith(layout: LayoutFile): void {
	useSession.setState(SESSION_START, true);
	openDocument(layout, null, "test");
	openStory();
}
