import { createRoot } from "react-dom/client";
import { App } from "./App.tsx";
import { startAutosave } from "./platform/autosave.ts";
import { openText } from "./platform/files.ts";
import { loadStars } from "./platform/stars.ts";
import { keepPreferences } from "./platform/storage.ts";
import { DEMO } from "./store/core.ts";
import { followDocument, openStory } from "./store/navigate.ts";
import "./style/app.css";

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
