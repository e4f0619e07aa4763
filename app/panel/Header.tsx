import { useEffect } from "react";
import { commandNamed } from "../command/all.ts";
import { isDirty, useDocument } from "../store/document.ts";
import { usePrinter } from "../store/print.ts";
import { useSession } from "../store/session.ts";
import { CommandButton } from "./CommandButton.tsx";
import { deckLevels, phaseRate } from "./levels.ts";
import { Menu } from "./Menu.tsx";
import { ViewSwitch } from "./ViewSwitch.tsx";

/** Title, spin rate and level of each deck in the phase on the stage; view, edits and the menu. */
export function Header() {
	const layout = useDocument((s) => s.layout);
	const dirty = useDocument(isDirty);
	const phase = useSession((s) => s.selected?.phase ?? "nominal");
	const print = usePrinter();
	useEffect(() => {
		document.title = `${dirty ? "• " : ""}${layout.title} – Offplumb`;
	}, [layout.title, dirty]);
	return (
		<header className="top">
			<h1>
				{layout.title}
				{dirty && (
					<span className="dirty" title="Changed since it was saved">
						<span aria-hidden="true">•</span>
						<span className="unseen">, changed since it was saved</span>
					</span>
				)}
			</h1>
			<ul className="levels" aria-label="Spin rate and level of each deck">
				<li>
					<b>{print(phaseRate(layout, phase), "rpm")}</b> {phase}
				</li>
				{deckLevels(layout, phase).map((deck) => (
					<li key={deck.id}>
						<b>{print(deck.level, "g")}</b> {deck.name}
					</li>
				))}
			</ul>
			<ViewSwitch />
			<div className="edits">
				<CommandButton command={commandNamed("undo")} icon="undo" />
				<CommandButton command={commandNamed("redo")} icon="redo" />
				<Menu />
			</div>
		</header>
	);
}
