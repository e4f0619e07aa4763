import { createRoot } from "react-dom/client";
import { App } from "./App.tsx";
import { loadDialogs } from "./panel/Dialogs.tsx";
import { startAutosave } from "./platform/autosave.ts";
import { loadFiles, openText } from "./platform/files.ts";
import { loadStars } from "./platform/stars.ts";
import { keepPreferences } from "./platform/storage.ts";
import { DEMO } from "./store/core.ts";
import { followDocument, openStory } from "./store/navigate.ts";
import { say } from "./store/session.ts";
import "./style/app.css";

/** From the first picture to fetching what it did not need, ms. */
const AHEAD_MS = 1500;

const problems = openText(DEMO, null);
if (problems.length > 0)
	throw new Error(`the demo layout is refused: ${problems.map((p) => `${p.path}: expected ${p.expected}`).join("; ")}`);
keepPreferences();
openStory();
followDocument();
startAutosave();
void loadStars();

const root = document.getElementById("root");
if (!root) throw new Error("the page has no element #root");
createRoot(root).render(<App />);

setTimeout(() => {
	Promise.all([loadDialogs(), loadFiles()]).catch((error: unknown) =>
		say(`A part of the page could not be fetched ahead: ${error instanceof Error ? error.message : error}.`),
	);
}, AHEAD_MS);
